import { createVent } from '@/db/queries/reversing-vent';
import { serve } from '@/lib/server/guard';
import { createReversingVent } from '@/lib/server/operations/vents';

export const POST = serve(createReversingVent, async ({ holding, things, body, now }) => ({
  status: 201,
  body: await createVent(holding, things.house, body, now),
  subject: `${things.house.slug}/${body.key}`,
}));
