import { pageOf } from '@/db/queries/page';
import { serve } from '@/lib/server/guard';
import { lettersOf } from '@/lib/server/letters-here';
import { listMail } from '@/lib/server/operations/people';

export const GET = serve(listMail, async ({ holding, query }) => ({
  body: pageOf(await lettersOf(holding), query),
}));
