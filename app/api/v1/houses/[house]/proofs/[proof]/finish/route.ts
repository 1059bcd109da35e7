import { serve } from '@/lib/server/guard';
import { finishProof } from '@/lib/server/operations/proofs';
import { finishProof as finish } from '@/lib/server/proof-order';
import { channelOf, tellProof } from '@/lib/server/proofs';

export const POST = serve(finishProof, async ({ holding, things, caller, now }) => {
  const { house } = things;
  const channel = await channelOf(holding, house, things.proof);
  const proof = await finish(holding, { house, channel, by: caller.by, now }, things.proof);
  return { body: await tellProof(holding, house, proof, now), subject: `${house.slug}/${channel.key}` };
});
