/** Of a house's nodes what tells whether one is of the simulated yard, and what can be practised on it. */
import { and, asc, eq } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { channel } from '@/db/schema/channel';
import { node, point } from '@/db/schema/node';
import { inUse } from './reference';

export interface YardNode {
  tokenHashes: string[];
  points: string[];
  channels: { number: number; relay: number }[];
}

export async function yardNodes(holding: Holding, houseId: string): Promise<YardNode[]> {
  const { db } = holding;
  const nodes = await db
    .select()
    .from(node)
    .where(inUse(holding, houseId, node))
    .orderBy(asc(node.key));
  const points = await db
    .select({ key: point.key, nodeId: point.nodeId })
    .from(point)
    .where(inUse(holding, houseId, point))
    .orderBy(asc(point.key));
  const channels = await db
    .select({ number: channel.number, relay: channel.relay, nodeId: channel.nodeId })
    .from(channel)
    .where(and(inUse(holding, houseId, channel), eq(channel.houseId, houseId)))
    .orderBy(asc(channel.number));
  return nodes.map(({ id, tokenHash, formerTokenHash, revokedAt }) => ({
    tokenHashes:
      revokedAt === null ? [tokenHash, ...(formerTokenHash === null ? [] : [formerTokenHash])] : [],
    points: points.filter(({ nodeId }) => nodeId === id).map(({ key }) => key),
    channels: channels.filter(({ nodeId }) => nodeId === id).map(({ number, relay }) => ({ number, relay })),
  }));
}
