import { archiveAnswer } from '@/lib/server/archives';
import { serve } from '@/lib/server/guard';
import { fetchArchive } from '@/lib/server/operations/archives';

export const GET = serve(fetchArchive, ({ holding, things, caller, now }) =>
  archiveAnswer(holding, things.archive, { caller, now }),
);
