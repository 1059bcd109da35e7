import * as houses from '@/db/queries/house';
import { HouseCreate } from '@/lib/schema/house';
import { merged } from '@/lib/server/check';
import { serve } from '@/lib/server/guard';
import { amendHouse, getHouse, removeHouse } from '@/lib/server/operations/yard';

export const GET = serve(getHouse, ({ things }) => ({ body: things.house }));

export const PATCH = serve(amendHouse, async ({ holding, things, body, now }) => ({
  body: await houses.amendHouse(holding, things.house.id, merged(HouseCreate, things.house, body), now),
}));

export const DELETE = serve(removeHouse, async ({ holding, things, now }) => {
  await houses.removeHouse(holding, things.house.id, now);
  return {};
});
