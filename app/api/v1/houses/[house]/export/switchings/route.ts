import { switchingsFile } from '@/lib/server/exports';
import { serve } from '@/lib/server/guard';
import { exportSwitchings } from '@/lib/server/operations/files';

export const GET = serve(exportSwitchings, ({ holding, things, query }) =>
  switchingsFile(holding, things.house, query),
);
