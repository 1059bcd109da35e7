import { v7 as uuid } from 'uuid';
import * as attachments from '@/db/queries/attachment';
import { pageOf } from '@/db/queries/page';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { addPointPhotograph, listPointPhotographs } from '@/lib/server/operations/points';
import { madeAnew } from '@/lib/server/photograph';

const MOST = 6;

export const GET = serve(listPointPhotographs, async ({ holding, things, query }) => ({
  body: pageOf(await attachments.photographsOfPoint(holding, things.point.id), query),
}));

export const POST = serve(addPointPhotograph, async ({ holding, things, query, bytes, caller, now }) => {
  const before = await attachments.photographsOfPoint(holding, things.point.id);
  const kept = before.find((one) => one.id === query.id);
  if (kept !== undefined) return { status: 200, body: kept, isRepeat: true };
  if (before.length >= MOST)
    throw new Problem('conflict', { detail: 'This point has six photographs already; take one away first.' });
  const made = await madeAnew(bytes);
  const of = { id: query.id ?? uuid(), shows: query.shows };
  const act = { by: caller.by, now };
  const photograph = await attachments.addPointPhotograph(holding, things.point.id, of, made, act);
  if (photograph === null)
    throw new Problem('conflict', { detail: 'This id was used for another photograph.' });
  return { status: 201, body: photograph };
});
