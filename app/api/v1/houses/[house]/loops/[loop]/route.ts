import * as loops from '@/db/queries/loop';
import { LoopCreate } from '@/lib/schema/source';
import { merged } from '@/lib/server/check';
import { serve } from '@/lib/server/guard';
import { amendLoop, getLoop, removeLoop } from '@/lib/server/operations/yard';

export const GET = serve(getLoop, ({ things }) => ({ body: things.loop }));

export const PATCH = serve(amendLoop, async ({ holding, things, body }) => ({
  body: await loops.amendLoop(
    holding,
    things.house.id,
    things.loop.id,
    merged(LoopCreate, things.loop, body),
  ),
}));

export const DELETE = serve(removeLoop, async ({ holding, things, now }) => {
  await loops.removeLoop(holding, things.house.id, things.loop.id, now);
  return {};
});
