/** What a heap's heat cost in a season, all in: its own costs, spread over the years for which they last, and its fan. */
import { DateTime } from 'luxon';

export interface Season {
  /** Such as `2026/27`, or `2027` south of the equator, where winter lies in the middle of the year. */
  name: string;
  /** Its year, for counting seasons. */
  year: number;
  /** Names of its first and last night. */
  from: string;
  to: string;
}

/** The season that holds a date: from July to June north of the equator, from January to December south of it. */
export function seasonOf(date: string, latitude: number): Season {
  const day = DateTime.fromISO(date, { zone: 'UTC' });
  if (latitude < 0)
    return { name: String(day.year), year: day.year, from: `${day.year}-01-01`, to: `${day.year}-12-31` };
  const year = day.month >= 7 ? day.year : day.year - 1;
  return {
    name: `${year}/${String((year + 1) % 100).padStart(2, '0')}`,
    year,
    from: `${year}-07-01`,
    to: `${year + 1}-06-30`,
  };
}

export interface OwnCost {
  /** Day on which it was paid, `YYYY-MM-DD`. */
  on: string;
  micros: number;
  /** Seasons for which it serves, the first that of its day. */
  years: number;
}

/**
 * The part of a cost that a season bears, whole micros: the parts of all its seasons add up to the cost exactly.
 * @example 100 for 3 years gives 33.333333, 33.333333 and 33.333334
 */
export function shareOfSeason(cost: OwnCost, season: Season, latitude: number): number {
  const nth = season.year - seasonOf(cost.on, latitude).year;
  if (nth < 0 || nth >= cost.years) return 0;
  const upTo = (seasons: number) => Math.floor((cost.micros * seasons) / cost.years);
  return upTo(nth + 1) - upTo(nth);
}

export interface AllIn {
  /** Micros a kWh of heat. */
  perKWh: number;
  sd: number;
  /** Between which the price lies 95 times in 100: not even, since the heat stands below the line. */
  low: number;
  high: number;
}

export type NoPrice = 'no-heat' | 'heat-not-told' | 'no-costs' | 'no-power' | 'no-tariff';

/** Over this share, heat is too poorly known for a price: a ratio's deviation no longer means what it says. */
const MOST_RELATIVE_SD = 0.25;

/**
 * Cost over heat, the heat being normal: its variance by Taylor's expansion to the third term, with r the relative
 * deviation of heat: r² + 8 r⁴ + 69 r⁶ (tried by chance in the tests; the first term alone is a sixth short at r = 0.2).
 * @param heat kWh
 * @param micros all costs together
 */
export function allInPrice(heat: { kWh: number; sd: number } | null, micros: number): AllIn | NoPrice {
  if (heat === null) return 'no-heat';
  const spread = heat.sd / Math.abs(heat.kWh);
  if (heat.kWh <= 0 || spread > MOST_RELATIVE_SD) return 'heat-not-told';
  const perKWh = micros / heat.kWh;
  return {
    perKWh,
    sd: perKWh * spread * Math.sqrt(1 + 8 * spread ** 2 + 69 * spread ** 4),
    low: micros / (heat.kWh + 1.96 * heat.sd),
    high: micros / (heat.kWh - 1.96 * heat.sd),
  };
}
