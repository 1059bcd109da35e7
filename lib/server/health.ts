import 'server-only';
import { everyHolding } from '@/db/client';
import { readLeader } from '@/db/queries/leader';
import type { Health } from '@/lib/schema/running';
import { appClock } from './app-clock';

/** A heart that beats every 2 s; five missed beats are a stopped one. Watch must say so within 15 s. */
const HEART_STOPPED_MS = 10_000;

/** Whether each part is up. The worker and its field port are known by the heartbeat that it keeps in the database. */
export async function health(): Promise<Health> {
  const web = { up: true, says: 'up' };
  try {
    const { now, rate } = await appClock();
    const leader = await readLeader(everyHolding());
    const age = leader === null ? null : Date.now() - leader.heartbeat;
    const beats = age !== null && age < HEART_STOPPED_MS && leader?.holder !== null;
    const says =
      age === null ? 'no worker has led yet' : beats ? 'up' : `no heartbeat for ${Math.round(age / 1000)} s`;
    return {
      now: now.toISOString(),
      rate,
      web,
      database: { up: true, says: 'up' },
      worker: { up: beats, says },
      field: { up: beats, says: beats ? 'up' : 'the worker does not answer nodes' },
      spool: leader?.spool ?? 0,
      lastStep: typeof leader?.lastStep === 'number' ? new Date(leader.lastStep).toISOString() : null,
    };
  } catch {
    const away = { up: false, says: 'not known while the database does not answer' };
    return {
      now: new Date().toISOString(),
      rate: 1,
      web,
      database: { up: false, says: 'the database does not answer' },
      worker: away,
      field: away,
      spool: 0,
      lastStep: null,
    };
  }
}
