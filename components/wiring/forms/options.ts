import type {
  Channel,
  FieldNode,
  House,
  Interlock,
  Lockout,
  Loop,
  Point,
  Source,
} from '@/lib/schema/yard-view';
import { midSentence } from '@/lib/wording/rule-names';

/** Everything that is wired in a house: what the forms choose from and the tables show. */
export interface Yard {
  house: House;
  nodes: FieldNode[];
  points: Point[];
  sources: Source[];
  channels: Channel[];
  loops: Loop[];
  interlocks: Interlock[];
  lockouts: Lockout[];
}

export interface Option {
  value: string;
  label: string;
}

/** Names with the key behind, since two probes may well bear one name. */
export function pointOptions(points: Point[], roles?: readonly string[]): Option[] {
  const fit = (point: Point) => roles === undefined || roles.includes(point.role);
  // those that fit first, yet all: a house may call its points by no role but "other"
  return [...points.filter(fit), ...points.filter((point) => !fit(point))].map((point) => ({
    value: point.key,
    label: `${point.name} (${point.key})`,
  }));
}

export function channelOptions(channels: Channel[]): Option[] {
  return channels.map((one) => ({ value: one.key, label: `${one.number} · ${one.label}` }));
}

export function sourceOptions(sources: Source[]): Option[] {
  return sources.map((one) => ({ value: one.slug, label: one.name }));
}

export function nodeOptions(nodes: FieldNode[]): Option[] {
  return nodes.map((one) => ({ value: one.key, label: one.key }));
}

export function named(words: Readonly<Record<string, string>>): Option[] {
  return Object.entries(words).map(([value, word]) => ({ value, label: word }));
}

/** @example roleWords('heap-core') === 'heap core' */
export function roleWords(role: string): string {
  const special: Record<string, string> = {
    'heap-base': 'heap beside the pipe',
    'gas-co': 'carbon monoxide',
    'gas-co2': 'carbon dioxide',
    'gas-nh3': 'ammonia',
  };
  return special[role] ?? midSentence(role.replaceAll('-', ' '));
}
