import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { duration, moment } from '@/lib/units/time';
import { alarmWords } from '@/lib/wording/alarm';
import type { Scene } from '@/lib/wording/scene';
import type { ShownAlarm } from './alarm-card';

export interface PastAlarm extends ShownAlarm {
  clearedAt: number | null;
  events: { kind: 'raised' | 'acknowledged' | 'cleared'; note: string | null }[];
}

/** Alarms that have ended: what it was, when, how long, who had it. */
export function History({ alarms, scene }: { alarms: PastAlarm[]; scene: Scene }) {
  const when = (at: number) => moment(at, scene.now, scene.zone, scene.preferences);
  return (
    <Table
      caption="Alarms that have ended"
      captionHidden
      columns={[
        { key: 'what', label: 'Alarm' },
        { key: 'from', label: 'Began', figure: true },
        { key: 'for', label: 'Stood for', figure: true },
        { key: 'who', label: 'Taken on by', wideOnly: true },
      ]}
    >
      {alarms.map((alarm) => {
        const words = alarmWords(alarm, scene);
        const note = alarm.events.find((event) => event.kind === 'acknowledged')?.note ?? null;
        return (
          <Row key={alarm.id}>
            <RowHead className="min-w-40 font-normal!">
              {words.title}
              {note === null || note === '' ? null : (
                <span className="block break-words text-[0.9rem] text-soft">{note}</span>
              )}
            </RowHead>
            <Cell figure>{when(alarm.raisedAt)}</Cell>
            <Cell figure>
              {alarm.clearedAt === null ? '' : duration((alarm.clearedAt - alarm.raisedAt) / 1000)}
            </Cell>
            <Cell wideOnly>{alarm.acknowledgedBy ?? 'nobody'}</Cell>
          </Row>
        );
      })}
    </Table>
  );
}
