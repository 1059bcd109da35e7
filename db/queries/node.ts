import 'server-only';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import type { PgUpdateSetSource } from 'drizzle-orm/pg-core';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { channel } from '@/db/schema/channel';
import { node, point } from '@/db/schema/node';
import type { NodeCreate } from '@/lib/schema/node';
import { FieldNode } from '@/lib/schema/yard-view';
import { keptBus, refuseLosingWatchdog, toldBus } from './node-bus';
import { touchPlan } from './plan';
import { inUse, isId } from './reference';
import { Refusal } from './refusal';

type Given = z.infer<typeof NodeCreate>;

function toNode(row: typeof node.$inferSelect): FieldNode {
  const iso = (at: Date | null) => at?.toISOString() ?? null;
  return FieldNode.parse({
    id: row.id,
    revision: row.revision,
    key: row.key,
    kind: row.kind,
    reportEvery: row.reportEveryS,
    channels: row.channels,
    ...toldBus(row),
    lastHeardAt: iso(row.lastHeardAt),
    revokedAt: iso(row.revokedAt),
    formerTokenUntil: iso(row.formerTokenUntil),
  });
}

export async function listNodes(holding: Holding, houseId: string): Promise<FieldNode[]> {
  const rows = await holding.db
    .select()
    .from(node)
    .where(inUse(holding, houseId, node))
    .orderBy(asc(node.key));
  return rows.map(toNode);
}

/** By id or key. */
export async function findNode(holding: Holding, houseId: string, ref: string): Promise<FieldNode | null> {
  const rows = await holding.db
    .select()
    .from(node)
    .where(and(inUse(holding, houseId, node), isId(ref) ? eq(node.id, ref) : eq(node.key, ref)));
  return rows[0] === undefined ? null : toNode(rows[0]);
}

export async function createNode(
  holding: Holding,
  houseId: string,
  given: Given,
  tokenHash: string,
  seal: (password: string) => string,
): Promise<FieldNode> {
  const { key, kind, channels, reportEvery } = given;
  const rows = await holding.db
    .insert(node)
    .values({
      ...{ key, kind, channels, houseId, tokenHash },
      ...keptBus(given, null, seal),
      reportEveryS: reportEvery,
      id: uuid(),
      holdingId: holding.id,
    })
    .returning();
  await touchPlan(holding, houseId);
  return one(rows);
}

export async function amendNode(
  holding: Holding,
  houseId: string,
  id: string,
  given: Given,
  seal: (password: string) => string,
): Promise<FieldNode> {
  const used = await holding.db
    .select({ most: sql<number>`coalesce(max(${channel.relay}), 0)`.mapWith(Number) })
    .from(channel)
    .where(and(inUse(holding, houseId, channel), eq(channel.nodeId, id)));
  const most = used[0]?.most ?? 0;
  if (given.channels < most) throw new Refusal('channels', `Relay ${most} is in use; at least ${most}.`);
  await refuseLosingWatchdog(holding, id, given.kind, given.modbus);
  const [before] = await holding.db
    .select()
    .from(node)
    .where(and(eq(node.holdingId, holding.id), eq(node.id, id)));
  return change(holding, houseId, id, {
    ...keptBus(given, before ?? null, seal),
    key: given.key,
    channels: given.channels,
    reportEveryS: given.reportEvery,
  });
}

/** The token before stays good for a day, so that a node far away can be given the new one without falling silent. */
export async function rotateToken(
  holding: Holding,
  houseId: string,
  id: string,
  tokenHash: string,
): Promise<FieldNode> {
  return change(holding, houseId, id, {
    formerTokenHash: sql`${node.tokenHash}`,
    formerTokenUntil: sql`now() + interval '24 hours'`,
    tokenHash,
    revokedAt: null,
  });
}

/** Both tokens end at once: for a node that was lost or copied. */
export async function revokeTokens(holding: Holding, houseId: string, id: string): Promise<FieldNode> {
  return change(holding, houseId, id, {
    revokedAt: sql`now()`,
    formerTokenHash: null,
    formerTokenUntil: null,
  });
}

export async function removeNode(holding: Holding, houseId: string, id: string, now: Date): Promise<void> {
  const points = await holding.db
    .select({ key: point.key })
    .from(point)
    .where(and(inUse(holding, houseId, point), eq(point.nodeId, id)));
  const channels = await holding.db
    .select({ key: channel.key })
    .from(channel)
    .where(and(inUse(holding, houseId, channel), eq(channel.nodeId, id)));
  const on = [...points, ...channels].map((row) => row.key);
  if (on.length > 0)
    throw new Refusal(null, `Still on this node: ${on.join(', ')}. Move or remove them first.`);
  await change(holding, houseId, id, { removedAt: now, revokedAt: sql`now()` });
}

type Change = PgUpdateSetSource<typeof node>;

async function change(holding: Holding, houseId: string, id: string, set: Change): Promise<FieldNode> {
  const rows = await holding.db
    .update(node)
    .set({ ...set, revision: sql`${node.revision} + 1` })
    .where(and(eq(node.holdingId, holding.id), eq(node.id, id), isNull(node.removedAt)))
    .returning();
  await touchPlan(holding, houseId);
  return one(rows);
}

function one(rows: (typeof node.$inferSelect)[]): FieldNode {
  const row = rows[0];
  if (row === undefined) throw new Error('the node was there a moment ago');
  return toNode(row);
}
