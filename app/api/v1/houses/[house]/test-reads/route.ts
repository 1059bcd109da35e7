import { askTestRead } from '@/db/queries/test-read';
import { serve } from '@/lib/server/guard';
import { createTestRead } from '@/lib/server/operations/buses';

export const POST = serve(createTestRead, async ({ holding, things, body }) => ({
  status: 201,
  body: await askTestRead(holding, things.house.id, body),
}));
