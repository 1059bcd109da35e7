import { toRuleWithVersions } from '@/db/queries/rule';
import * as versions from '@/db/queries/rule-version';
import { serve } from '@/lib/server/guard';
import { retireRule } from '@/lib/server/operations/rules';

export const POST = serve(retireRule, async ({ holding, things, body, caller, now }) => ({
  body: toRuleWithVersions(await versions.retireRule(holding, things.rule, body.why, { by: caller.by, now })),
}));
