import { addPersonCommand } from '@/db/queries/person-command';
import { orderByHand } from '@/lib/server/by-hand';
import { serve } from '@/lib/server/guard';
import { giveBack, takeByHand } from '@/lib/server/operations/running';
import { untilTaken } from '@/lib/server/taken';
import { isoIn } from '@/lib/server/wire';

export const POST = serve(takeByHand, async ({ holding, things, body, caller, now }) => {
  const { house, channel } = things;
  const { number, seconds } = await orderByHand(holding, house, channel, body, { caller, now });
  const at = now.getTime();
  return {
    body: { number, at: isoIn(house.zone, at), until: isoIn(house.zone, at + seconds * 1000) },
    after: () => untilTaken(holding.id, house.id, number),
  };
});

export const DELETE = serve(giveBack, async ({ holding, things, caller, now }) => {
  const { house, channel } = things;
  const order = { at: now, by: caller.by, body: { kind: 'auto', channel: channel.id } } as const;
  const number = await addPersonCommand(holding, house.id, order);
  return { after: () => untilTaken(holding.id, house.id, number) };
});
