import 'server-only';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { channel, loop, source } from '@/db/schema/channel';
import type { SourceCreate } from '@/lib/schema/source';
import { Source } from '@/lib/schema/yard-view';
import { touchPlan } from './plan';
import { houseNames, inUse, isId, type HouseNames } from './reference';
import { Refusal } from './refusal';
import { freeSlug } from './slug';

type Given = z.infer<typeof SourceCreate>;
type Row = typeof source.$inferSelect;

function toSource(row: Row, names: HouseNames): Source {
  const { id, revision, slug, name, kind, coreFloor, dailyLimitS, readyLevel, readyForS } = row;
  return Source.parse({
    ...{ id, revision, slug, name, kind, coreFloor },
    corePoint: names.points.key(row.corePointId),
    basePoint: names.points.key(row.basePointId),
    dailyLimit: dailyLimitS,
    ready: readyLevel === null || readyForS === null ? null : { level: readyLevel, for: readyForS },
  });
}

export async function listSources(holding: Holding, houseId: string): Promise<Source[]> {
  const rows = await holding.db
    .select()
    .from(source)
    .where(inUse(holding, houseId, source))
    .orderBy(asc(source.id));
  const names = await houseNames(holding, houseId);
  return rows.map((row) => toSource(row, names));
}

/** By id or slug. */
export async function findSource(holding: Holding, houseId: string, ref: string): Promise<Source | null> {
  return (
    (await listSources(holding, houseId)).find((row) => (isId(ref) ? row.id === ref : row.slug === ref)) ??
    null
  );
}

/** @throws Refusal at the path of a point that this house does not have */
async function columns(holding: Holding, houseId: string, given: Given) {
  const { points } = await houseNames(holding, houseId);
  return {
    name: given.name,
    kind: given.kind,
    corePointId: points.id(given.corePoint, 'corePoint'),
    basePointId: points.id(given.basePoint, 'basePoint'),
    coreFloor: given.coreFloor,
    dailyLimitS: given.dailyLimit,
    readyLevel: given.ready?.level ?? null,
    readyForS: given.ready?.for ?? null,
  };
}

export async function createSource(holding: Holding, houseId: string, given: Given): Promise<Source> {
  const taken = await holding.db
    .select({ slug: source.slug })
    .from(source)
    .where(and(eq(source.holdingId, holding.id), isNull(source.removedAt)));
  const id = uuid();
  await holding.db.insert(source).values({
    ...(await columns(holding, houseId, given)),
    ...{ id, houseId, holdingId: holding.id },
    slug: freeSlug(given.name, new Set(taken.map((row) => row.slug))),
  });
  await touchPlan(holding, houseId);
  return found(holding, houseId, id);
}

export async function amendSource(
  holding: Holding,
  houseId: string,
  id: string,
  given: Given,
): Promise<Source> {
  await holding.db
    .update(source)
    .set({ ...(await columns(holding, houseId, given)), revision: sql`${source.revision} + 1` })
    .where(and(eq(source.holdingId, holding.id), eq(source.id, id)));
  await touchPlan(holding, houseId);
  return found(holding, houseId, id);
}

export async function removeSource(holding: Holding, houseId: string, id: string, now: Date): Promise<void> {
  const channels = await holding.db
    .select({ name: channel.label })
    .from(channel)
    .where(and(inUse(holding, houseId, channel), eq(channel.sourceId, id)));
  const loops = await holding.db
    .select({ name: loop.name })
    .from(loop)
    .where(and(inUse(holding, houseId, loop), eq(loop.sourceId, id)));
  const uses = [...channels, ...loops].map((row) => row.name);
  if (uses.length > 0) throw new Refusal(null, `Still drawn on by ${uses.join(', ')}. Change those first.`);
  await holding.db
    .update(source)
    .set({ removedAt: now, revision: sql`${source.revision} + 1` })
    .where(and(eq(source.holdingId, holding.id), eq(source.id, id)));
  await touchPlan(holding, houseId);
}

async function found(holding: Holding, houseId: string, id: string): Promise<Source> {
  const row = await findSource(holding, houseId, id);
  if (row === null) throw new Error('the source was there a moment ago');
  return row;
}
