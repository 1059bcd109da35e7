/**
 * How a rule's sentence calls what it names. A rule keeps keys, people read names: by its role where that alone tells
 * which point is meant ("the bench"), else by its own name.
 */
import type { Tone } from './phrase';

export interface NamedPoint {
  key: string;
  name: string;
  role: string;
  unit: string;
}

export interface RuleNames {
  channel: { label: string; loadKind: string };
  /** All points of the house: a role that two share does not name one of them. */
  points: NamedPoint[];
}

const roleWords: Record<string, string> = {
  'house-air': 'the house air',
  bench: 'the bench',
  outdoors: 'the air outdoors',
  'loop-intake': 'the loop’s intake',
  'loop-return': 'the loop’s return',
  'heap-core': 'the heap’s core',
  'heap-base': 'the heap beside the pipe',
  'heap-edge': 'the heap’s edge',
  ground: 'the ground',
  humidity: 'the humidity',
  light: 'the light',
};

/** "Gate-heap fan" inside a sentence: "gate-heap fan"; "LH-1 fan" and "UV lamp" stay as they are. */
export function midSentence(name: string): string {
  const second = name.charAt(1);
  return second !== '' && second === second.toLowerCase() && second !== second.toUpperCase()
    ? name.charAt(0).toLowerCase() + name.slice(1)
    : name;
}

/** @example pointWords('bench-1', names) is "the bench" in a house with one bench point, else "bench probe 1" */
export function pointWords(key: string, names: RuleNames): string {
  const point = names.points.find((one) => one.key === key);
  if (!point) return `the missing point ${key}`;
  const words = roleWords[point.role];
  if (words && names.points.filter((one) => one.role === point.role).length === 1) return words;
  const name = midSentence(point.name);
  // a name that ends in a number names one thing by itself: "bench probe 1", but "the gate heap core"
  return /\d$/.test(name) || /^(the|air) /i.test(name) ? name : `the ${name}`;
}

export function pointTone(key: string, names: RuleNames): Tone {
  switch (names.points.find((one) => one.key === key)?.role) {
    case 'outdoors':
      return 'outdoors';
    case 'heap-core':
      return 'core';
    case 'heap-base':
    case 'heap-edge':
    case 'ground':
      return 'base';
    case 'loop-intake':
    case 'loop-return':
      return 'ember';
    case 'house-air':
    case 'bench':
      return 'house';
    default:
      return 'strong';
  }
}
