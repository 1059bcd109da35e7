import 'server-only';
import { and, desc, eq, inArray, lt, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { importBatch } from '@/db/schema/study';
import { Import, type ImportLayout, type ImportState } from '@/lib/schema/import';
import { isId } from './reference';

type Row = typeof importBatch.$inferSelect;

function toImport(row: Row): Import {
  const { id, name, bytes, received, state, layout, found, brought, duplicates, faults, problem, by } = row;
  return Import.parse({
    ...{ id, name, bytes, received, state, layout, found, brought, duplicates, faults, problem, by },
    progress: bytes === 0 ? 0 : Math.min(1, row.doneBytes / bytes),
    createdAt: row.createdAt.toISOString(),
    endedAt: row.endedAt?.toISOString() ?? null,
  });
}

const own = (holding: Holding, id: string) =>
  and(eq(importBatch.holdingId, holding.id), eq(importBatch.id, id));

/** The newest first; a yard brings in a few a season. */
export async function listImports(holding: Holding, houseId: string): Promise<Import[]> {
  const rows = await holding.db
    .select()
    .from(importBatch)
    .where(and(eq(importBatch.holdingId, holding.id), eq(importBatch.houseId, houseId)))
    .orderBy(desc(importBatch.createdAt), desc(importBatch.id))
    .limit(100);
  return rows.map(toImport);
}

export async function findImport(holding: Holding, houseId: string, id: string): Promise<Import | null> {
  if (!isId(id)) return null;
  const [row] = await holding.db
    .select()
    .from(importBatch)
    .where(and(own(holding, id), eq(importBatch.houseId, houseId)));
  return row === undefined ? null : toImport(row);
}

export async function createImport(
  holding: Holding,
  houseId: string,
  given: { name: string; bytes: number; by: string; now: Date },
): Promise<Import> {
  const { name, bytes, by, now } = given;
  const [row] = await holding.db
    .insert(importBatch)
    .values({
      ...{ holdingId: holding.id, id: uuid(), houseId, name, bytes, by },
      ...{ state: 'receiving', createdAt: now },
    })
    .returning();
  if (row === undefined) throw new Error('the new import was not answered');
  return toImport(row);
}

/** Files that were begun and left lying, by id: before `before`, of any house. They are forgotten. */
export async function forgetUnfinished(holding: Holding, before: Date): Promise<string[]> {
  const rows = await holding.db
    .delete(importBatch)
    .where(
      and(
        eq(importBatch.holdingId, holding.id),
        inArray(importBatch.state, ['receiving', 'received', 'checked']),
        lt(importBatch.createdAt, before),
      ),
    )
    .returning({ id: importBatch.id });
  return rows.map((row) => row.id);
}

export async function countUnfinished(holding: Holding): Promise<number> {
  return holding.db.$count(
    importBatch,
    and(
      eq(importBatch.holdingId, holding.id),
      inArray(importBatch.state, ['receiving', 'received', 'to-check', 'checked', 'to-bring']),
    ),
  );
}

export async function noteReceived(holding: Holding, id: string, received: number): Promise<void> {
  await holding.db
    .update(importBatch)
    .set({
      received,
      state: sql`case when ${received} >= ${importBatch.bytes} then 'received' else 'receiving' end`,
    })
    .where(own(holding, id));
}

/**
 * Hands the import on to the worker, which looks for such by their state.
 * @returns false where its state was none of `from`: somebody else was quicker
 */
export async function moveImport(
  holding: Holding,
  id: string,
  from: readonly ImportState[],
  to: ImportState,
  layout?: ImportLayout,
): Promise<boolean> {
  const rows = await holding.db
    .update(importBatch)
    .set({
      ...{ state: to, doneBytes: 0, problem: null },
      ...(layout === undefined ? {} : { layout, found: null }),
    })
    .where(and(own(holding, id), inArray(importBatch.state, [...from])))
    .returning({ id: importBatch.id });
  return rows.length > 0;
}

export async function removeImport(holding: Holding, id: string): Promise<void> {
  await holding.db.delete(importBatch).where(own(holding, id));
}
