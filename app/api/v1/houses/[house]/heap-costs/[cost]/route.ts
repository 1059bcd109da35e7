import * as money from '@/db/queries/money';
import { serve } from '@/lib/server/guard';
import { removeHeapCost } from '@/lib/server/operations/money';

export const DELETE = serve(removeHeapCost, async ({ holding, things, now }) => {
  await money.removeHeapCost(holding, things.cost.id, now);
  return {};
});
