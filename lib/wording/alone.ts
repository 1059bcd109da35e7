/** What a field box did by itself while nobody commanded it, and what it is to do then. */
import { clock, duration } from '@/lib/units/time';

import { temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { join } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';
import { exactly, level } from './settings';

export interface AloneFacts {
  node: string;
  /** Epoch ms; `to` null: it is not told to be over. */
  from: number;
  to: number | null;
  /** Loads that it ran meanwhile, and for how long, s. */
  ran: { label: string; seconds: number }[];
}

/**
 * @param many several field boxes in this house: the one is named
 * @example "The field box kept the house by itself from 02:10 to 03:40: the gate-heap fan ran for 40 min."
 */
export function aloneSentence(
  facts: AloneFacts,
  zone: string,
  preferences: Preferences,
  many: boolean,
): Phrase[] {
  const at = (ms: number) => clock(ms, zone, preferences);
  const box = many ? `The field box ${facts.node}` : 'The field box';
  const when =
    facts.to === null
      ? `has kept the house by itself since ${at(facts.from)}, as far as it has told`
      : `kept the house by itself from ${at(facts.from)} to ${at(facts.to)}`;
  const loads = facts.ran.map(
    ({ label, seconds }) => `the ${midSentence(label)} ran for ${duration(seconds)}`,
  );
  const done = loads.length === 0 ? 'no load ran' : loads.join(', ');
  return join({ text: `${box} ${when}:`, tone: 'strong' }, ` ${done}.`);
}

export interface FallbackWords {
  /** Name of the point it goes by. */
  point: string;
  below: number;
  above: number;
  onFor: number;
  offFor: number;
}

/** @example "On below 2 °C at bench probe 1, off over 5 °C; 20 min at a time, then 40 min off." */
export function fallbackWords(fallback: FallbackWords, preferences: Preferences): string {
  const degrees = (value: number) => level(value, preferences);
  return `On below ${degrees(fallback.below)} at ${midSentence(fallback.point)}, off over ${degrees(fallback.above)}; ${exactly(fallback.onFor)} at a time, then ${exactly(fallback.offFor)} off.`;
}

/** Whether a field box can run fallbacks, as it said itself. */
export type CanFallback = 'can' | 'cannot' | 'not-told';

/** What stands beside a channel's fallback where it would not be run. */
export function fallbackDoubt(can: CanFallback, node: string): string | null {
  if (can === 'can') return null;
  return can === 'cannot'
    ? `Field box ${node} cannot run it: without a server the load falls to its safe state.`
    : `Field box ${node} has not yet said whether it can run it.`;
}

/** Why a switching of a fallback was made, as it was stored. */
export interface FallbackReason {
  point: string | null;
  value: number | null;
  why: string | null;
  below: number | null;
  above: number | null;
}

/**
 * @param on whether the load runs from then on
 * @param name how a point is called in mid-sentence
 * @example "The field box ran it by itself: the bench at 1.9 °C was under 2 °C."
 */
export function fallbackReason(
  reason: FallbackReason,
  on: boolean,
  name: (key: string) => string,
  preferences: Preferences,
): string {
  const point = reason.point === null ? 'its point' : name(reason.point);
  const value = reason.value === null ? '' : ` at ${temperature(reason.value, preferences)}`;
  const limit = (celsius: number | null) => (celsius === null ? 'its limit' : level(celsius, preferences));
  const because: Record<string, string> = {
    below: `${point}${value} was under ${limit(reason.below)}`,
    above: `${point}${value} was over ${limit(reason.above)}`,
    longest: 'it had run for as long as it may, and rests',
    'dead-point': `${point} could not be read`,
    command: 'it is commanded again',
  };
  const why = because[reason.why ?? ''];
  return `The field box ${on ? 'ran' : 'stopped'} it by itself, while nobody commanded it${why === undefined ? '' : `: ${why}`}.`;
}
