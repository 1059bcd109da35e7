import 'server-only';
import type { Holding } from '@/db/client';
import { listLockouts } from '@/db/queries/lockout';
import type { LadderStep } from '@/lib/control/events';
import { CLAIMS, type Data, type State } from '@/lib/control/types';

/** The ladder as far as it went; of the claims above the one that decided it is only known that they kept still. */
export function downTo(claim: string, wants: State): LadderStep[] {
  const place = CLAIMS.findIndex((one) => one === claim);
  return CLAIMS.slice(0, place + 1).map((one, at) =>
    at === place
      ? { claim: one, speaks: true, wants: one === 'short-cycle' ? 'hold' : wants }
      : { claim: one, speaks: false },
  );
}

/** Lock-outs that were removed since say by whom, and when. */
export async function withRemovals(
  holding: Holding,
  houseId: string,
  ladder: LadderStep[],
): Promise<LadderStep[]> {
  const lock = ladder.find((step) => step.claim === 'lock-out' && step.speaks);
  const placed = lock?.because?.['lockouts'];
  if (lock === undefined || !Array.isArray(placed)) return ladder;
  const known = new Map((await listLockouts(holding, houseId)).map((one) => [one.id, one]));
  const lockouts = placed.map((one) => {
    if (typeof one !== 'object' || one === null || Array.isArray(one)) return one;
    const id = typeof one['id'] === 'string' ? one['id'] : '';
    const { removedAt = null, removedBy = null } = known.get(id) ?? {};
    return removedAt === null ? one : { ...one, removedAt: Date.parse(removedAt), removedBy };
  });
  const because: Data = { ...lock.because, lockouts };
  return ladder.map((step) => (step === lock ? { ...step, because } : step));
}
