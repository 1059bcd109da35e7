import { serve } from '@/lib/server/guard';
import { nightsAnswer } from '@/lib/server/nights';
import { listNights } from '@/lib/server/operations/record';

export const GET = serve(listNights, async ({ holding, things, query, now }) =>
  nightsAnswer(holding, things.house, query, now),
);
