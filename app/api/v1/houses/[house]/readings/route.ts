import { serve } from '@/lib/server/guard';
import { getReadings } from '@/lib/server/operations/running';
import { readingsAnswer } from '@/lib/server/readings';

export const GET = serve(getReadings, async ({ holding, things, query, now }) => ({
  body: await readingsAnswer(holding, things.house, query, now),
}));
