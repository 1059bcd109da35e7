import { listImports as list } from '@/db/queries/import';
import { serve } from '@/lib/server/guard';
import { beginImport } from '@/lib/server/imports';
import { createImport, listImports } from '@/lib/server/operations/files';

export const GET = serve(listImports, async ({ holding, things }) => ({
  body: { items: await list(holding, things.house.id), next: null },
}));

export const POST = serve(createImport, async ({ holding, things, body, caller, now }) => {
  const made = await beginImport(holding, things.house, body, { by: caller.by, now });
  return { status: 201, body: made, subject: `${things.house.slug}/${made.id}` };
});
