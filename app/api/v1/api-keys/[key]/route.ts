import * as keys from '@/db/queries/key';
import { serve } from '@/lib/server/guard';
import { revokeKey } from '@/lib/server/operations/people';

export const DELETE = serve(revokeKey, async ({ holding, things }) => {
  await keys.revokeKey(holding, things.key.id);
  return { subject: things.key.name };
});
