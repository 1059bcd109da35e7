import * as lockouts from '@/db/queries/lockout';
import { pageOf } from '@/db/queries/page';
import { serve } from '@/lib/server/guard';
import { listLockouts, placeLockout } from '@/lib/server/operations/wiring';
import { untilTaken } from '@/lib/server/taken';

export const GET = serve(listLockouts, async ({ holding, things, query }) => ({
  body: pageOf(await lockouts.listLockouts(holding, things.house.id), query),
}));

export const POST = serve(placeLockout, async ({ holding, things, body, caller, now }) => {
  const act = { by: caller.by, at: now };
  const { lockout, number } = await lockouts.placeLockout(holding, things.house.id, body, act);
  return {
    status: 201,
    body: lockout,
    subject: `${things.house.slug}/${lockout.channel}`,
    after: () => untilTaken(holding.id, things.house.id, number),
  };
});
