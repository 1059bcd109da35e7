import { Notice } from '@/components/ui/notice';
import { moment } from '@/lib/units/time';
import { alarmWords, type AlarmFacts } from '@/lib/wording/alarm';
import type { Scene } from '@/lib/wording/scene';
import { TakeOn } from './take-on';

export interface ShownAlarm extends AlarmFacts {
  id: string;
  acknowledgedAt: number | null;
  acknowledgedBy: string | null;
}

/** One standing alarm: what is wrong, what it means, what to do, and who has it. */
export function AlarmCard({
  alarm,
  scene,
  mayAnswer,
}: {
  alarm: ShownAlarm;
  scene: Scene;
  mayAnswer: boolean;
}) {
  const words = alarmWords(alarm, scene);
  const when = (at: number) => moment(at, scene.now, scene.zone, scene.preferences);
  return (
    <Notice
      tone={words.level}
      title={words.title}
      actions={alarm.acknowledgedAt === null && mayAnswer ? <TakeOn alarm={alarm.id} /> : undefined}
    >
      <p>{words.effect}</p>
      <p className="text-ink">{words.remedy}</p>
      <p>
        Since {when(alarm.raisedAt)}.
        {alarm.acknowledgedAt === null
          ? ' Nobody has taken it on.'
          : ` ${alarm.acknowledgedBy ?? 'Somebody'} has it since ${when(alarm.acknowledgedAt)}.`}
      </p>
    </Notice>
  );
}
