import { pageOf } from '@/db/queries/page';
import * as interlocks from '@/db/queries/interlock';
import { serve } from '@/lib/server/guard';
import { createInterlock, listInterlocks } from '@/lib/server/operations/wiring';

export const GET = serve(listInterlocks, async ({ holding, things, query }) => ({
  body: pageOf(await interlocks.listInterlocks(holding, things.house.id), query),
}));

export const POST = serve(createInterlock, async ({ holding, things, body }) => ({
  status: 201,
  body: await interlocks.createInterlock(holding, things.house.id, body),
}));
