import { classes } from '@/components/ui/classes';
import { clock, duration } from '@/lib/units/time';
import { alarmWords, type AlarmFacts } from '@/lib/wording/alarm';
import { kindWord } from '@/lib/wording/heap';
import type { Scene } from '@/lib/wording/scene';

export interface OpenedAlarm extends AlarmFacts {
  id: string;
  clearedAt: number | null;
}

export interface OpenedEntry {
  id: string;
  at: number;
  kind: string;
  text: string;
}

/** What rang in a night, and what was written into the heap book. */
export function Happenings({
  alarms,
  entries,
  scene,
}: {
  alarms: OpenedAlarm[];
  entries: OpenedEntry[];
  scene: Scene;
}) {
  const time = (at: number) => (
    <time dateTime={new Date(at).toISOString()} className="w-20 shrink-0 font-mono text-[0.95rem] text-soft">
      {clock(at, scene.zone, scene.preferences)}
    </time>
  );
  return (
    <>
      <section>
        <h3 className="pb-1 font-semibold">Alarms</h3>
        {alarms.length === 0 ? (
          <p className="border-t border-line py-1.5 text-soft">None stood.</p>
        ) : (
          <ul className="border-t border-line">
            {alarms.map((alarm) => {
              const { title, level } = alarmWords(alarm, scene);
              const end = alarm.clearedAt;
              return (
                <li key={alarm.id} className="flex gap-3 border-b border-faint py-1.5">
                  {time(alarm.raisedAt)}
                  <span>
                    <span
                      className={classes('font-semibold', level === 'alarm' ? 'text-alarm' : 'text-warn')}
                    >
                      {title}
                    </span>
                    <span className="text-soft">
                      {end === null ? ', still stands' : `, stood ${duration((end - alarm.raisedAt) / 1000)}`}
                    </span>
                  </span>
                </li>
              );
            })}
          </ul>
        )}
      </section>
      {entries.length === 0 ? null : (
        <section>
          <h3 className="pb-1 font-semibold">In the heap book</h3>
          <ul className="border-t border-line">
            {entries.map((entry) => (
              <li key={entry.id} className="flex gap-3 border-b border-faint py-1.5">
                {time(entry.at)}
                <span className="min-w-0 break-words">
                  <span className="font-semibold">{kindWord(entry.kind)}</span>
                  {entry.text === '' ? '' : `: ${entry.text}`}
                </span>
              </li>
            ))}
          </ul>
        </section>
      )}
    </>
  );
}
