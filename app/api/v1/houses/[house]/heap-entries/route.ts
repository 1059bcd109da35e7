import * as book from '@/db/queries/heap-entry';
import { serve } from '@/lib/server/guard';
import { createHeapEntry, listHeapEntries } from '@/lib/server/operations/heap';

export const GET = serve(listHeapEntries, async ({ holding, things, query }) => ({
  body: await book.listHeapEntries(holding, things.house.id, query),
}));

export const POST = serve(createHeapEntry, async ({ holding, things, body, caller, now }) => {
  const made = await book.createHeapEntry(holding, things.house.id, body, { by: caller.by, now });
  return { status: made.isRepeat ? 200 : 201, body: made.entry, isRepeat: made.isRepeat };
});
