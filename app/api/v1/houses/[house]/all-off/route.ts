import { addPersonCommand } from '@/db/queries/person-command';
import { ALL_OFF_S } from '@/lib/server/by-hand';
import { serve } from '@/lib/server/guard';
import { allOff } from '@/lib/server/operations/running';
import { untilTaken } from '@/lib/server/taken';
import { isoIn } from '@/lib/server/wire';

export const POST = serve(allOff, async ({ holding, things, caller, now }) => {
  const { house } = things;
  const order = { at: now, by: caller.by, body: { kind: 'all-off', seconds: ALL_OFF_S } } as const;
  const number = await addPersonCommand(holding, house.id, order);
  const at = now.getTime();
  return {
    body: { number, at: isoIn(house.zone, at), until: isoIn(house.zone, at + ALL_OFF_S * 1000) },
    after: () => untilTaken(holding.id, house.id, number),
  };
});
