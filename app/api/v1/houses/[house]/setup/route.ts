import { putOffSteps, readSetup } from '@/db/queries/setup';
import { setupSteps } from '@/lib/analysis/setup';
import { serve } from '@/lib/server/guard';
import { getSetup, putOffSetup } from '@/lib/server/operations/setup';

export const GET = serve(getSetup, async ({ holding, things }) => ({
  body: { steps: setupSteps((await readSetup(holding, things.house)).facts) },
}));

export const PUT = serve(putOffSetup, async ({ holding, things, body }) => {
  await putOffSteps(holding, things.house.id, body.putOff);
  return { body: { steps: setupSteps((await readSetup(holding, things.house)).facts) } };
});
