/** What was done and what rang, as a report tells it: for an insurer, a co-operative's members, or the owner. */
import { moment } from '@/lib/units/time';
import { UNKNOWN } from '@/lib/units/format';
import { alarmWords, type AlarmFacts } from './alarm';
import { capital, counted } from './counts';
import { kindWord } from './heap';
import type { ReportBlock } from './report';
import type { Scene } from './scene';

export interface ReportAlarm extends AlarmFacts {
  clearedAt: number | null;
  /** Of it, ascending. Epoch ms. */
  events: { at: number; kind: string; by: string | null; note: string | null }[];
}

export interface ReportEntry {
  source: string;
  at: number;
  kind: string;
  text: string;
  by: string;
}

/** Delivery, proving and tests of residual-current devices are said not to be kept, so that nobody takes silence for "none". */
export function alarmsBlock(alarms: readonly ReportAlarm[], scene: Scene): ReportBlock {
  const when = (at: number) => moment(at, scene.now, scene.zone, scene.preferences);
  const answered = alarms.filter((alarm) =>
    alarm.events.some((event) => event.kind === 'acknowledged'),
  ).length;
  return {
    key: 'alarms',
    title: 'Alarms, answers and tests',
    sentence: [
      alarms.length === 0
        ? 'No alarm rang.'
        : `${capital(counted(alarms.length, 'alarm'))} rang; ${counted(answered, 'was', 'were')} answered.`,
    ],
    ...(alarms.length === 0
      ? {}
      : {
          table: {
            head: ['rang', 'alarm', 'answered by', 'what was said', 'over'],
            rows: alarms.map((alarm) => {
              const answer = alarm.events.find((event) => event.kind === 'acknowledged');
              return [
                when(alarm.raisedAt),
                alarmWords(alarm, scene).title,
                answer === undefined ? 'nobody' : `${answer.by ?? UNKNOWN}, ${when(answer.at)}`,
                answer?.note ?? '',
                alarm.clearedAt === null ? 'it still stands' : when(alarm.clearedAt),
              ];
            }),
          },
        }),
    rows: [
      { name: 'Whether and when letters and calls of alarms were delivered', value: 'not kept yet' },
      { name: 'Tests of residual-current devices', value: 'not kept yet' },
    ],
  };
}

/** When each channel's load was seen to follow its relay: what is kept of proving so far. */
export function provingRows(
  channels: readonly { label: string; provedAt: number | null }[],
  scene: Scene,
): { name: string; value: string }[] {
  return channels.map(({ label, provedAt }) => ({
    name: `${label}, proved`,
    value: provedAt === null ? 'not yet' : moment(provedAt, scene.now, scene.zone, scene.preferences),
  }));
}

export function bookBlock(entries: readonly ReportEntry[], scene: Scene): ReportBlock {
  return {
    key: 'book',
    title: 'Heap book',
    ...(entries.length === 0
      ? { sentence: ['Nothing was entered.'] }
      : {
          table: {
            head: ['when', 'heap', 'what', 'note', 'by'],
            rows: entries.map((entry) => [
              moment(entry.at, scene.now, scene.zone, scene.preferences),
              entry.source,
              kindWord(entry.kind),
              entry.text,
              entry.by,
            ]),
          },
        }),
  };
}
