import { renameRule, toRuleWithVersions } from '@/db/queries/rule';
import { serve } from '@/lib/server/guard';
import { amendRule, getRule } from '@/lib/server/operations/rules';

export const GET = serve(getRule, ({ things }) => ({ body: toRuleWithVersions(things.rule) }));

export const PATCH = serve(amendRule, async ({ holding, things, body }) => {
  const { rule } = things;
  const renamed = body.name === undefined ? rule : await renameRule(holding, rule.id, body.name);
  return { body: toRuleWithVersions(renamed) };
});
