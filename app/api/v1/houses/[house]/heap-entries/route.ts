import * as book from '@/db/queries/heap-entry';
import { findSource } from '@/db/queries/source';
import { serve } from '@/lib/server/guard';
import { createHeapEntry, listHeapEntries } from '@/lib/server/operations/heap';
import { orderRebuilt } from '@/lib/server/ready';
import { untilTaken } from '@/lib/server/taken';

export const GET = serve(listHeapEntries, async ({ holding, things, query }) => ({
  body: await book.listHeapEntries(holding, things.house.id, query),
}));

export const POST = serve(createHeapEntry, async ({ holding, things, body, caller, now }) => {
  const { house } = things;
  const act = { by: caller.by, now };
  const { entry, isRepeat } = await book.createHeapEntry(holding, house.id, body, act);
  const source = await findSource(holding, house.id, entry.source);
  const order = isRepeat || source === null ? null : await orderRebuilt(holding, house, source, entry, act);
  return {
    ...{ status: isRepeat ? 200 : 201, body: entry, isRepeat },
    ...(order === null ? {} : { after: () => untilTaken(holding.id, house.id, order) }),
  };
});
