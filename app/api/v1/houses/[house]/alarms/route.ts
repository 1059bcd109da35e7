import { alarmList } from '@/lib/server/alarm-answer';
import { serve } from '@/lib/server/guard';
import { listHouseAlarms } from '@/lib/server/operations/record';

export const GET = serve(listHouseAlarms, async ({ holding, things, query }) => ({
  body: await alarmList(holding, query, things.house.id),
}));
