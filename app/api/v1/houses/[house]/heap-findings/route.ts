import { serve } from '@/lib/server/guard';
import { findingsOfHeap } from '@/lib/server/heap-findings';
import { listHeapFindings } from '@/lib/server/operations/heap';

export const GET = serve(listHeapFindings, async ({ holding, things, query, now }) => ({
  body: { items: await findingsOfHeap(holding, things.house, query.source, now), next: null },
}));
