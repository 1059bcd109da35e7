import * as dismissals from '@/db/queries/finding-dismissal';
import { serve } from '@/lib/server/guard';
import { takeBackDismissal } from '@/lib/server/operations/heap';

export const DELETE = serve(takeBackDismissal, async ({ holding, things, now }) => {
  await dismissals.takeBackDismissal(holding, things.dismissal.id, now);
  return { subject: `${things.dismissal.source}/${things.dismissal.kind}` };
});
