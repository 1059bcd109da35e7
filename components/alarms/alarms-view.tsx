import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { byGravity } from '@/lib/wording/alarm';
import { alarmSentence } from '@/lib/wording/alarm-sentence';
import type { Scene } from '@/lib/wording/scene';
import { AlarmCard, type ShownAlarm } from './alarm-card';
import { History, type PastAlarm } from './history';

export function AlarmsView({
  house,
  standing,
  history,
  older,
  isFirstPage,
  scene,
  mayAnswer,
}: {
  house: string;
  standing: ShownAlarm[];
  history: PastAlarm[];
  older: { at: number; id: string } | null;
  isFirstPage: boolean;
  scene: Scene;
  mayAnswer: boolean;
}) {
  return (
    <div className="flex flex-col gap-5">
      <Sentence phrases={alarmSentence(standing, scene)} before="Alarms" />
      {standing.length === 0 ? (
        <p className="max-w-prose text-soft">
          An alarm stands here from when it begins until its cause is gone, with what it means and what to do.
          It is also above everything else on Watch.
        </p>
      ) : (
        // a new one is read out when it comes; what stood before is not said again
        <div aria-live="polite" aria-relevant="additions" className="flex flex-col gap-3">
          {byGravity(standing).map((alarm) => (
            <AlarmCard key={alarm.id} alarm={alarm} scene={scene} mayAnswer={mayAnswer} />
          ))}
        </div>
      )}
      <Panel title="History" note="newest first">
        {history.length === 0 ? (
          <p className="text-soft">No alarm has ended yet.</p>
        ) : (
          <History alarms={history} scene={scene} />
        )}
        <div className="mt-3 flex flex-wrap gap-2 empty:hidden">
          {isFirstPage ? null : <ButtonLink href={`/${house}/alarms`}>Newest</ButtonLink>}
          {older === null ? null : (
            <ButtonLink href={`/${house}/alarms?before=${older.at}.${older.id}`}>Older</ButtonLink>
          )}
        </div>
      </Panel>
    </div>
  );
}
