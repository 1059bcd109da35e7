import { serve } from '@/lib/server/guard';
import { takeBack } from '@/lib/server/imports';
import { getImport, takeBackImport } from '@/lib/server/operations/files';

export const GET = serve(getImport, ({ things }) => ({ body: things.import }));

export const DELETE = serve(takeBackImport, async ({ holding, things }) => {
  const left = await takeBack(holding, things.house, things.import);
  return left === null ? {} : { body: left };
});
