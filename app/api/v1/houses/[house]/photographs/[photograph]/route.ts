import * as attachments from '@/db/queries/attachment';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { getPhotograph, removePhotograph } from '@/lib/server/operations/heap';

export const GET = serve(getPhotograph, async ({ holding, things, query }) => {
  const bytes = await attachments.readPhotograph(holding, things.photograph.id, query.size);
  if (bytes === null) throw new Problem('not-found');
  return { inline: { type: 'image/jpeg', bytes: new Uint8Array(bytes) } };
});

export const DELETE = serve(removePhotograph, async ({ holding, things }) => {
  if (!(await attachments.removePhotograph(holding, things.photograph.id))) throw new Problem('not-found');
  return {};
});
