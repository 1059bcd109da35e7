import { serve } from '@/lib/server/guard';
import { checkRule } from '@/lib/server/operations/rules';
import { findingsOf } from '@/lib/server/rule-check';

export const POST = serve(checkRule, async ({ holding, things, body, caller, now }) => ({
  body: await findingsOf(holding, things.rule, body.body, { caller, now }),
}));
