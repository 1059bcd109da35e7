/** Runs of a load, taken out of its channel's spans: what a house did while it ran is read off these. */
import type { Claim } from '@/lib/control/types';
import type { Span } from './spans';

export interface LoadRun {
  /** Epoch ms. */
  from: number;
  to: number;
  /** How long it had stood still before, s, as far as the spans go back; null for a run that is their first. */
  stoodS: number | null;
  /** The claim under which it stopped; null while it runs still, or where nobody knows. */
  endedBy: Claim | null;
}

/** What neighbouring spans say of one run is put together: a claim may change while the load runs on. */
export function runsOf(spans: readonly Span[]): LoadRun[] {
  const runs: LoadRun[] = [];
  let stillSince: number | null = null;
  let last: LoadRun | null = null;
  for (const { from, to, on, claim } of spans) {
    if (on && last !== null) last.to = to;
    else if (on) {
      last = { from, to, stoodS: stillSince === null ? null : (from - stillSince) / 1000, endedBy: null };
      runs.push(last);
    } else {
      if (last !== null) last.endedBy = claim;
      if (last !== null || stillSince === null) stillSince = from;
      last = null;
    }
  }
  return runs;
}

/** Means of a point over steps of equal length, by when each step begins. */
export interface Stepped {
  stepMs: number;
  at: readonly number[];
  mean: readonly number[];
}

/** Steps that lie wholly within [from, to): their middle and their mean. */
export function stepsWithin(series: Stepped, from: number, to: number): { at: number; value: number }[] {
  const found: { at: number; value: number }[] = [];
  for (let place = firstFrom(series.at, from); place < series.at.length; place += 1) {
    const at = series.at[place] ?? Infinity;
    const value = series.mean[place];
    if (at + series.stepMs > to || value === undefined) break;
    found.push({ at: at + series.stepMs / 2, value });
  }
  return found;
}

function firstFrom(ascending: readonly number[], wanted: number): number {
  let [low, high] = [0, ascending.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((ascending[middle] ?? Infinity) < wanted) low = middle + 1;
    else high = middle;
  }
  return low;
}
