import { alarmWithEvents } from '@/lib/server/alarm-answer';
import { serve } from '@/lib/server/guard';
import { getAlarm } from '@/lib/server/operations/record';

export const GET = serve(getAlarm, async ({ holding, things }) => ({
  body: await alarmWithEvents(holding, things.alarm),
}));
