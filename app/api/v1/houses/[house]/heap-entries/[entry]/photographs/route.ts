import { v7 as uuid } from 'uuid';
import * as attachments from '@/db/queries/attachment';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { addPhotograph } from '@/lib/server/operations/heap';
import { madeAnew } from '@/lib/server/photograph';

export const POST = serve(addPhotograph, async ({ holding, things, query, bytes, caller, now }) => {
  const { entry } = things;
  const kept = entry.photographs.find((one) => one.id === query.id);
  if (kept !== undefined) return { status: 200, body: kept, isRepeat: true };
  if (entry.photographs.length >= 12)
    throw new Problem('conflict', {
      detail: 'This entry has twelve photographs already; write another entry.',
    });
  const made = await madeAnew(bytes);
  const act = { by: caller.by, now };
  const photograph = await attachments.addPhotograph(holding, entry.id, query.id ?? uuid(), made, act);
  if (photograph === null)
    throw new Problem('conflict', { detail: 'This id was used for another photograph.' });
  return { status: 201, body: photograph };
});
