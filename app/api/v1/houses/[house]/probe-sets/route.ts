import * as rounds from '@/db/queries/probe-set';
import { serve } from '@/lib/server/guard';
import { createProbeSet, listProbeSets } from '@/lib/server/operations/heap';

export const GET = serve(listProbeSets, async ({ holding, things, query }) => ({
  body: await rounds.listProbeSets(holding, things.house.id, query),
}));

export const POST = serve(createProbeSet, async ({ holding, things, body, caller, now }) => {
  const made = await rounds.createProbeSet(holding, things.house.id, body, { by: caller.by, now });
  return { status: made.isRepeat ? 200 : 201, body: made.round, isRepeat: made.isRepeat };
});
