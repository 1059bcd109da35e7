import { bringArchive as bring } from '@/lib/server/archives';
import { serve } from '@/lib/server/guard';
import { bringArchive } from '@/lib/server/operations/archives';

export const POST = serve(bringArchive, async ({ holding, things, body, caller }) => ({
  body: await bring(holding, things.archive, body.name, caller),
  subject: things.archive.name,
}));
