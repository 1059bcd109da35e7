import { serve } from '@/lib/server/guard';
import { probeRoundsFile } from '@/lib/server/heap-files';
import { exportProbeRounds } from '@/lib/server/operations/files';

export const GET = serve(exportProbeRounds, ({ holding, things, query }) =>
  probeRoundsFile(holding, things.house, query),
);
