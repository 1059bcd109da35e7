import { pageOf } from '@/db/queries/page';
import * as sources from '@/db/queries/source';
import { serve } from '@/lib/server/guard';
import { createSource, listSources } from '@/lib/server/operations/yard';

export const GET = serve(listSources, async ({ holding, things, query }) => ({
  body: pageOf(await sources.listSources(holding, things.house.id), query),
}));

export const POST = serve(createSource, async ({ holding, things, body }) => ({
  status: 201,
  body: await sources.createSource(holding, things.house.id, body),
}));
