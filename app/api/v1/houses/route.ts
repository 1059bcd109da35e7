import * as houses from '@/db/queries/house';
import { pageOf } from '@/db/queries/page';
import { serve } from '@/lib/server/guard';
import { createHouse, listHouses } from '@/lib/server/operations/yard';

export const GET = serve(listHouses, async ({ holding, query }) => ({
  body: pageOf(await houses.listHouses(holding), query),
}));

export const POST = serve(createHouse, async ({ holding, body, now }) => ({
  status: 201,
  body: await houses.createHouse(holding, body, now),
}));
