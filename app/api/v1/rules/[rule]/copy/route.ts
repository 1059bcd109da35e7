import { toRule } from '@/db/queries/rule';
import * as copies from '@/db/queries/rule-copy';
import { serve } from '@/lib/server/guard';
import { copyRule } from '@/lib/server/operations/rules';

export const POST = serve(copyRule, async ({ holding, things, body, caller, now }) => {
  const made = await copies.copyRule(holding, things.rule, body, { by: caller.by, now });
  return { status: 201, body: toRule(made) };
});
