import * as versions from '@/db/queries/rule-version';
import { serve } from '@/lib/server/guard';
import { goBack } from '@/lib/server/operations/rules';

export const POST = serve(goBack, async ({ holding, things, body, caller, now }) => {
  const back = await versions.goBack(holding, things.rule, body.version, { by: caller.by, now });
  return { body: back.draft };
});
