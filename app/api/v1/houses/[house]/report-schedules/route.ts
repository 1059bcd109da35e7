import * as schedules from '@/db/queries/report-schedule';
import { serve } from '@/lib/server/guard';
import { createReportSchedule, listReportSchedules } from '@/lib/server/operations/money';

export const GET = serve(listReportSchedules, async ({ holding, things }) => ({
  body: { items: await schedules.listReportSchedules(holding, things.house.id), next: null },
}));

export const POST = serve(createReportSchedule, async ({ holding, things, body, caller, now }) => ({
  status: 201,
  body: await schedules.createReportSchedule(holding, things.house.id, body, { by: caller.by, now }),
}));
