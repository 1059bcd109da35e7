import * as schedules from '@/db/queries/report-schedule';
import { serve } from '@/lib/server/guard';
import { removeReportSchedule } from '@/lib/server/operations/money';

export const DELETE = serve(removeReportSchedule, async ({ holding, things, now }) => {
  await schedules.removeReportSchedule(holding, things.schedule.id, now);
  return {};
});
