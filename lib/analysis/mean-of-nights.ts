/**
 * The mean a night of a run of nights, and how far chance may have moved it. Nights are no coin tosses: a cold spell lasts,
 * and a heap that is warm tonight is warm tomorrow. So n nights count as n (1 − r) / (1 + r), r being the likeness of a
 * night to the next, and their scatter has n (1 − r²) / (1 + r²) − 1 degrees of freedom (M. S. Bartlett, "Some aspects of
 * the time-correlation problem", Journal of the Royal Statistical Society 98 (1935) 536–543).
 *
 * A dozen nights tell r badly, and too small by (1 + 3 r) / n on average (M. G. Kendall, "Note on bias in the estimation of
 * autocorrelation", Biometrika 41 (1954) 403–404). So what they show is put right by that, and then weighed against what
 * nights are usually like, as if ten more had been seen. Tried on nights of known likeness (tests/analysis/compare.test.ts):
 * the 95 % interval holds the truth in 92 to 99 of 100 cases up to r = 0.5, in 86 or more at 0.7.
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
/** How like a night is to the next where little is known, by how many nights that is believed, and the most. Ours. */
const USUALLY_ALIKE = 0.45;
const NIGHTS_BELIEVED = 10;
const MOST_ALIKE = 0.85;
/** Nights that are all alike are still more than one. */
const LEAST_WORTH = 1.5;
const LEAST_DEGREES = 2;

/** @returns null under three nights */
export function meanOfNights(values: readonly number[]): NightsMean | null {
  const n = values.length;
  if (n < LEAST_NIGHTS) return null;
  const mean = values.reduce((sum, value) => sum + value, 0) / n;
  const off = values.map((value) => value - mean);
  const squares = off.reduce((sum, one) => sum + one * one, 0);
  if (squares === 0) return { mean, sd: 0, degrees: n - 1, nights: n };
  const alike = alikeness(off, squares);
  const worth = Math.max(LEAST_WORTH, (n * (1 - alike)) / (1 + alike));
  // alike nights also scatter less about their own mean than about the true one
  const variance = squares / (n * (1 - 1 / worth));
  const degrees = (n * (1 - alike ** 2)) / (1 + alike ** 2) - 1;
  return {
    mean,
    sd: Math.sqrt(variance / worth),
    degrees: Math.max(LEAST_DEGREES, Math.min(n - 1, degrees)),
    nights: n,
  };
}

function alikeness(off: readonly number[], squares: number): number {
  const n = off.length;
  const products = off.slice(1).reduce((sum, one, i) => sum + one * (off[i] ?? 0), 0);
  const raw = products / squares;
  const upright = Math.max(-0.2, Math.min(1, raw + (1 + 3 * raw) / n));
  const weighed = (n * upright + NIGHTS_BELIEVED * USUALLY_ALIKE) / (n + NIGHTS_BELIEVED);
  return Math.min(MOST_ALIKE, Math.max(0, weighed));
}
