import 'server-only';
import type { Db } from '@/db/client';
import { appTime, readClockAnchor } from '@/db/queries/clock';
import { gapsBetween, type ControlGap } from '@/db/queries/control-gap';
import { readLeader } from '@/db/queries/leader';

/** Three heartbeats missed; a change of leaders takes no longer. */
const SILENT_MS = 15_000;

/** Hours between two instants (app time) in which control did not run, the one that may be going on included. */
export async function controlGaps(db: Db, from: number, to: number, realNow: number): Promise<ControlGap[]> {
  const over = await gapsBetween(db, from, to);
  const leader = await readLeader(db);
  if (leader === null || realNow - leader.heartbeat <= SILENT_MS) return over;
  const anchor = await readClockAnchor(db);
  const since = anchor === null ? leader.heartbeat : appTime(anchor, leader.heartbeat);
  return since <= to ? [...over, { from: since, to: null }] : over;
}
