import * as jobs from '@/db/queries/heap-job';
import { serve } from '@/lib/server/guard';
import { amendHeapJob, removeHeapJob } from '@/lib/server/operations/heap-year';

export const PATCH = serve(amendHeapJob, async ({ holding, things, body, caller, now }) => ({
  body: await jobs.amendHeapJob(holding, things.house.id, things.job, body, { by: caller.by, now }),
}));

export const DELETE = serve(removeHeapJob, async ({ holding, things, now }) => {
  await jobs.removeHeapJob(holding, things.job.id, now);
  return { subject: things.job.title };
});
