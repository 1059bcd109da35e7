import { removeLockout as remove } from '@/db/queries/lockout';
import { serve } from '@/lib/server/guard';
import { getLockout, removeLockout } from '@/lib/server/operations/wiring';
import { untilTaken } from '@/lib/server/taken';

export const GET = serve(getLockout, ({ things }) => ({ body: things.lockout }));

export const DELETE = serve(removeLockout, async ({ holding, things, caller, now }) => {
  const { house, lockout } = things;
  const number = await remove(holding, house.id, lockout.id, { by: caller.by, at: now });
  return {
    subject: `${house.slug}/${lockout.channel}`,
    ...(number === null ? {} : { after: () => untilTaken(holding.id, house.id, number) }),
  };
});
