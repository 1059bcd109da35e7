/** When a worker leads after nobody did, it is kept that nothing was decided meanwhile: whoever asks why is told so. */
import { noteGap } from '@/db/queries/control-gap';
import type { Base } from '../base';

/** Less is a change of leaders: the loads' leases lasted through it. */
const LEAST_MS = 15_000;

/** @param formerHeartbeatAt real time, epoch ms; null: nobody ever led */
export async function keepGap(base: Base, formerHeartbeatAt: number | null): Promise<void> {
  const { clock, db } = base;
  if (formerHeartbeatAt === null || clock.realNow() - formerHeartbeatAt <= LEAST_MS) return;
  await noteGap(db, { from: clock.appAt(formerHeartbeatAt), to: clock.appNow() });
}
