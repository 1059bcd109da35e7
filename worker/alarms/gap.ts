/** When a worker leads again after nobody did: what web raised meanwhile is over, and what nobody saw is recorded. */
import { clearAlarm, raiseAlarm } from '@/db/queries/alarm';
import { listHoldingIds } from '@/db/queries/people';
import type { Base } from '../base';

/** A heart silent for longer than this is one that nobody drove for. */
const SILENT_MS = 15_000;
const KEY = 'control-not-running';

export async function tellOfGap(base: Base, formerHeartbeatAt: number | null): Promise<void> {
  const { clock, db } = base;
  const silentMs = formerHeartbeatAt === null ? 0 : clock.realNow() - formerHeartbeatAt;
  for (const id of await listHoldingIds()) {
    const holding = { id, db };
    if (formerHeartbeatAt !== null && silentMs > SILENT_MS) {
      await raiseAlarm(holding, {
        houseId: null,
        key: KEY,
        kind: 'control-not-running',
        about: {},
        data: { silentS: Math.round(silentMs / 1000) },
        at: clock.appAt(formerHeartbeatAt + SILENT_MS),
      });
    }
    await clearAlarm(holding, KEY, clock.appNow());
  }
}
