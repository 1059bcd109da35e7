import { serve } from '@/lib/server/guard';
import { takeStep } from '@/lib/server/operations/proofs';
import { takeStep as take } from '@/lib/server/proof-take';
import { channelOf, tellProof } from '@/lib/server/proofs';

export const POST = serve(takeStep, async ({ holding, things, body, caller, now }) => {
  const { house, proof } = things;
  const channel = await channelOf(holding, house, proof);
  const taken = await take(holding, { house, channel, by: caller.by, now }, proof, body);
  return { body: await tellProof(holding, house, taken, now), subject: `${house.slug}/${channel.key}` };
});
