/**
 * How a sensor is, night by night: its noise, how far it stands from its siblings and whether it moves away from them, and
 * the gaps in what it sends. Noise is what scatters about a line through ten minutes of the quiet hours, so that neither a
 * house that cools nor one that a fan warms for half an hour is taken for a probe that shakes.
 */
import { lineThrough } from './line';
import { median } from './median';
import type { Read } from './steadiness';
import { t95 } from './student';

const WINDOW_MS = 10 * 60_000;
/** Fewer readings in a window say nothing of their scatter. */
const LEAST_IN_WINDOW = 8;

/**
 * Deviation of one reading about the line through its ten minutes, the middle one of all windows: a door that was opened
 * spoils one window and not the figure. Null where no window is full enough.
 */
export function noiseOf(readings: readonly Read[]): number | null {
  const windows = new Map<number, Read[]>();
  for (const one of readings) {
    const window = Math.floor(one.at / WINDOW_MS);
    const held = windows.get(window);
    if (held === undefined) windows.set(window, [one]);
    else held.push(one);
  }
  const scatter: number[] = [];
  for (const held of windows.values()) {
    if (held.length < LEAST_IN_WINDOW) continue;
    const start = held[0]?.at ?? 0;
    const sd = lineThrough(held.map((one) => ({ x: (one.at - start) / 1000, y: one.value })))?.sd;
    if (sd !== undefined && sd !== null) scatter.push(sd);
  }
  return scatter.length === 0 ? null : median(scatter);
}

export interface Gaps {
  count: number;
  longestS: number;
  totalS: number;
}

/**
 * Times without a reading for longer than `silentAfterS`, from `from` to `to` (epoch ms). What was silent at either edge
 * counts from the edge.
 */
export function gapsOf(times: readonly number[], from: number, to: number, silentAfterS: number): Gaps {
  const gaps: Gaps = { count: 0, longestS: 0, totalS: 0 };
  let before = from;
  for (const at of [...times.filter((one) => one >= from && one < to), to]) {
    const silentS = (at - before) / 1000;
    if (silentS > silentAfterS) {
      gaps.count += 1;
      gaps.totalS += silentS;
      gaps.longestS = Math.max(gaps.longestS, silentS);
    }
    before = at;
  }
  return gaps;
}

export interface Drift {
  /** Kelvin a week by which it moves away from its siblings. */
  perWeek: number;
  /** Half of the slope's 95 % interval; null for fewer than three nights. */
  give: number | null;
}

/** A line through the nights' differences to the siblings; null for fewer than two nights. @param nights days, and K */
export function driftOf(nights: readonly { day: number; difference: number }[]): Drift | null {
  const line = lineThrough(nights.map(({ day, difference }) => ({ x: day, y: difference })));
  if (line === null) return null;
  const give = line.slopeSd === null ? null : line.slopeSd * t95(nights.length - 2) * 7;
  return { perWeek: line.slope * 7, give };
}

/** Mean distance of a point from the middle of its siblings, over steps that both have; null where none is shared. */
export function differenceToSiblings(
  own: ReadonlyMap<number, number>,
  siblings: readonly ReadonlyMap<number, number>[],
): number | null {
  const differences: number[] = [];
  for (const [at, value] of own) {
    const others = siblings.flatMap((one) => one.get(at) ?? []);
    if (others.length > 0) differences.push(value - median(others));
  }
  return differences.length === 0
    ? null
    : differences.reduce((sum, one) => sum + one, 0) / differences.length;
}

export interface HealthNight {
  /** Date of its evening. */
  night: string;
  readings: number;
  noise: number | null;
  /** To the middle of its siblings, in its unit; null without siblings. */
  difference: number | null;
  gaps: Gaps;
}

export type HealthFinding =
  | { what: 'noisy'; noise: number; usual: number }
  | { what: 'drifts'; perWeek: number; give: number }
  | { what: 'apart'; difference: number }
  | { what: 'gaps'; nights: number };

/** K: four steps of a one-wire probe. */
const NOISY_K = 0.25;
/** K a week, and K: half of what a digital probe is sold as. */
const DRIFT_K = 0.25;
const APART_K = 1.5;

/**
 * What of the nights wants a look. A drift must be surer than chance (its 95 % interval leaves nought out) and large enough to
 * matter; benches may well stand apart by a degree, so only more is told.
 */
export function healthFindings(nights: readonly HealthNight[], sharesPlace: boolean): HealthFinding[] {
  const found: HealthFinding[] = [];
  const noises = nights.flatMap((one) => one.noise ?? []);
  const last = noises.at(-1);
  if (last !== undefined && last > NOISY_K) found.push({ what: 'noisy', noise: last, usual: median(noises) });
  const compared = nights.flatMap(({ night, difference }) =>
    difference === null ? [] : [{ day: Date.parse(night) / 86_400_000, difference }],
  );
  const drift = compared.length < 4 ? null : driftOf(compared);
  if (drift?.give !== null && drift !== null && Math.abs(drift.perWeek) > Math.max(DRIFT_K, drift.give))
    found.push({ what: 'drifts', perWeek: drift.perWeek, give: drift.give });
  const apart = median(compared.slice(-3).map((one) => one.difference));
  if (sharesPlace && compared.length > 0 && Math.abs(apart) > APART_K)
    found.push({ what: 'apart', difference: apart });
  const broken = nights.filter((one) => one.readings > 0 && one.gaps.count > 0).length;
  if (broken > 0) found.push({ what: 'gaps', nights: broken });
  return found;
}
