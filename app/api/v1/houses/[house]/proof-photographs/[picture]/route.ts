import { readPhotograph, removePhotograph } from '@/db/queries/attachment';
import { findProof } from '@/db/queries/proof';
import { Problem } from '@/lib/server/errors';
import { serve } from '@/lib/server/guard';
import { getPicture, removePicture } from '@/lib/server/operations/proofs';
import { refuseEnded } from '@/lib/server/proof-take';

export const GET = serve(getPicture, async ({ holding, things, query }) => {
  const bytes = await readPhotograph(holding, things.picture.id, query.size);
  if (bytes === null) throw new Problem('not-found');
  return { inline: { type: 'image/jpeg', bytes: new Uint8Array(bytes) } };
});

export const DELETE = serve(removePicture, async ({ holding, things }) => {
  const proof = await findProof(holding, things.house.id, things.picture.proofId);
  if (proof !== null) refuseEnded(proof);
  await removePhotograph(holding, things.picture.id);
  return {};
});
