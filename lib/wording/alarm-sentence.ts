/** How the alarms of a house stand, for the head of their page. */
import { alarmWords, byGravity, type AlarmFacts } from './alarm';
import { capital, counted, countWord } from './counts';
import { join, sentences } from './join';
import type { Phrase } from './phrase';
import type { Scene } from './scene';

export interface StandingAlarm extends AlarmFacts {
  acknowledgedBy: string | null;
}

/** @example "Two alarms stand. Frost near: the bench fell to 1.8 °C. Nobody has taken it on yet." */
export function alarmSentence(standing: readonly StandingAlarm[], scene: Scene): Phrase[] {
  const [first] = byGravity(standing);
  if (first === undefined) return [{ text: 'Nothing is asking for you.', tone: 'strong' }];
  const words = alarmWords(first, scene);
  const open = standing.filter((alarm) => alarm.acknowledgedBy === null).length;
  return sentences(
    standing.length === 1 ? [] : [`${capital(counted(standing.length, 'alarm'))} stand.`],
    [{ text: `${words.title}.`, tone: words.level }],
    join(taken(standing.length, open, first.acknowledgedBy)),
  );
}

function taken(standing: number, open: number, by: string | null): string {
  if (standing === 1) return open === 1 ? 'Nobody has taken it on yet.' : `${by ?? 'Somebody'} has it.`;
  if (open === 0) return 'Somebody has taken on each of them.';
  return open === standing
    ? 'Nobody has taken them on yet.'
    : `${capital(countWord(open))} of them ${open === 1 ? 'waits' : 'wait'} for somebody.`;
}
