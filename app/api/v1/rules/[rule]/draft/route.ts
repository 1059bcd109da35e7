import * as versions from '@/db/queries/rule-version';
import { serve } from '@/lib/server/guard';
import { dropDraft, writeDraft } from '@/lib/server/operations/rules';

export const PUT = serve(writeDraft, async ({ holding, things, body, caller, now }) => {
  const written = await versions.writeDraft(holding, things.rule, body, { by: caller.by, now });
  return { body: written.draft };
});

export const DELETE = serve(dropDraft, async ({ holding, things, caller, now }) => {
  await versions.dropDraft(holding, things.rule, { by: caller.by, now });
  return {};
});
