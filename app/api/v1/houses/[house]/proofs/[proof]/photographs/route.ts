import * as pictures from '@/db/queries/proof-picture';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { addPicture } from '@/lib/server/operations/proofs';
import { madeAnew } from '@/lib/server/photograph';
import { refuseEnded } from '@/lib/server/proof-take';

const MOST = 12;

export const POST = serve(addPicture, async ({ holding, things, query, bytes, caller, now }) => {
  const { proof } = things;
  refuseEnded(proof);
  if ((await pictures.picturesOf(holding, proof.id)).length >= MOST)
    throw new Problem('conflict', {
      detail: `This proof has ${MOST} photographs already; take one out first.`,
    });
  const made = await madeAnew(bytes);
  const act = { by: caller.by, now };
  return { status: 201, body: await pictures.addPicture(holding, proof.id, query.shows, made, act) };
});
