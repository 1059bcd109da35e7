/** What is stored of a node and its relays that bears on a proof. */
import 'server-only';
import { and, asc, eq, gte, isNotNull, isNull, lt, notLike } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { node } from '@/db/schema/node';
import { switching } from '@/db/schema/running';

export interface LeaseTrip {
  at: number;
  /** Null in what was stored before this was told. */
  lease: { renewedAt: number | null; toldAt: number } | null;
}

/** The first time that a lease dropped this channel's coil, from `from` to before `to`, epoch ms. */
export async function leaseTrip(
  holding: Holding,
  channelId: string,
  from: number,
  to: number,
): Promise<LeaseTrip | null> {
  const [row] = await holding.db
    .select({ at: switching.at, explanation: switching.explanation })
    .from(switching)
    .where(
      and(
        eq(switching.holdingId, holding.id),
        eq(switching.channelId, channelId),
        isNull(switching.number),
        isNotNull(switching.trip),
        notLike(switching.trip, 'fallback/%'),
        gte(switching.at, new Date(from)),
        lt(switching.at, new Date(to)),
      ),
    )
    .orderBy(asc(switching.at), asc(switching.id))
    .limit(1);
  if (row === undefined) return null;
  const said = row.explanation.ladder[0]?.because?.['lease'];
  return { at: row.at.getTime(), lease: leaseOf(said) };
}

function leaseOf(said: unknown): LeaseTrip['lease'] {
  if (typeof said !== 'object' || said === null || !('toldAt' in said) || !('renewedAt' in said)) return null;
  const { renewedAt, toldAt } = said;
  if (typeof toldAt !== 'number') return null;
  return { toldAt, renewedAt: typeof renewedAt === 'number' ? renewedAt : null };
}

async function statusOf(holding: Holding, houseId: string, key: string): Promise<Record<string, unknown>> {
  const [row] = await holding.db
    .select({ status: node.status })
    .from(node)
    .where(
      and(
        eq(node.holdingId, holding.id),
        eq(node.houseId, houseId),
        eq(node.key, key),
        isNull(node.removedAt),
      ),
    );
  return row?.status ?? {};
}

/** The id of a node's present start, as the link last knew it. */
export async function nodeBoot(holding: Holding, houseId: string, key: string): Promise<string | null> {
  const { boot } = await statusOf(holding, houseId, key);
  return typeof boot === 'string' || typeof boot === 'number' ? String(boot) : null;
}

/** Whether a node can run fallbacks; null where it has not said yet. */
export async function nodeCanFallback(
  holding: Holding,
  houseId: string,
  key: string,
): Promise<boolean | null> {
  const { can } = await statusOf(holding, houseId, key);
  return Array.isArray(can) ? can.includes('fallback') : null;
}
