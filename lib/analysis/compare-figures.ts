/** What is compared of nights, and what each night has to say of a figure. */
import { LEAST_POWER_KWH } from './channel-night';

export const COMPARED = [
  'ran',
  'heat',
  'electricity',
  'forPower',
  'core',
  'lowest',
  'underLimit',
  'lift',
  'humid',
  'outdoors',
] as const;
/**
 * Shares 0 to 1; kWh a night; kWh for 1 kWh; °C; hours a night under the frost limit; K that the house was warmer than
 * outdoors on the mean; hours a night over 90 %.
 */
export type FigureKey = (typeof COMPARED)[number];

export interface ComparableNight {
  night: string;
  values: Partial<Record<FigureKey, number>>;
  /** Deviation of a figure that is the same every night, from probes and flow; left out: none is known. */
  lasting: Partial<Record<FigureKey, number>>;
  /** kWh, what 'forPower' of several nights is reckoned from; null where one of the two is not known. */
  forPower: { heat: number; electricity: number } | null;
}

export interface NightFigure {
  night: string;
  value: number;
}

/**
 * What a figure is in each night that has it. Heat for a unit of power is over all nights together, as Duty tells it: the
 * mean of the nights' own ratios would let a night of one short run count as much as one of ten hours. So each night stands
 * with what it does to the ratio of the sums: their mean is that ratio, and their scatter is its own (W. G. Cochran,
 * Sampling Techniques, 3rd ed. 1977, chapter 6).
 */
export function figuresOf(key: FigureKey, nights: readonly ComparableNight[]): NightFigure[] {
  if (key !== 'forPower')
    return nights.flatMap(({ night, values: { [key]: value } }) =>
      value === undefined ? [] : [{ night, value }],
    );
  const known = nights.flatMap(({ night, forPower }) => (forPower === null ? [] : [{ night, ...forPower }]));
  const electricity = known.reduce((sum, one) => sum + one.electricity, 0);
  if (electricity < LEAST_POWER_KWH) return [];
  const ratio = known.reduce((sum, one) => sum + one.heat, 0) / electricity;
  const each = electricity / known.length;
  return known.map((one) => ({
    night: one.night,
    value: ratio + (one.heat - ratio * one.electricity) / each,
  }));
}

/** The sensors are as wrong in every night, so that the mean is as wrong as a night is on the mean. */
export function lastingOf(key: FigureKey, nights: readonly ComparableNight[]): number {
  if (key === 'forPower') {
    const known = nights.filter(({ forPower }) => forPower !== null);
    const electricity = known.reduce((sum, one) => sum + (one.forPower?.electricity ?? 0), 0);
    return electricity < LEAST_POWER_KWH
      ? 0
      : known.reduce((sum, one) => sum + (one.lasting.heat ?? 0), 0) / electricity;
  }
  const known = nights.flatMap(({ values, lasting }) => (key in values ? [lasting[key] ?? 0] : []));
  return known.length === 0 ? 0 : known.reduce((sum, one) => sum + one, 0) / known.length;
}
