import * as book from '@/db/queries/heap-entry';
import { serve } from '@/lib/server/guard';
import { createHeapEntry, listHeapEntries } from '@/lib/server/operations/record';

export const GET = serve(listHeapEntries, async ({ holding, things, query }) => ({
  body: await book.listHeapEntries(holding, things.house.id, query),
}));

export const POST = serve(createHeapEntry, async ({ holding, things, body, caller, now }) => ({
  status: 201,
  body: await book.createHeapEntry(holding, things.house.id, body, { by: caller.by, now }),
}));
