/** A night of the year in words. */
import { decimal, share, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { nightLabel } from '@/lib/units/time';
import type { YearDay } from './year-layout';

/** @example "26 Nov: ran 31 %, 5.2 kWh, lowest 2.6 °C, under the frost limit" */
export function dayWords(day: YearDay, preferences: Preferences): string {
  return [
    `${nightLabel(day.night)}: ran ${share(day.ran)}`,
    ...(day.kWh === undefined ? [] : [`${decimal(day.kWh, 1)}\u00a0kWh`]),
    ...(day.lowest === undefined ? [] : [`lowest ${temperature(day.lowest, preferences)}`]),
    ...(day.isCold === true ? ['under the frost limit'] : []),
    ...(day.isThin === true ? ['under 90\u00a0% of it was read'] : []),
  ].join(', ');
}
