import { serve } from '@/lib/server/guard';
import { getTraining, orderTraining } from '@/lib/server/operations/training';
import * as training from '@/lib/server/training';

export const GET = serve(getTraining, async ({ holding, things }) => ({
  body: await training.readTraining(holding, things.house),
}));

export const POST = serve(orderTraining, async ({ holding, things, body }) => ({
  body: await training.orderTraining(holding, things.house, body),
}));
