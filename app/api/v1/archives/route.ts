import { listArchives as list } from '@/db/queries/archive';
import { serve } from '@/lib/server/guard';
import { listArchives } from '@/lib/server/operations/archives';

export const GET = serve(listArchives, async ({ holding }) => ({
  body: { items: await list(holding), next: null },
}));
