import { serve } from '@/lib/server/guard';
import { giveUpProof } from '@/lib/server/operations/proofs';
import { giveUpProof as giveUp } from '@/lib/server/proof-order';
import { channelOf, tellProof } from '@/lib/server/proofs';
import { untilTaken } from '@/lib/server/taken';

export const POST = serve(giveUpProof, async ({ holding, things, body, caller, now }) => {
  const { house } = things;
  const channel = await channelOf(holding, house, things.proof);
  const act = { house, channel, by: caller.by, now };
  const { proof, number } = await giveUp(holding, act, things.proof, body.why);
  return {
    body: await tellProof(holding, house, proof, now),
    subject: `${house.slug}/${channel.key}`,
    ...(number === null ? {} : { after: () => untilTaken(holding.id, house.id, number) }),
  };
});
