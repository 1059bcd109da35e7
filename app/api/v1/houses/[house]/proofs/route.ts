import { pageOf } from '@/db/queries/page';
import { serve } from '@/lib/server/guard';
import { beginProof, listProofs } from '@/lib/server/operations/proofs';
import { beginOrGoOn, tellProofs } from '@/lib/server/proofs';

export const GET = serve(listProofs, async ({ holding, things, query, now }) => ({
  body: pageOf(await tellProofs(holding, things.house, query.channel, now), query),
}));

export const POST = serve(beginProof, async ({ holding, things, body, caller, now }) => {
  const act = { by: caller.by, now };
  const { proof, isNew } = await beginOrGoOn(holding, things.house, body.channel, act);
  const subject = `${things.house.slug}/${proof.channel}`;
  return { status: isNew ? 201 : 200, body: proof, isRepeat: !isNew, subject };
});
