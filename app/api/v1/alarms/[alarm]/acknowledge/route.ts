import { acknowledgeAlarm as acknowledge } from '@/db/queries/alarm';
import { alarmWithEvents } from '@/lib/server/alarm-answer';
import { serve } from '@/lib/server/guard';
import { acknowledgeAlarm } from '@/lib/server/operations/record';

export const POST = serve(acknowledgeAlarm, async ({ holding, things, body, caller, now }) => {
  const { alarm } = things;
  const taken = await acknowledge(holding, alarm.id, caller.by, now.getTime(), body.note ?? null);
  return { body: await alarmWithEvents(holding, taken ?? alarm), subject: alarm.key };
});
