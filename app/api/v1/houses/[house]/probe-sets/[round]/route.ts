import * as rounds from '@/db/queries/probe-set';
import { serve } from '@/lib/server/guard';
import { amendProbeSet, getProbeSet } from '@/lib/server/operations/heap';

export const GET = serve(getProbeSet, ({ things }) => ({ body: things.round }));

export const PATCH = serve(amendProbeSet, async ({ holding, things, body, caller, now }) => ({
  body: await rounds.amendProbeSet(holding, things.house.id, things.round.id, body, { by: caller.by, now }),
}));
