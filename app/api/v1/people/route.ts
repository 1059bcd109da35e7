import { pageOf } from '@/db/queries/page';
import { listMembers } from '@/db/queries/member';
import { serve } from '@/lib/server/guard';
import { listPeople } from '@/lib/server/operations/people';
import { memberAnswer } from '@/lib/server/people';

export const GET = serve(listPeople, async ({ holding, query }) => ({
  body: pageOf((await listMembers(holding)).map(memberAnswer), query),
}));
