import { alarmList } from '@/lib/server/alarm-answer';
import { serve } from '@/lib/server/guard';
import { listAlarms } from '@/lib/server/operations/record';

export const GET = serve(listAlarms, async ({ holding, query }) => ({
  body: await alarmList(holding, query),
}));
