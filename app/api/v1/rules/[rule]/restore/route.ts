import { toRuleWithVersions } from '@/db/queries/rule';
import * as versions from '@/db/queries/rule-version';
import { serve } from '@/lib/server/guard';
import { restoreRule } from '@/lib/server/operations/rules';

export const POST = serve(restoreRule, async ({ holding, things, body, caller, now }) => ({
  body: toRuleWithVersions(
    await versions.restoreRule(holding, things.rule, body.version, { by: caller.by, now }),
  ),
}));
