import { forceDraft } from '@/db/queries/rule-version';
import { serve } from '@/lib/server/guard';
import { forceRule } from '@/lib/server/operations/rules';
import { refuseForce } from '@/lib/server/rule-check';

export const POST = serve(forceRule, async ({ holding, things, body, caller, now }) => {
  const { rule } = things;
  const { isUnproved } = await refuseForce(holding, rule, body.acceptUnproved ?? false, { caller, now });
  const unproved = isUnproved ? { words: body.consent || null } : null;
  return { body: await forceDraft(holding, rule, body.why, { by: caller.by, now }, unproved) };
});
