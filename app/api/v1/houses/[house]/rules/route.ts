import { pageOf } from '@/db/queries/page';
import * as rules from '@/db/queries/rule';
import { serve } from '@/lib/server/guard';
import { createRule, listRules } from '@/lib/server/operations/rules';

export const GET = serve(listRules, async ({ holding, things, query }) => ({
  body: pageOf(await rules.listRules(holding, things.house.id, query.retired === 'true'), query),
}));

export const POST = serve(createRule, async ({ holding, things, body, caller, now }) => {
  const made = await rules.createRule(holding, things.house.id, body, { by: caller.by, now });
  return { status: 201, body: rules.toRule(made) };
});
