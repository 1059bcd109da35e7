/** What was done and what rang, as a report tells it: for an insurer, a co-operative's members, or the owner. */
import { moment } from '@/lib/units/time';
import { UNKNOWN } from '@/lib/units/format';
import { alarmWords, type AlarmFacts } from './alarm';
import { capital, counted } from './counts';
import { kindWord } from './heap';
import { rcdWords, type Protection } from './protection';
import { gainWords } from './proving';
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

/** That delivery is not kept is said, so that nobody takes silence for "none". */
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
    rows: [{ name: 'Whether and when letters and calls of alarms were delivered', value: 'not kept yet' }],
  };
}

export interface ProvenChannel {
  label: string;
  provedAt: number | null;
  /** Of its last finished proof; null: none is on record. */
  proof: { by: string; gain: { kelvin: number; sd: number | null; seconds: number } | null } | null;
  protection: Protection | null;
}

/** When each channel was proved, by whom and with what gain, and whether its residual-current device was tested. `today` is YYYY-MM-DD. */
export function provingRows(
  channels: readonly ProvenChannel[],
  today: string,
  scene: Scene,
): { name: string; value: string }[] {
  const proofs = channels.map(({ label, provedAt, proof }) => {
    if (provedAt === null) return { name: `${label}, proved`, value: 'not yet' };
    const when = moment(provedAt, scene.now, scene.zone, scene.preferences);
    const gain = proof?.gain ?? null;
    const found = gain === null ? null : gainWords(gain.kelvin, gain.sd, gain.seconds, scene.preferences);
    const by = proof === null ? ', no record of its steps is kept' : `, by ${proof.by}`;
    return { name: `${label}, proved`, value: `${when}${by}${found === null ? '' : `, ${found}`}` };
  });
  const tests = channels.flatMap(({ label, protection }) =>
    protection === null ? [] : [{ name: `${label}, protection`, value: rcdWords(protection, today) }],
  );
  const none = { name: 'Tests of residual-current devices', value: 'no channel tells of one' };
  return [...proofs, ...(tests.length === 0 ? [none] : tests)];
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
