import * as book from '@/db/queries/heap-entry';
import { HeapEntryCreate } from '@/lib/schema/heap';
import { merged } from '@/lib/server/check';
import { serve } from '@/lib/server/guard';
import { amendHeapEntry, getHeapEntry } from '@/lib/server/operations/heap';

export const GET = serve(getHeapEntry, ({ things }) => ({ body: things.entry }));

export const PATCH = serve(amendHeapEntry, async ({ holding, things, body, caller, now }) => {
  const { house, entry } = things;
  const given = merged(HeapEntryCreate, withoutNulls(entry), withoutNulls(body));
  const act = { by: caller.by, now };
  const cleared = Object.entries(body).filter(([, value]) => value === null);
  for (const [name] of cleared) Reflect.deleteProperty(given, name);
  return { body: await book.amendHeapEntry(holding, house.id, entry.id, given, act) };
});

/** An empty quantity is null where it is told, and absent where it is given. */
function withoutNulls(of: object): object {
  return Object.fromEntries(Object.entries(of).filter(([, value]) => value !== null));
}
