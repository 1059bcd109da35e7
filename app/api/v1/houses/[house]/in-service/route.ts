import { serveHouse } from '@/lib/server/archives';
import { serve } from '@/lib/server/guard';
import { putInService } from '@/lib/server/operations/archives';

export const POST = serve(putInService, async ({ holding, things, body }) => ({
  body: await serveHouse(holding, things.house, body.acceptUnproved === true),
}));
