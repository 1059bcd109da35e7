import { serve } from '@/lib/server/guard';
import { orderRun, stopRun } from '@/lib/server/operations/proofs';
import { orderRun as order, stopRun as stop } from '@/lib/server/proof-order';
import { channelOf, tellProof } from '@/lib/server/proofs';
import { untilTaken } from '@/lib/server/taken';

export const POST = serve(orderRun, async ({ holding, things, body, caller, now }) => {
  const { house } = things;
  const channel = await channelOf(holding, house, things.proof);
  const act = { house, channel, by: caller.by, now };
  const { proof, number } = await order(holding, act, things.proof, body);
  return {
    body: await tellProof(holding, house, proof, now),
    subject: `${house.slug}/${channel.key}`,
    ...(number === null ? {} : { after: () => untilTaken(holding.id, house.id, number) }),
  };
});

export const DELETE = serve(stopRun, async ({ holding, things, caller, now }) => {
  const { house } = things;
  const channel = await channelOf(holding, house, things.proof);
  const { proof, number } = await stop(holding, { house, channel, by: caller.by, now }, things.proof);
  return {
    body: await tellProof(holding, house, proof, now),
    subject: `${house.slug}/${channel.key}`,
    ...(number === null ? {} : { after: () => untilTaken(holding.id, house.id, number) }),
  };
});
