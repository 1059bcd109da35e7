import { readingsFile } from '@/lib/server/exports';
import { serve } from '@/lib/server/guard';
import { exportReadings } from '@/lib/server/operations/files';

export const GET = serve(exportReadings, ({ holding, things, query }) =>
  readingsFile(holding, things.house, query),
);
