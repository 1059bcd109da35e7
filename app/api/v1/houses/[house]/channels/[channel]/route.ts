import * as channels from '@/db/queries/channel';
import { ChannelCreate } from '@/lib/schema/channel';
import { merged } from '@/lib/server/check';
import { serve } from '@/lib/server/guard';
import { amendChannel, getChannel, removeChannel } from '@/lib/server/operations/wiring';

export const GET = serve(getChannel, ({ things }) => ({ body: things.channel }));

export const PATCH = serve(amendChannel, async ({ holding, things, body, caller, now }) => ({
  body: await channels.amendChannel(
    holding,
    things.house,
    things.channel,
    merged(ChannelCreate, things.channel, body),
    { by: caller.by, now },
  ),
}));

export const DELETE = serve(removeChannel, async ({ holding, things, now }) => {
  await channels.removeChannel(holding, things.house.id, things.channel, now);
  return {};
});
