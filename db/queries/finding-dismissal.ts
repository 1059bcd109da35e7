import 'server-only';
import { and, desc, eq, isNull } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { findingDismissal } from '@/db/schema/heap';
import { source } from '@/db/schema/channel';
import type { Dismissal, DismissalCreate } from '@/lib/schema/heap-finding';
import { houseNames, isId } from './reference';

/** Those not taken back, newest first. */
export async function listDismissals(
  holding: Holding,
  houseId: string,
  sourceId?: string,
): Promise<Dismissal[]> {
  const rows = await holding.db
    .select({ row: findingDismissal, slug: source.slug })
    .from(findingDismissal)
    .innerJoin(
      source,
      and(eq(source.holdingId, findingDismissal.holdingId), eq(source.id, findingDismissal.sourceId)),
    )
    .where(
      and(
        eq(findingDismissal.holdingId, holding.id),
        eq(source.houseId, houseId),
        isNull(findingDismissal.takenBackAt),
        sourceId === undefined ? undefined : eq(findingDismissal.sourceId, sourceId),
      ),
    )
    .orderBy(desc(findingDismissal.at), desc(findingDismissal.id));
  return rows.map(({ row, slug }) => {
    const { id, kind, mark, level, why, by } = row;
    return { id, source: slug, kind, mark, level, why, by, at: row.at.toISOString() };
  });
}

export async function findDismissal(
  holding: Holding,
  houseId: string,
  id: string,
): Promise<Dismissal | null> {
  return isId(id) ? ((await listDismissals(holding, houseId)).find((one) => one.id === id) ?? null) : null;
}

export async function createDismissal(
  holding: Holding,
  houseId: string,
  given: z.infer<typeof DismissalCreate>,
  act: { by: string; now: Date },
): Promise<Dismissal> {
  const heap = (await houseNames(holding, houseId)).sources.find(given.source, 'source');
  const { kind, mark, level, why } = given;
  const id = uuid();
  await holding.db.insert(findingDismissal).values({
    ...{ holdingId: holding.id, id, sourceId: heap.id, kind, mark, level, why, by: act.by, at: act.now },
  });
  return { id, source: heap.key, kind, mark, level, why, by: act.by, at: act.now.toISOString() };
}

export async function takeBackDismissal(holding: Holding, id: string, now: Date): Promise<void> {
  await holding.db
    .update(findingDismissal)
    .set({ takenBackAt: now })
    .where(and(eq(findingDismissal.holdingId, holding.id), eq(findingDismissal.id, id)));
}
