import * as money from '@/db/queries/money';
import { serve } from '@/lib/server/guard';
import { createHeapCost, listHeapCosts } from '@/lib/server/operations/money';

export const GET = serve(listHeapCosts, async ({ holding, things, query }) => ({
  body: { items: await money.listHeapCosts(holding, things.house.id, query.source), next: null },
}));

export const POST = serve(createHeapCost, async ({ holding, things, body, caller, now }) => ({
  status: 201,
  body: await money.createHeapCost(holding, things.house, body, { by: caller.by, now }),
}));
