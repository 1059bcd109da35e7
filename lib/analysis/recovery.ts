/**
 * How a source comes back after draws: τ is the time in which its base regains two thirds of what a draw took. Rests are
 * pooled by their rates 1/τ, in which each one's interval is symmetric (rest-curve.ts says why); every interval here holds
 * the truth in 95 of 100 cases.
 */
import { type Measured, pool } from './pool';
import { hasRate, isFitted, type RestFit, type RestRate } from './rest-fit';

export interface Estimate {
  value: number;
  /** Null where nothing bounds it on that side. */
  low: number | null;
  high: number | null;
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

/** Part of a time constant that a rest must last. */
export const LEAST_TAUS = 0.5;
/** Readings' worth by which the scatter of all rests stands behind that of each. */
const SHARED_FREEDOM = 10;

/**
 * Rests taken together. Which are long enough is judged by the time constant of all, not by each one's own: a rest that by
 * chance shows a long τ would else be dropped for it, and the others would be too quick.
 * @returns null where no rest says anything, or together they do not tell τ from a straight line
 */
export function pooledRecovery(rests: readonly RestFit[]): PooledRecovery | null {
  const rates = rests.filter(hasRate);
  const first = pool(measured(rates));
  if (first === null || first.value <= 0) return null;
  const long = rates.filter((rest) => rest.lengthS * first.value >= LEAST_TAUS);
  const rate = pool(measured(long));
  const level = pool(
    long.filter(isFitted).map((rest) => ({ value: rest.level, sd: Math.max(rest.levelSd, 1e-4) })),
  );
  if (rate === null || level === null || rate.value <= 0 || rate.low <= 0) return null;
  return {
    tau: {
      value: 1 / rate.value,
      sd: rate.sd / rate.value ** 2,
      low: 1 / rate.high,
      high: 1 / rate.low,
    },
    level: { value: level.value, sd: level.sd, low: level.low, high: level.high },
    rests: long.length,
  };
}

/** Rates with deviations that lean on the scatter of all: one of five readings that lie well by chance is not that sure. */
function measured(rests: readonly RestRate[]): Measured[] {
  const freedom = (rest: RestRate) => Math.max(1, rest.points - 3);
  const square = (rest: RestRate) => Math.max(rest.points * rest.rms ** 2, 1e-12);
  const shared =
    rests.reduce((sum, rest) => sum + square(rest), 0) / rests.reduce((sum, rest) => sum + freedom(rest), 0);
  return rests.map((rest) => {
    const own = square(rest) / freedom(rest);
    const leant = (square(rest) + SHARED_FREEDOM * shared) / (freedom(rest) + SHARED_FREEDOM);
    return { value: rest.rate, sd: rest.rateSd * Math.sqrt(leant / own) };
  });
}
