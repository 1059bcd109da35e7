import * as points from '@/db/queries/point';
import { PointCreate } from '@/lib/schema/point';
import { merged } from '@/lib/server/check';
import { serve } from '@/lib/server/guard';
import { amendPoint, getPoint, removePoint } from '@/lib/server/operations/wiring';

export const GET = serve(getPoint, ({ things }) => ({ body: things.point }));

export const PATCH = serve(amendPoint, async ({ holding, things, body, caller, now }) => ({
  body: await points.amendPoint(
    holding,
    things.house.id,
    things.point,
    merged(PointCreate, things.point, body),
    { by: caller.by, now },
  ),
}));

export const DELETE = serve(removePoint, async ({ holding, things, now }) => {
  await points.removePoint(holding, things.house.id, things.point, now);
  return {};
});
