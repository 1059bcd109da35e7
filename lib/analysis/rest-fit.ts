/** What is known of one rest of a source: the curve by which its base came back, or why none could be laid. */

/**
 * Why a rest has no fit: under four readings; shorter than half of the time constant that it would give; the base did not
 * come back by more than its readings scatter; a silence of the base cut it.
 */
export type RestWhy = 'too-few-readings' | 'too-short' | 'no-return' | 'not-read';

/** T(t) = level − (level − start) e^(−t/τ) from the end of the draw. Instants epoch ms, °C, K, s. */
export interface FittedRest {
  from: number;
  to: number;
  /** °C at its beginning, by the curve. */
  start: number;
  /** s */
  tau: number;
  /** s; over `tau` it is the deviation of ln τ. */
  tauSd: number;
  /** 95 % interval of τ, s. */
  tauLow: number;
  tauHigh: number;
  /** °C to which it would have come back. */
  level: number;
  levelSd: number;
  /** Readings that the curve is laid through. */
  points: number;
  /** K by which they scatter about it. */
  rms: number;
}

export type RestFit = FittedRest | { from: number; to: number; why: RestWhy };

export function isFitted(rest: RestFit): rest is FittedRest {
  return 'tau' in rest;
}
