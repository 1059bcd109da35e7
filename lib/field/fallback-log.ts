/**
 * What a node's fallback did, as the text of its `log` frames: one line, `fallback` and what happened, then name=value
 * pairs in any order. `at` is Unix seconds, also of what happened while nobody was connected.
 *
 *     fallback begun at=1764554404
 *     fallback on at=1764554404.5 relay=1 why=below point=bench-1 value=1.94
 *     fallback off at=1764555604.5 relay=1 why=longest point=bench-1 value=3.1
 *     fallback ended at=1764559800
 *
 * `begun` and `ended` bound the time in which nobody commanded the node and it kept a fallback; `ended` tells no coil:
 * the command that ended it does, and `relays` after it. `on` and `off` are coils. A pair that is not known is passed over.
 */

/** below, above: its band. longest: it ran for `onFor`. dead-point: no reading. command: a command ended it. */
export const FALLBACK_WHY = ['below', 'above', 'longest', 'dead-point', 'command'] as const;
export type FallbackWhy = (typeof FALLBACK_WHY)[number];

export interface FallbackCoil {
  what: 'on' | 'off';
  /** Epoch ms, app time. */
  at: number;
  relay: number;
  why: FallbackWhy | null;
  point: string | null;
  /** °C, as the node's own sensor showed it. */
  value: number | null;
}

export type FallbackEntry = { what: 'begun' | 'ended'; at: number } | FallbackCoil;

const LINE = /^fallback (begun|ended|on|off)((?: [a-z-]+=[^\s=]+)*)$/;
/** A second is told to the millisecond. */
const MS = 1000;

/** @example fallbackText({ what: 'begun', at: 1764554404000 }) === 'fallback begun at=1764554404' */
export function fallbackText(entry: FallbackEntry): string {
  const pairs: [string, string | number | null][] = [['at', Math.round(entry.at) / MS]];
  if (entry.what === 'on' || entry.what === 'off') {
    const { relay, why, point, value } = entry;
    pairs.push(['relay', relay], ['why', why], ['point', point], ['value', value]);
  }
  const told = pairs.flatMap(([name, value]) => (value === null ? [] : [`${name}=${value}`]));
  return ['fallback', entry.what, ...told].join(' ');
}

/** What a log text tells of a fallback; null for any other text. */
export function readFallbackText(text: string): FallbackEntry | null {
  const [, what, rest = ''] = LINE.exec(text.trim()) ?? [];
  if (what === undefined) return null;
  const pairs = new Map(rest.split(' ').flatMap((pair) => (pair === '' ? [] : [splitPair(pair)])));
  const at = Math.round(Number(pairs.get('at') ?? NaN) * MS);
  if (!Number.isFinite(at) || at < 0) return null;
  if (what === 'begun' || what === 'ended') return { what, at };
  const relay = Number(pairs.get('relay') ?? NaN);
  if (!Number.isInteger(relay) || relay < 1 || (what !== 'on' && what !== 'off')) return null;
  const why = FALLBACK_WHY.find((one) => one === pairs.get('why')) ?? null;
  const value = Number(pairs.get('value') ?? NaN);
  return {
    ...{ what, at, relay, why, point: pairs.get('point') ?? null },
    value: Number.isFinite(value) ? value : null,
  };
}

function splitPair(pair: string): [string, string] {
  const cut = pair.indexOf('=');
  return [pair.slice(0, cut), pair.slice(cut + 1)];
}
