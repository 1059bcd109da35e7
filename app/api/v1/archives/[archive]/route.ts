import { dropArchive as drop } from '@/lib/server/archives';
import { serve } from '@/lib/server/guard';
import { dropArchive, getArchive } from '@/lib/server/operations/archives';

export const GET = serve(getArchive, ({ things }) => ({ body: things.archive }));

export const DELETE = serve(dropArchive, async ({ holding, things }) => {
  await drop(holding, things.archive);
  return { subject: things.archive.name };
});
