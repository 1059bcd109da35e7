/** What field nodes did by themselves while nobody commanded them: from their logs, and from what is stored of their relays. */
import { and, asc, desc, eq, gte, inArray, isNotNull, like, lt, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { nodeLog } from '@/db/schema/node-log';
import { switching } from '@/db/schema/running';

/** A time in which a node kept its house by itself. Epoch ms; `to` is null while it is not told to be over. */
export interface AloneSpan {
  nodeId: string;
  from: number;
  to: number | null;
}

export interface AloneSwitching {
  channelId: string;
  at: number;
  state: 'on' | 'off';
}

/** A node is not away for longer, or its house would be cold: what began before is not looked for. */
const BACK_MS = 7 * 86_400_000;

/** Times that touch `from` to `to`, ascending, by what nodes logged. */
export async function listAlone(
  holding: Holding,
  houseId: string,
  from: number,
  to: number,
): Promise<AloneSpan[]> {
  const rows = await holding.db
    .select({ nodeId: nodeLog.nodeId, at: nodeLog.at, fallback: nodeLog.fallback })
    .from(nodeLog)
    .where(
      and(
        eq(nodeLog.holdingId, holding.id),
        eq(nodeLog.houseId, houseId),
        isNotNull(nodeLog.fallback),
        gte(nodeLog.at, new Date(from - BACK_MS)),
        lt(nodeLog.at, new Date(to)),
      ),
    )
    .orderBy(asc(nodeLog.at), asc(nodeLog.id));
  const spans: AloneSpan[] = [];
  for (const { nodeId, at, fallback } of rows) {
    const open = spans.findLast((span) => span.nodeId === nodeId && span.to === null);
    if (fallback?.what === 'begun') {
      // it was down in between and knows no end of the former one
      if (open !== undefined) open.to = at.getTime();
      spans.push({ nodeId, from: at.getTime(), to: null });
    }
    if (fallback?.what === 'ended' && open !== undefined) open.to = at.getTime();
  }
  return spans.filter((span) => span.to === null || span.to > from);
}

/** Switchings that nodes made by their fallbacks, from `from` to before `to`, ascending. */
export async function listAloneSwitchings(
  holding: Holding,
  houseId: string,
  from: number,
  to: number,
): Promise<AloneSwitching[]> {
  const rows = await holding.db
    .select({ channelId: switching.channelId, at: switching.at, state: switching.to })
    .from(switching)
    .where(
      and(
        eq(switching.holdingId, holding.id),
        eq(switching.houseId, houseId),
        like(switching.trip, 'fallback/%'),
        gte(switching.at, new Date(from)),
        lt(switching.at, new Date(to)),
      ),
    )
    .orderBy(asc(switching.at), asc(switching.id));
  return rows.map((row) => ({ ...row, at: row.at.getTime() }));
}

/** When each of these channels was last put on by its node's fallback, epoch ms; those that never were are absent. */
export async function lastAlone(
  holding: Holding,
  channelIds: readonly string[],
): Promise<Map<string, number>> {
  if (channelIds.length === 0) return new Map();
  const rows = await holding.db
    .selectDistinctOn([switching.channelId], { channelId: switching.channelId, at: switching.at })
    .from(switching)
    .where(
      and(
        eq(switching.holdingId, holding.id),
        inArray(switching.channelId, [...channelIds]),
        like(switching.trip, 'fallback/%/on'),
      ),
    )
    .orderBy(switching.channelId, desc(switching.at));
  return new Map(rows.map((row) => [row.channelId, row.at.getTime()]));
}

/** Takes away what nodes said before an instant: it is kept for finding faults, not for ever. @returns how many */
export async function forgetNodeLogs(db: Holding['db'], before: Date): Promise<number> {
  const { rows } = await db.execute(sql`
    with gone as (delete from node_log where heard_at < ${before} returning 1) select count(*)::int as count from gone`);
  return Number(rows[0]?.['count'] ?? 0);
}
