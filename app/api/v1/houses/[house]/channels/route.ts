import { pageOf } from '@/db/queries/page';
import * as channels from '@/db/queries/channel';
import { serve } from '@/lib/server/guard';
import { createChannel, listChannels } from '@/lib/server/operations/wiring';

export const GET = serve(listChannels, async ({ holding, things, query }) => ({
  body: pageOf(await channels.listChannels(holding, things.house.id), query),
}));

export const POST = serve(createChannel, async ({ holding, things, body, now }) => ({
  status: 201,
  body: await channels.createChannel(holding, things.house, body, now),
}));
