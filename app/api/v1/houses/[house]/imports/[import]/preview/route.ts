import { serve } from '@/lib/server/guard';
import { previewImport as preview } from '@/lib/server/imports';
import { previewImport } from '@/lib/server/operations/files';

export const POST = serve(previewImport, async ({ holding, things, body, now }) => ({
  body: await preview(holding, things.house, things.import, body.layout, now),
}));
