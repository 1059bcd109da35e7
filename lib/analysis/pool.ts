/**
 * Several estimates of one thing taken together, where each has its own deviation and the thing itself may differ a little
 * from one to the next (random effects). The variance between is Paule and Mandel's (1982); the interval is Hartung and
 * Knapp's (2001) with Student's t, which keeps its 95 % with three estimates as with thirty, where the usual one does not.
 * One estimate that lies far from the others counts for less (Huber 1964), so that a rest disturbed by a watering cannot
 * carry a week away.
 */
import { median } from './median';
import { t95 } from './student';

export interface Measured {
  value: number;
  sd: number;
}

export interface Pooled {
  value: number;
  /** Of the mean. */
  sd: number;
  /** 95 % */
  low: number;
  high: number;
  /** Deviation from one to the next beyond what each is uncertain by. */
  between: number;
  count: number;
}

/** Distance in deviations from which an estimate counts for less: rarely reached by chance. */
const FAR = 3;
/** With fewer none can be told to be the odd one out. */
const LEAST_FOR_FAR = 5;

/** @param ownT half a width in deviations where one estimate stands alone; its own interval holds then */
export function pool(all: readonly Measured[], ownT = 1.959964): Pooled | null {
  const [only] = all;
  if (only === undefined) return null;
  if (all.length === 1) {
    const half = ownT * only.sd;
    return { ...only, low: only.value - half, high: only.value + half, between: 0, count: 1 };
  }
  const limits = farness(all);
  const between2 = betweenVariance(all, limits);
  const weights = all.map(({ sd }, i) => (limits[i] ?? 1) / (sd * sd + between2));
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const mean = all.reduce((sum, { value }, i) => sum + value * (weights[i] ?? 0), 0) / total;
  const spread = all.reduce((sum, { value }, i) => sum + (weights[i] ?? 0) * (value - mean) ** 2, 0);
  const sd = Math.sqrt(spread / (all.length - 1) / total);
  const half = t95(all.length - 1) * sd;
  return {
    value: mean,
    sd,
    low: mean - half,
    high: mean + half,
    between: Math.sqrt(between2),
    count: all.length,
  };
}

/** Huber's factors, 1 for whatever lies within reach of the median. */
function farness(all: readonly Measured[]): number[] {
  if (all.length < LEAST_FOR_FAR) return all.map(() => 1);
  const middle = median(all.map(({ value }) => value));
  const scatter = 1.4826 * median(all.map(({ value }) => Math.abs(value - middle)));
  const own = median(all.map(({ sd }) => sd * sd));
  const between2 = Math.max(0, scatter * scatter - own);
  return all.map(({ value, sd }) => {
    const away = Math.abs(value - middle) / Math.sqrt(sd * sd + between2);
    return away > FAR ? FAR / away : 1;
  });
}

/** The variance that makes the weighted sum of squares what chance expects of it; nothing where it is less already. */
function betweenVariance(all: readonly Measured[], limits: readonly number[]): number {
  const excess = (between2: number) => {
    const weights = all.map(({ sd }, i) => (limits[i] ?? 1) / (sd * sd + between2));
    const total = weights.reduce((sum, weight) => sum + weight, 0);
    const mean = all.reduce((sum, { value }, i) => sum + value * (weights[i] ?? 0), 0) / total;
    return (
      all.reduce((sum, { value }, i) => sum + (weights[i] ?? 0) * (value - mean) ** 2, 0) - (all.length - 1)
    );
  };
  if (excess(0) <= 0) return 0;
  let [low, high] = [0, 1e-6];
  while (excess(high) > 0) [low, high] = [high, high * 4];
  while (high - low > 1e-9 * high) {
    const middle = (low + high) / 2;
    if (excess(middle) > 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
