import { DateTime } from 'luxon';
import { getTimes } from 'suncalc';
import type { Night } from './night';

/**
 * The instant of a night by which one dawn is compared with the next: sunrise, or 06:00 by the clock where the sun does
 * not rise or does not set. Epoch ms, within the night.
 */
export function dawnOf(night: Night, zone: string, latitude: number, longitude: number): number {
  const six = DateTime.fromMillis(night.to, { zone }).set({ hour: 6, minute: 0 }).toMillis();
  const rise = getTimes(new Date(six), latitude, longitude).sunrise?.getTime() ?? Number.NaN;
  return rise > night.from && rise < night.to ? rise : six;
}
