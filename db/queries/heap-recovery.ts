/** How a heap came back from its draws, week by week, for what is to be found about it. */
import 'server-only';
import type { Holding } from '@/db/client';
import { recoveryTrend, recoveryWeeks } from '@/lib/analysis/recovery-weeks';
import type { RecoveryHistory } from '@/lib/analysis/slower-recovery';
import { listNights } from './night';

/** A season: what was longer ago says nothing of the heap as it is. */
const MOST_NIGHTS = 112;

/** @param since when the heap was built, epoch ms: an older heap in its place came back otherwise */
export async function recoveryOfHeap(
  holding: Holding,
  houseId: string,
  heap: { slug: string; since: number | null },
  nowMs: number,
): Promise<RecoveryHistory> {
  const nights = await listNights(holding, houseId, { sources: [heap.slug], limit: MOST_NIGHTS }, nowMs);
  const since = heap.since ?? 0;
  const weeks = recoveryWeeks(nights.filter((night) => night.from >= since).reverse());
  const { ratioPerWeek } = recoveryTrend(weeks);
  return {
    weeks: weeks.flatMap(({ from, to, recovery }) =>
      recovery === null ? [] : [{ at: (from + to) / 2, tauS: recovery.tau.value, tauSdS: recovery.tau.sd }],
    ),
    ratioPerWeek:
      ratioPerWeek === null || ratioPerWeek.low === null || ratioPerWeek.high === null
        ? null
        : { value: ratioPerWeek.value, low: ratioPerWeek.low, high: ratioPerWeek.high },
  };
}
