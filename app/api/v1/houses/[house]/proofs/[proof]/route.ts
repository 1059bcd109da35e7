import { serve } from '@/lib/server/guard';
import { getProof } from '@/lib/server/operations/proofs';
import { tellProof } from '@/lib/server/proofs';

export const GET = serve(getProof, async ({ holding, things, now }) => ({
  body: await tellProof(holding, things.house, things.proof, now),
}));
