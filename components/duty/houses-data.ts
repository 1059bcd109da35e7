import type { CoreTrend } from '@/lib/analysis/core';
import type { HouseNight, NightSummary } from '@/lib/analysis/nights';
import type { NightTotals } from '@/lib/analysis/totals';
import type { WatchCard } from '@/lib/schema/watch-view';

export interface SourceOfHouse {
  slug: string;
  name: string;
  week: NightTotals | null;
  /** The first and the last night of the seven, by name; null where none is kept. */
  nights: { from: string; to: string } | null;
  missing: NightSummary['missing']['heat'];
  core: { trend: CoreTrend | null; last: { value: number; at: number } } | null;
}

export interface HouseWeek extends WatchCard {
  lastNight: Pick<HouseNight, 'night' | 'lowest' | 'coverageLow' | 'coverage'> | null;
  sources: SourceOfHouse[];
}
