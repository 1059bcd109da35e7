/** In which order the nights stand, by the column that the address names. */
import type { NightSummary } from '@/lib/analysis/nights';
import type { DutyAddress, Sort } from './address';

const sortValue: Record<Sort, (night: NightSummary) => number | string | null> = {
  night: (night) => night.night,
  ran: (night) => night.dutyOfNight,
  heat: (night) => night.heat?.kWh ?? null,
  starts: (night) => night.starts,
  lowest: (night) => night.lowest?.value ?? null,
  outdoors: (night) => night.outdoorsLowest?.value ?? null,
};

/** What is not known stays at the foot, whichever way the column runs; equal nights stand in their own order. */
export function sorted(
  nights: readonly NightSummary[],
  { sort, order }: Pick<DutyAddress, 'sort' | 'order'>,
): NightSummary[] {
  const value = sortValue[sort];
  const way = order === 'up' ? 1 : -1;
  return nights.toSorted((a, b) => {
    const [x, y] = [value(a), value(b)];
    if (x === null || y === null) return Number(x === null) - Number(y === null);
    return x === y ? a.night.localeCompare(b.night) : x < y ? -way : way;
  });
}
