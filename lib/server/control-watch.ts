import 'server-only';
import { everyHolding } from '@/db/client';
import { clearAlarm, raiseAlarm } from '@/db/queries/alarm';
import { readLeader } from '@/db/queries/leader';
import { listHoldingIds } from '@/db/queries/people';
import { appNow } from './app-clock';
import { log } from './log';

const LOOK_EVERY_MS = 5000;
/** Three heartbeats missed: a lease has run out, and another worker would have led by now. */
const SILENT_MS = 15_000;
const KEY = 'control-not-running';

/**
 * Raises `control-not-running` in every holding when no worker's heart beats, since a worker cannot tell of its own
 * death, and clears it once one beats again. Level, not edge: a look that was missed is made good by the next.
 * @returns whether control runs, as far as can be told
 */
export async function lookAtControl(startedAt: number, now: number): Promise<boolean> {
  const db = everyHolding();
  const leader = await readLeader(db);
  // A worker needs a moment to lead after both were started, and a heart that stopped last night is no news then.
  const since = Math.max(leader?.heartbeat ?? startedAt, startedAt);
  const at = (await appNow()).getTime();
  const holdings = await listHoldingIds();
  if (now - since <= SILENT_MS) {
    const beats = leader !== null && now - leader.heartbeat <= SILENT_MS;
    if (beats) for (const id of holdings) await clearAlarm({ id, db }, KEY, at);
    return true;
  }
  for (const id of holdings) {
    const silentS = Math.round((now - (leader?.heartbeat ?? startedAt)) / 1000);
    await raiseAlarm(
      { id, db },
      {
        houseId: null,
        key: KEY,
        kind: 'control-not-running',
        about: {},
        data: { silentS },
        at,
      },
    );
  }
  return false;
}

const kept = globalThis as { middenwardWatch?: NodeJS.Timeout };

/** Looks every few seconds for as long as the web process lives; a database that is away ends neither. */
export function watchControl(): void {
  if (kept.middenwardWatch !== undefined) return;
  const startedAt = Date.now();
  let isLooking = false;
  const look = async () => {
    if (isLooking) return;
    isLooking = true;
    try {
      await lookAtControl(startedAt, Date.now());
    } catch (error) {
      log().warn({ err: error }, 'whether control runs could not be looked up');
    } finally {
      isLooking = false;
    }
  };
  kept.middenwardWatch = setInterval(() => void look(), LOOK_EVERY_MS);
  kept.middenwardWatch.unref();
}
