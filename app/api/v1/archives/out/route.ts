import { askForArchive } from '@/lib/server/archives';
import { serve } from '@/lib/server/guard';
import { makeArchive } from '@/lib/server/operations/archives';

export const POST = serve(makeArchive, async ({ holding, caller, now }) => {
  const made = await askForArchive(holding, { caller, now });
  return { status: 201, body: made, subject: made.name };
});
