import { serve } from '@/lib/server/guard';
import { houseStateAnswer } from '@/lib/server/house-state';
import { getState } from '@/lib/server/operations/running';

export const GET = serve(getState, async ({ holding, things, now }) => ({
  body: await houseStateAnswer(holding, things.house, now),
}));
