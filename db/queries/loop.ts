import 'server-only';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { loop } from '@/db/schema/channel';
import type { LoopCreate } from '@/lib/schema/source';
import type { Loop } from '@/lib/schema/yard-view';
import { touchPlan } from './plan';
import { houseNames, inUse, isId } from './reference';
import { freeSlug } from './slug';

type Given = z.infer<typeof LoopCreate>;

export async function listLoops(holding: Holding, houseId: string): Promise<Loop[]> {
  const rows = await holding.db
    .select()
    .from(loop)
    .where(inUse(holding, houseId, loop))
    .orderBy(asc(loop.id));
  const names = await houseNames(holding, houseId);
  return rows.map((row) => ({
    id: row.id,
    revision: row.revision,
    slug: row.slug,
    name: row.name,
    source: names.sources.key(row.sourceId) ?? '',
    channel: names.channels.key(row.channelId) ?? '',
    intake: names.points.key(row.intakePointId) ?? '',
    return: names.points.key(row.returnPointId) ?? '',
  }));
}

/** By id or slug. */
export async function findLoop(holding: Holding, houseId: string, ref: string): Promise<Loop | null> {
  return (
    (await listLoops(holding, houseId)).find((row) => (isId(ref) ? row.id === ref : row.slug === ref)) ?? null
  );
}

/** @throws Refusal at the path of a name that this house does not have */
async function columns(holding: Holding, houseId: string, given: Given) {
  const names = await houseNames(holding, houseId);
  return {
    name: given.name,
    sourceId: names.sources.find(given.source, 'source').id,
    channelId: names.channels.find(given.channel, 'channel').id,
    intakePointId: names.points.find(given.intake, 'intake').id,
    returnPointId: names.points.find(given.return, 'return').id,
  };
}

export async function createLoop(holding: Holding, houseId: string, given: Given): Promise<Loop> {
  const taken = await holding.db
    .select({ slug: loop.slug })
    .from(loop)
    .where(and(eq(loop.holdingId, holding.id), isNull(loop.removedAt)));
  const id = uuid();
  await holding.db.insert(loop).values({
    ...(await columns(holding, houseId, given)),
    ...{ id, houseId, holdingId: holding.id },
    slug: freeSlug(given.name, new Set(taken.map((row) => row.slug))),
  });
  await touchPlan(holding, houseId);
  return found(holding, houseId, id);
}

export async function amendLoop(holding: Holding, houseId: string, id: string, given: Given): Promise<Loop> {
  await holding.db
    .update(loop)
    .set({ ...(await columns(holding, houseId, given)), revision: sql`${loop.revision} + 1` })
    .where(and(eq(loop.holdingId, holding.id), eq(loop.id, id)));
  await touchPlan(holding, houseId);
  return found(holding, houseId, id);
}

export async function removeLoop(holding: Holding, houseId: string, id: string, now: Date): Promise<void> {
  await holding.db
    .update(loop)
    .set({ removedAt: now, revision: sql`${loop.revision} + 1` })
    .where(and(eq(loop.holdingId, holding.id), eq(loop.id, id)));
  await touchPlan(holding, houseId);
}

async function found(holding: Holding, houseId: string, id: string): Promise<Loop> {
  const row = await findLoop(holding, houseId, id);
  if (row === null) throw new Error('the loop was there a moment ago');
  return row;
}
