import { findNode } from '@/db/queries/node';
import { rawReading } from '@/lib/server/calibrations';
import { serve } from '@/lib/server/guard';
import { getRawReading } from '@/lib/server/operations/points';

export const GET = serve(getRawReading, async ({ holding, things, now }) => {
  const { house, point } = things;
  const node = point.node === null ? null : await findNode(holding, house.id, point.node);
  return { body: await rawReading(holding, house, point, node?.reportEvery ?? 30, now) };
});
