import * as materials from '@/db/queries/material';
import { serve } from '@/lib/server/guard';
import { createMaterial, listMaterials } from '@/lib/server/operations/heap-year';

export const GET = serve(listMaterials, async ({ holding }) => ({
  body: { items: await materials.listMaterials(holding), next: null },
}));

export const POST = serve(createMaterial, async ({ holding, body, caller, now }) => ({
  status: 201,
  body: await materials.createMaterial(holding, body, { by: caller.by, now }),
  subject: body.name,
}));
