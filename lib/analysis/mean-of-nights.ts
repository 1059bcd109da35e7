/**
 * The mean a night of a run of nights, and how far chance may have moved it. Nights are no coin tosses: a cold spell lasts,
 * and a heap that is warm tonight is warm tomorrow. So n nights count as n (1 − r) / (1 + r), r being the correlation of a
 * night with the next. In few nights that correlation comes out too small, by (1 + 4 r) / n on average (M. G. Kendall,
 * "Note on bias in the estimation of autocorrelation", Biometrika 41 (1954) 403–404), and is put right by it; one below
 * nothing counts as none, so that chance never gives more nights than there were.
 */
export interface NightsMean {
  mean: number;
  /** Standard deviation of the mean. */
  sd: number;
  /** Degrees of freedom of `sd`. */
  degrees: number;
  nights: number;
}

/** Under so many, a mean has no deviation that means anything. */
export const LEAST_NIGHTS = 3;
/** Nights that are more alike than this are one another's copy, and no formula makes evidence of them. */
const MOST_ALIKE = 0.9;

/** @returns null under three nights */
export function meanOfNights(values: readonly number[]): NightsMean | null {
  const n = values.length;
  if (n < LEAST_NIGHTS) return null;
  const mean = values.reduce((sum, value) => sum + value, 0) / n;
  const off = values.map((value) => value - mean);
  const squares = off.reduce((sum, one) => sum + one * one, 0);
  if (squares === 0) return { mean, sd: 0, degrees: n - 1, nights: n };
  const alike = alikeness(off, squares);
  const worth = Math.max(2, (n * (1 - alike)) / (1 + alike));
  // alike nights also scatter less about their own mean than about the true one
  const variance = squares / (n * (1 - 1 / worth));
  return { mean, sd: Math.sqrt(variance / worth), degrees: worth - 1, nights: n };
}

function alikeness(off: readonly number[], squares: number): number {
  const n = off.length;
  const products = off.slice(1).reduce((sum, one, i) => sum + one * (off[i] ?? 0), 0);
  const raw = products / squares;
  const upright = n > 4 ? (n * raw + 1) / (n - 4) : raw;
  return Math.min(MOST_ALIKE, Math.max(0, upright));
}
