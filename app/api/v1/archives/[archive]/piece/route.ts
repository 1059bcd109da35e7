import { takeArchivePiece } from '@/lib/server/archives';
import { serve } from '@/lib/server/guard';
import { sendArchivePiece } from '@/lib/server/operations/archives';

export const PUT = serve(sendArchivePiece, async ({ holding, things, query, bytes }) => ({
  body: await takeArchivePiece(holding, things.archive, query.from, bytes),
}));
