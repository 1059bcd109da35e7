/** What is known of one rest of a source: the curve by which its base came back, or why none could be told. */

/**
 * Why a rest has no fit: under four readings; shorter than half of the time constant that it would give; the base did not
 * come back by more than its readings scatter; a silence of the base cut it.
 */
export type RestWhy = 'too-few-readings' | 'too-short' | 'no-return' | 'not-read';

/** 1/τ as the readings have it, 1/s: what rests are pooled by. It may be nothing or less where τ is not to be told. */
export interface RestRate {
  rate: number;
  rateSd: number;
  /** s of the rest that were looked at. */
  lengthS: number;
  points: number;
  /** K by which readings scatter about the curve. */
  rms: number;
}

/** T(t) = level − (level − start) e^(−t/τ) from the end of the draw. Instants epoch ms, °C, K, s. */
export interface FittedRest extends RestRate {
  from: number;
  to: number;
  /** °C at its beginning, by the curve. */
  start: number;
  /** s */
  tau: number;
  tauSd: number;
  /** 95 % interval of τ, s. */
  tauLow: number;
  tauHigh: number;
  /** °C to which it would have come back. */
  level: number;
  levelSd: number;
}

export type RestFit = FittedRest | ({ from: number; to: number; why: RestWhy } & Partial<RestRate>);

export function isFitted(rest: RestFit): rest is FittedRest {
  return 'tau' in rest;
}

/** Rests that say something of the rate, those too short for a time constant of their own included. */
export function hasRate<T extends RestFit>(rest: T): rest is T & RestRate {
  return rest.rate !== undefined;
}
