import 'server-only';
import { and, desc, eq, lt, or, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { heapEntry } from '@/db/schema/heap';
import { source } from '@/db/schema/channel';
import type { HeapEntryCreate } from '@/lib/schema/heap';
import { HeapEntry, type Photograph } from '@/lib/schema/heap-view';
import { photographsOf } from './attachment';
import { doneAt, heapId } from './heap-record-of';
import { cut, type Listed, type Page } from './page';
import { isId } from './reference';
import { Refusal } from './refusal';

type Given = z.infer<typeof HeapEntryCreate>;
type Row = { entry: typeof heapEntry.$inferSelect; slug: string };

function toEntry({ entry, slug }: Row, photographs: Photograph[]): HeapEntry {
  const { id, revision, kind, text, materials, litresOfWater, smell, squeeze, by, amendedBy } = entry;
  return HeapEntry.parse({
    ...{ id, revision, kind, text, materials, litresOfWater, smell, squeeze, photographs, by, amendedBy },
    source: slug,
    at: entry.at.toISOString(),
    volume: entry.volumeM3,
    enteredAt: entry.enteredAt.toISOString(),
    amendedAt: entry.amendedAt?.toISOString() ?? null,
  });
}

async function select(
  holding: Holding,
  houseId: string,
  only: ReturnType<typeof eq> | undefined,
  limit: number,
): Promise<Row[]> {
  return holding.db
    .select({ entry: heapEntry, slug: source.slug })
    .from(heapEntry)
    .innerJoin(source, and(eq(source.holdingId, heapEntry.holdingId), eq(source.id, heapEntry.sourceId)))
    .where(and(eq(heapEntry.holdingId, holding.id), eq(source.houseId, houseId), only))
    .orderBy(desc(heapEntry.at), desc(heapEntry.id))
    .limit(limit);
}

/** Newest first; of one heap where its slug or id is given. */
export async function listHeapEntries(
  holding: Holding,
  houseId: string,
  page: Page & { source?: string | undefined },
): Promise<Listed<HeapEntry>> {
  const { cursor } = page;
  const at = cursor?.at === undefined ? null : new Date(cursor.at);
  const behind =
    cursor === undefined || at === null
      ? undefined
      : or(lt(heapEntry.at, at), and(eq(heapEntry.at, at), lt(heapEntry.id, cursor.id)));
  const heap = page.source;
  const ofHeap = heap === undefined ? undefined : isId(heap) ? eq(source.id, heap) : eq(source.slug, heap);
  const rows = await select(holding, houseId, and(behind, ofHeap), page.limit + 1);
  const listed = cut(rows, page.limit, ({ entry }) => ({ id: entry.id, at: entry.at.getTime() }));
  const photographs = await photographsOf(
    holding,
    listed.items.map(({ entry }) => entry.id),
  );
  return {
    items: listed.items.map((row) => toEntry(row, photographs.get(row.entry.id) ?? [])),
    next: listed.next,
  };
}

export async function findHeapEntry(
  holding: Holding,
  houseId: string,
  id: string,
): Promise<HeapEntry | null> {
  if (!isId(id)) return null;
  const row = (await select(holding, houseId, eq(heapEntry.id, id), 1))[0];
  if (row === undefined) return null;
  return toEntry(row, (await photographsOf(holding, [row.entry.id])).get(row.entry.id) ?? []);
}

function columns(given: Omit<Given, 'source' | 'id'>) {
  return {
    kind: given.kind,
    text: given.text,
    materials: given.materials.map(({ material, kilograms, litres }) => ({
      material,
      ...(kilograms === undefined ? {} : { kilograms }),
      ...(litres === undefined ? {} : { litres }),
    })),
    litresOfWater: given.litresOfWater ?? null,
    volumeM3: given.volume ?? null,
    smell: given.smell ?? null,
    squeeze: given.squeeze ?? null,
  };
}

interface Act {
  by: string;
  now: Date;
}

/**
 * Writes an entry; one that its sender gave an id is written once, however often it is sent.
 * @returns the entry, and whether it was there before
 * @throws Refusal where the id is that of an entry of another house
 */
export async function createHeapEntry(
  holding: Holding,
  houseId: string,
  given: Given,
  act: Act,
): Promise<{ entry: HeapEntry; isRepeat: boolean }> {
  const sourceId = await heapId(holding, houseId, given.source);
  const id = given.id ?? uuid();
  const written = await holding.db
    .insert(heapEntry)
    .values({
      ...columns(given),
      ...{ id, sourceId, holdingId: holding.id, by: act.by, enteredAt: act.now },
      at: doneAt(given.at, act.now),
    })
    .onConflictDoNothing()
    .returning({ id: heapEntry.id });
  const entry = await findHeapEntry(holding, houseId, id);
  if (entry === null) throw new Refusal('id', 'This id was used for something else; make a new one.');
  return { entry, isRepeat: written.length === 0 };
}

/** Who amended it and when stays beside the entry. */
export async function amendHeapEntry(
  holding: Holding,
  houseId: string,
  id: string,
  given: Omit<Given, 'source' | 'id'>,
  act: Act,
): Promise<HeapEntry> {
  await holding.db
    .update(heapEntry)
    .set({
      ...columns(given),
      ...(given.at === undefined ? {} : { at: doneAt(given.at, act.now) }),
      ...{ amendedBy: act.by, amendedAt: act.now, revision: sql`${heapEntry.revision} + 1` },
    })
    .where(and(eq(heapEntry.holdingId, holding.id), eq(heapEntry.id, id)));
  return again(holding, houseId, id);
}

async function again(holding: Holding, houseId: string, id: string): Promise<HeapEntry> {
  const entry = await findHeapEntry(holding, houseId, id);
  if (entry === null) throw new Error('the entry was there a moment ago');
  return entry;
}
