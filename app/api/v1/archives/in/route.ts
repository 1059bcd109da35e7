import { beginArchive } from '@/lib/server/archives';
import { serve } from '@/lib/server/guard';
import { sendArchive } from '@/lib/server/operations/archives';

export const POST = serve(sendArchive, async ({ holding, body, caller, now }) => {
  const made = await beginArchive(holding, body, { caller, now });
  return { status: 201, body: made, subject: made.name };
});
