import * as audit from '@/db/queries/audit';
import { serve } from '@/lib/server/guard';
import { listAudit } from '@/lib/server/operations/people';

export const GET = serve(listAudit, async ({ holding, query }) => ({
  body: await audit.listAudit(holding, query),
}));
