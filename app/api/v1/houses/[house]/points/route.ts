import { pageOf } from '@/db/queries/page';
import * as points from '@/db/queries/point';
import { serve } from '@/lib/server/guard';
import { createPoint, listPoints } from '@/lib/server/operations/wiring';

export const GET = serve(listPoints, async ({ holding, things, query }) => ({
  body: pageOf(await points.listPoints(holding, things.house.id), query),
}));

export const POST = serve(createPoint, async ({ holding, things, body, caller }) => ({
  status: 201,
  body: await points.createPoint(holding, things.house.id, body, caller.by),
}));
