import { serve } from '@/lib/server/guard';
import { moveOn } from '@/lib/server/imports';
import { bringImport } from '@/lib/server/operations/files';

export const POST = serve(bringImport, async ({ holding, things }) => ({
  body: await moveOn(holding, things.house, things.import, {
    ...{ from: ['checked'], to: 'to-bring' },
    else: 'Look the file through first, by sending its layout.',
  }),
}));
