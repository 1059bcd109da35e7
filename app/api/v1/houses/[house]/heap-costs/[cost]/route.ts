import * as money from '@/db/queries/money';
import { serve } from '@/lib/server/guard';
import { amendHeapCost, removeHeapCost } from '@/lib/server/operations/money';

export const PUT = serve(amendHeapCost, async ({ holding, things, body, caller, now }) => ({
  body: await money.amendHeapCost(holding, things.house, things.cost.id, body, { by: caller.by, now }),
}));

export const DELETE = serve(removeHeapCost, async ({ holding, things, now }) => {
  await money.removeHeapCost(holding, things.cost.id, now);
  return {};
});
