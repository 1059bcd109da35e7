/**
 * Heat against the cold outdoors: a straight line by least squares through the nights in which the source ran, with the
 * 95 % interval of the line and of a single night about it. A line is all that a winter's nights bear: on a mild night the
 * source does not run, so such nights are left out and the line is not read beyond the coldest and mildest that it has.
 */
import type { NightSummary } from './nights';
import { t95 } from './student';

/** Under so many a line would be drawn through weather. */
const LEAST_NIGHTS = 8;
const LEAST_SPREAD_K = 3;
const CURVE_POINTS = 24;

export interface HeatNight {
  night: string;
  /** Lowest outdoors, °C. */
  outdoors: number;
  kWh: number;
  sd: number;
}

export interface HeatLine {
  /** kWh a night for each degree colder outdoors, with its 95 % interval. */
  perColderK: { value: number; low: number; high: number };
  /** kWh by which single nights scatter about the line. */
  scatterKWh: number;
  /** Ascending by °C: the line, the interval of the line, and that of one night. */
  curve: { outdoors: number; kWh: number; line: [number, number]; night: [number, number] }[];
}

export type NoLine = 'few-nights' | 'like-nights';

/** Whole nights, read well enough, in which the source ran and its heat is known. */
export function heatNights(nights: readonly NightSummary[]): HeatNight[] {
  return nights.flatMap(({ night, complete, coverageLow, onSeconds, heat, outdoorsLowest }) =>
    complete && !coverageLow && onSeconds > 0 && heat !== null && outdoorsLowest !== null
      ? [{ night, outdoors: outdoorsLowest.value, kWh: heat.kWh, sd: heat.sd }]
      : [],
  );
}

/** @returns why there is no line: under eight nights, or all about as cold as each other */
export function heatLine(nights: readonly HeatNight[]): HeatLine | { why: NoLine } {
  const n = nights.length;
  if (n < LEAST_NIGHTS) return { why: 'few-nights' };
  const cold = nights.map((night) => night.outdoors);
  const [least, most] = [Math.min(...cold), Math.max(...cold)];
  if (most - least < LEAST_SPREAD_K) return { why: 'like-nights' };
  const middle = cold.reduce((sum, one) => sum + one, 0) / n;
  const mean = nights.reduce((sum, one) => sum + one.kWh, 0) / n;
  const spread = cold.reduce((sum, one) => sum + (one - middle) ** 2, 0);
  const slope = nights.reduce((sum, one) => sum + (one.outdoors - middle) * (one.kWh - mean), 0) / spread;
  const at = (outdoors: number) => mean + slope * (outdoors - middle);
  const variance = nights.reduce((sum, one) => sum + (one.kWh - at(one.outdoors)) ** 2, 0) / (n - 2);
  const t = t95(n - 2);
  const half = t * Math.sqrt(variance / spread);
  const curve = Array.from({ length: CURVE_POINTS + 1 }, (_, step): HeatLine['curve'][number] => {
    const outdoors = least + ((most - least) * step) / CURVE_POINTS;
    const ofLine = variance * (1 / n + (outdoors - middle) ** 2 / spread);
    const kWh = at(outdoors);
    const [line, night] = [t * Math.sqrt(ofLine), t * Math.sqrt(ofLine + variance)];
    return { outdoors, kWh, line: [kWh - line, kWh + line], night: [kWh - night, kWh + night] };
  });
  return {
    perColderK: { value: -slope, low: -slope - half, high: -slope + half },
    scatterKWh: Math.sqrt(variance),
    curve,
  };
}
