import { findPoint } from '@/db/queries/point';
import { exchangePlaces } from '@/db/queries/point-exchange';
import { Refusal } from '@/db/queries/refusal';
import { serve } from '@/lib/server/guard';
import { exchangePoints } from '@/lib/server/operations/points';

export const POST = serve(exchangePoints, async ({ holding, things, body }) => {
  const { house, point } = things;
  const other = await findPoint(holding, house.id, body.with);
  if (other === null) throw new Refusal('with', `This house has no point ${JSON.stringify(body.with)}.`);
  await exchangePlaces(holding, house.id, point, other);
  return { body: await findPoint(holding, house.id, point.id) };
});
