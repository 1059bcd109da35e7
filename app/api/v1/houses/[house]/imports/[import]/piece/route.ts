import { serve } from '@/lib/server/guard';
import { takePiece } from '@/lib/server/imports';
import { sendPiece } from '@/lib/server/operations/files';

export const PUT = serve(sendPiece, async ({ holding, things, query, bytes }) => ({
  body: await takePiece(holding, things.house, things.import, query.from, bytes),
}));
