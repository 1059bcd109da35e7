import { createDismissal } from '@/db/queries/finding-dismissal';
import { serve } from '@/lib/server/guard';
import { dismissFinding } from '@/lib/server/operations/heap';

export const POST = serve(dismissFinding, async ({ holding, things, body, caller, now }) => ({
  status: 201,
  body: await createDismissal(holding, things.house.id, body, { by: caller.by, now }),
}));
