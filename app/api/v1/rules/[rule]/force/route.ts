import { forceDraft } from '@/db/queries/rule-version';
import { serve } from '@/lib/server/guard';
import { forceRule } from '@/lib/server/operations/rules';
import { refuseForce } from '@/lib/server/rule-check';

export const POST = serve(forceRule, async ({ holding, things, body, caller, now }) => {
  await refuseForce(holding, things.rule, body.acceptUnproved ?? false, { caller, now });
  return { body: await forceDraft(holding, things.rule, body.why, { by: caller.by, now }) };
});
