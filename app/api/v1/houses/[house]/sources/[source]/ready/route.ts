import { serve } from '@/lib/server/guard';
import { sayReady } from '@/lib/server/operations/running';
import { orderReady } from '@/lib/server/ready';
import { untilTaken } from '@/lib/server/taken';
import { isoIn } from '@/lib/server/wire';

export const POST = serve(sayReady, async ({ holding, things, caller, now }) => {
  const { house, source } = things;
  const number = await orderReady(holding, house, source, { by: caller.by, now });
  return {
    body: { number, at: isoIn(house.zone, now.getTime()), until: null },
    after: () => untilTaken(holding.id, house.id, number),
  };
});
