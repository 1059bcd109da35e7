import { listCalibrations as readCalibrations } from '@/db/queries/calibration';
import { pageOf } from '@/db/queries/page';
import { calibratePoint } from '@/lib/server/calibrations';
import { serve } from '@/lib/server/guard';
import { createCalibration, listCalibrations } from '@/lib/server/operations/points';

export const GET = serve(listCalibrations, async ({ holding, things, query }) => ({
  body: pageOf(await readCalibrations(holding, things.point.id), query),
}));

export const POST = serve(createCalibration, async ({ holding, things, body, caller, now }) => ({
  status: 201,
  body: await calibratePoint(holding, things.house, things.point, body, { by: caller.by, now }),
}));
