import { runsFile } from '@/lib/server/exports';
import { serve } from '@/lib/server/guard';
import { exportRuns } from '@/lib/server/operations/files';

export const GET = serve(exportRuns, ({ holding, things, query, now }) =>
  runsFile(holding, things.house, query, now),
);
