import * as jobs from '@/db/queries/heap-job';
import { serve } from '@/lib/server/guard';
import { createHeapJob, listHeapJobs } from '@/lib/server/operations/heap-year';

export const GET = serve(listHeapJobs, async ({ holding, things, query }) => ({
  body: { items: await jobs.listHeapJobs(holding, things.house.id, query.source), next: null },
}));

export const POST = serve(createHeapJob, async ({ holding, things, body, caller, now }) => ({
  status: 201,
  body: await jobs.createHeapJob(holding, things.house.id, body, { by: caller.by, now }),
}));
