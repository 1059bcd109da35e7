import 'server-only';
import { and, eq } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { source } from '@/db/schema/channel';
import { inUse, isId } from './reference';
import { Refusal } from './refusal';

/** A clock that is a little ahead, as a phone's may be, makes no entry of what is still to come. */
const AHEAD_MS = 600_000;

/** Id of the heap that a record is of. @throws Refusal at `source` for what is no heap of the house */
export async function heapId(holding: Holding, houseId: string, ref: string): Promise<string> {
  const [heap] = await holding.db
    .select({ id: source.id })
    .from(source)
    .where(
      and(
        inUse(holding, houseId, source),
        eq(source.kind, 'heap'),
        isId(ref) ? eq(source.id, ref) : eq(source.slug, ref),
      ),
    );
  if (heap === undefined) throw new Refusal('source', `This house has no heap ${JSON.stringify(ref)}.`);
  return heap.id;
}

/** When it was done; now, where nothing is said. @throws Refusal at `at` for what is still to come */
export function doneAt(at: string | undefined, now: Date): Date {
  if (at === undefined) return now;
  const done = new Date(at);
  if (done.getTime() > now.getTime() + AHEAD_MS)
    throw new Refusal('at', 'That is still to come: give when it was done, or enter it as a job.');
  return done;
}
