/** What the sentences of Watch need to know beside a reason: names, the reader, the house's clock. */
import { isInstant } from '@/lib/control/because';
import { pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';
import { midSentence, pointWords, type NamedPoint } from './rule-names';

export interface Scene {
  /** Epoch ms. */
  now: number;
  zone: string;
  preferences: Preferences;
  points: NamedPoint[];
  channels: { key: string; label: string; loadKind: string }[];
  sources: { slug: string; name: string }[];
}

export function timeWords(at: number | null | undefined, scene: Scene): string | null {
  return typeof at === 'number' ? moment(at, scene.now, scene.zone, scene.preferences) : null;
}

export function pointName(key: string, scene: Scene): string {
  return pointWords(key, { points: scene.points, channel: { label: '', loadKind: '' } });
}

/** A value of a point in the unit that it is kept in; temperatures where the point is not known. */
export function valueOf(key: string | null, value: number | null, scene: Scene): string {
  const unit = scene.points.find((one) => one.key === key)?.unit ?? 'Cel';
  return pointValue(value, unit, scene.preferences);
}

/** @example channelName('gate-heap-fan', scene) === 'the gate-heap fan' */
export function channelName(key: string, scene: Scene): string {
  const label = scene.channels.find((one) => one.key === key)?.label;
  return label === undefined ? key : `the ${midSentence(label)}`;
}

export function sourceName(slug: string, scene: Scene): string {
  const name = scene.sources.find((one) => one.slug === slug)?.name;
  return name === undefined ? slug : `the ${midSentence(name)}`;
}

/** First letter large; a name that begins a sentence. */
export function begin(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** Joins sentences, leaving out what is not there. */
export function said(...parts: (string | null | false | undefined)[]): string {
  return parts.filter((part) => typeof part === 'string' && part !== '').join(' ');
}

/** A reason as it came over the wire: its instants are ISO there, and epoch ms again after this. */
export function withInstants(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(withInstants);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value).map(([field, one]) => [
      field,
      isInstant(field) && typeof one === 'string' ? Date.parse(one) : withInstants(one),
    ]),
  );
}
