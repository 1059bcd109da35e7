import { serve } from '@/lib/server/guard';
import { checkLayout, moveOn } from '@/lib/server/imports';
import { checkImport } from '@/lib/server/operations/files';

export const PUT = serve(checkImport, async ({ holding, things, body }) => {
  await checkLayout(holding, things.house, body);
  const moved = await moveOn(holding, things.house, things.import, {
    ...{ from: ['received', 'checked'], to: 'to-check', layout: body },
    else: 'The file is not here whole, is being read, or was brought in already.',
  });
  return { body: moved };
});
