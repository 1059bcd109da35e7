/** How a heap's core goes from dawn to dawn. */
import { median } from './median';

export interface Dawn {
  /** Epoch ms. */
  at: number;
  /** °C */
  value: number;
}

export interface CoreTrend {
  /** K from the first to the last dawn looked at. */
  changeK: number;
  days: number;
  /** Falling for certain: more than its day-to-day wander. */
  isLastingFall: boolean;
}

const WEEK_MS = 7.5 * 86_400_000;
const LEAST_DAWNS = 5;
const LEAST_FALL_K = 2;

/**
 * The last week's way of a core, from one value a day at one hour of the day. A fall is lasting where it is over 2 K and
 * over three times the typical day-to-day step that a heap makes without going anywhere: the median of how far each day's
 * step is from the mean step. (The trade's rule: turn a heap at a definite, lasting fall of its core, until then leave it
 * alone. The figures that make "definite" exact are ours.)
 * @returns null under five dawns
 */
export function coreTrend(dawns: readonly Dawn[]): CoreTrend | null {
  const last = dawns.at(-1);
  if (last === undefined) return null;
  const week = dawns.filter((dawn) => last.at - dawn.at < WEEK_MS);
  const first = week[0];
  if (first === undefined || week.length < LEAST_DAWNS) return null;
  const steps = week.slice(1).map((dawn, i) => dawn.value - (week[i]?.value ?? dawn.value));
  const changeK = last.value - first.value;
  const mean = changeK / steps.length;
  const wander = median(steps.map((step) => Math.abs(step - mean)));
  return {
    changeK,
    days: Math.round((last.at - first.at) / 86_400_000),
    isLastingFall: changeK < -LEAST_FALL_K && -changeK > 3 * wander,
  };
}
