import 'server-only';
import { and, asc, eq, inArray } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { attachment, heapEntry } from '@/db/schema/heap';
import { source } from '@/db/schema/channel';
import type { Photograph } from '@/lib/schema/heap-view';
import { isId } from './reference';

/** What is told of a photograph: never its bytes, of which a page of the book would carry hundreds of megabytes. */
const facts = {
  id: attachment.id,
  entryId: attachment.entryId,
  width: attachment.widthPx,
  height: attachment.heightPx,
  by: attachment.by,
  enteredAt: attachment.enteredAt,
};

const told = ({ id, width, height, by, enteredAt }: { enteredAt: Date } & Omit<Photograph, 'enteredAt'>) => ({
  ...{ id, width, height, by },
  enteredAt: enteredAt.toISOString(),
});

/** Photographs of entries, by entry, oldest first. */
export async function photographsOf(
  holding: Holding,
  entries: readonly string[],
): Promise<Map<string, Photograph[]>> {
  const byEntry = new Map<string, Photograph[]>();
  if (entries.length === 0) return byEntry;
  const rows = await holding.db
    .select(facts)
    .from(attachment)
    .where(and(eq(attachment.holdingId, holding.id), inArray(attachment.entryId, [...entries])))
    .orderBy(asc(attachment.enteredAt), asc(attachment.id));
  for (const { entryId, ...row } of rows)
    if (entryId !== null) byEntry.set(entryId, [...(byEntry.get(entryId) ?? []), told(row)]);
  return byEntry;
}

/** One of a house's photographs, without its bytes. */
export async function findPhotograph(
  holding: Holding,
  houseId: string,
  id: string,
): Promise<Photograph | null> {
  if (!isId(id)) return null;
  const [row] = await holding.db
    .select(facts)
    .from(attachment)
    .innerJoin(
      heapEntry,
      and(eq(heapEntry.holdingId, attachment.holdingId), eq(heapEntry.id, attachment.entryId)),
    )
    .innerJoin(source, and(eq(source.holdingId, heapEntry.holdingId), eq(source.id, heapEntry.sourceId)))
    .where(and(eq(attachment.holdingId, holding.id), eq(source.houseId, houseId), eq(attachment.id, id)));
  return row === undefined ? null : told(row);
}

export async function readPhotograph(
  holding: Holding,
  id: string,
  size: 'whole' | 'thumbnail',
): Promise<Buffer | null> {
  const [row] = await holding.db
    .select({ bytes: size === 'whole' ? attachment.image : attachment.thumbnail })
    .from(attachment)
    .where(and(eq(attachment.holdingId, holding.id), eq(attachment.id, id)));
  return row?.bytes ?? null;
}

export interface MadePhotograph {
  width: number;
  height: number;
  image: Buffer;
  thumbnail: Buffer;
}

/** Writes it once, however often it is sent under its id. @returns null where the id is another entry's */
export async function addPhotograph(
  holding: Holding,
  entryId: string,
  id: string,
  made: MadePhotograph,
  act: { by: string; now: Date },
): Promise<Photograph | null> {
  await holding.db
    .insert(attachment)
    .values({
      ...{ holdingId: holding.id, id, entryId, by: act.by, enteredAt: act.now },
      ...{ widthPx: made.width, heightPx: made.height, image: made.image, thumbnail: made.thumbnail },
    })
    .onConflictDoNothing();
  return (await photographsOf(holding, [entryId])).get(entryId)?.find((one) => one.id === id) ?? null;
}

export async function removePhotograph(holding: Holding, id: string): Promise<void> {
  await holding.db.delete(attachment).where(and(eq(attachment.holdingId, holding.id), eq(attachment.id, id)));
}
