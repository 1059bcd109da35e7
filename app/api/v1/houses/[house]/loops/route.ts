import { pageOf } from '@/db/queries/page';
import * as loops from '@/db/queries/loop';
import { serve } from '@/lib/server/guard';
import { createLoop, listLoops } from '@/lib/server/operations/yard';

export const GET = serve(listLoops, async ({ holding, things, query }) => ({
  body: pageOf(await loops.listLoops(holding, things.house.id), query),
}));

export const POST = serve(createLoop, async ({ holding, things, body }) => ({
  status: 201,
  body: await loops.createLoop(holding, things.house.id, body),
}));
