import * as materials from '@/db/queries/material';
import { MaterialCreate } from '@/lib/schema/material';
import { merged } from '@/lib/server/check';
import { serve } from '@/lib/server/guard';
import { amendMaterial, removeMaterial } from '@/lib/server/operations/heap-year';

export const PATCH = serve(amendMaterial, async ({ holding, things, body, caller, now }) => {
  const { material } = things;
  const given = merged(MaterialCreate, material, body);
  return {
    body: await materials.amendMaterial(holding, material.id, given, { by: caller.by, now }),
    subject: material.name,
  };
});

export const DELETE = serve(removeMaterial, async ({ holding, things, now }) => {
  await materials.removeMaterial(holding, things.material.id, now);
  return { subject: things.material.name };
});
