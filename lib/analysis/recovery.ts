/**
 * How a source comes back after draws: τ is the time in which its base regains two thirds of what a draw took. The shapes
 * that the recovery figures have; every interval holds the truth in 95 of 100 cases.
 */

export interface Estimate {
  value: number;
  low: number;
  high: number;
}

/** A week's rests, or a night's, taken together. */
export interface PooledRecovery {
  /** s */
  tau: Estimate & { sd: number };
  /** °C to which the base would have come back. */
  level: Estimate & { sd: number };
  rests: number;
}

export interface RecoveryWeek {
  /** Name of its first night, a Monday's. */
  week: string;
  /** Epoch ms from the first noon of its first night to the last of its last. */
  from: number;
  to: number;
  /** Null where no rest was long enough. */
  recovery: PooledRecovery | null;
  /** Rests of the week, those without a fit included. */
  rests: number;
}

/** Whether what is seen is beyond what chance would do: the interval leaves out "no change". */
export type Change = 'slower' | 'quicker' | 'none-seen' | 'cannot-tell';

export interface RecoveryTrend {
  /** Weeks that it is made of. */
  weeks: number;
  /** Ratio of τ from one week to the next: 1.05 is 5 % slower each week. Null where under five weeks are known. */
  ratioPerWeek: Estimate | null;
  change: Change;
}

/** Before and after something was done to a heap. */
export interface EntryEffect {
  at: number;
  kind: string;
  /** Nights with a fit on either side, a week at most, and none beyond the next entry. */
  nightsBefore: number;
  nightsAfter: number;
  /** τ after ÷ τ before. */
  tauRatio: Estimate | null;
  /** K by which the level differs. */
  levelChange: Estimate | null;
  /** Two-sided chance of a difference in τ at least as clear if nothing had changed: exact, by ranks. */
  p: number | null;
  change: Change;
}
