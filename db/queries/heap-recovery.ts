/** How a heap came back from its draws, week by week, for what is to be found about it. */
import 'server-only';
import type { Holding } from '@/db/client';
import type { RecoveryHistory } from '@/lib/analysis/slower-recovery';

export async function recoveryOfHeap(
  _holding: Holding,
  _houseId: string,
  _slug: string,
  _nowMs: number,
): Promise<RecoveryHistory | null> {
  return Promise.resolve(null);
}
