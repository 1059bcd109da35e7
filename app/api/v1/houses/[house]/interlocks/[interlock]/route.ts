import * as interlocks from '@/db/queries/interlock';
import { InterlockCreate } from '@/lib/schema/channel';
import { merged } from '@/lib/server/check';
import { serve } from '@/lib/server/guard';
import { amendInterlock, getInterlock, removeInterlock } from '@/lib/server/operations/wiring';

export const GET = serve(getInterlock, ({ things }) => ({ body: things.interlock }));

export const PATCH = serve(amendInterlock, async ({ holding, things, body }) => ({
  body: await interlocks.amendInterlock(
    holding,
    things.house.id,
    things.interlock.id,
    merged(InterlockCreate, things.interlock, body),
  ),
}));

export const DELETE = serve(removeInterlock, async ({ holding, things, now }) => {
  await interlocks.removeInterlock(holding, things.house.id, things.interlock.id, now);
  return {};
});
