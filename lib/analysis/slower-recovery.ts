/** Whether a heap comes back more slowly from its draws than it did: what the fits of its weeks say, and whether it matters. */

export interface RecoveryHistory {
  /** Oldest first: middle of the week, epoch ms; time constant and its standard deviation, s. */
  weeks: readonly { at: number; tauS: number; tauSdS: number }[];
  /** τ of one week to that of the next, with its 95 % interval; null where too few weeks are known. */
  ratioPerWeek: { value: number; low: number; high: number } | null;
}

export interface Slower {
  /** Epoch ms of the last week. */
  at: number;
  body: { fromS: number; toS: number; sdS: number; weeks: number };
}

/** Under a seventh more nobody would notice it, however sure it is. */
const LEAST_SHARE = 0.15;

/** @returns null where the interval does not exclude "no change", or the change would not be felt */
export function recoverySlower({ weeks, ratioPerWeek }: RecoveryHistory): Slower | null {
  const [first, last] = [weeks[0], weeks.at(-1)];
  if (first === undefined || last === undefined || ratioPerWeek === null || ratioPerWeek.low <= 1)
    return null;
  const span = (last.at - first.at) / (7 * 86_400_000);
  if (ratioPerWeek.value ** span < 1 + LEAST_SHARE) return null;
  return { at: last.at, body: { fromS: first.tauS, toS: last.tauS, sdS: last.tauSdS, weeks: weeks.length } };
}
