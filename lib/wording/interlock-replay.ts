/** What a drafted interlock would do, in words: a contradiction before it is sent, and what it would have prevented. */
import { needsCycle } from '@/lib/control/interlocks';
import { nightLabel } from '@/lib/units/time';
import { counted } from './counts';
import { midSentence } from './rule-names';
import { exactly } from './settings';

interface Lock {
  channel: string;
  kind: 'never-with' | 'needs';
  other: string;
}

/** Why it would be refused, as the server would say it; null where it would not be. */
export function interlockRefusal(
  drafted: Lock,
  others: readonly Lock[],
  labelOf: (key: string) => string,
): string | null {
  const label = (key: string) => midSentence(labelOf(key));
  if (drafted.channel === drafted.other) return 'A channel cannot be interlocked with itself.';
  const turned = ({ channel, other }: Lock) => channel === drafted.other && other === drafted.channel;
  const same = ({ channel, other }: Lock) => channel === drafted.channel && other === drafted.other;
  for (const one of others.filter((lock) => same(lock) || turned(lock))) {
    if (one.kind === drafted.kind && (drafted.kind === 'never-with' || same(one)))
      return 'These two channels are interlocked like this already.';
    if (one.kind !== drafted.kind)
      return `The ${label(drafted.channel)} and the ${label(drafted.other)} would need each other and never run together.`;
  }
  if (drafted.kind !== 'needs') return null;
  const [first, ...ring] = needsCycle([drafted, ...others.filter((one) => one.kind === 'needs')]);
  if (first === undefined) return null;
  return `Each would wait for the next: the ${[first, ...ring, first].map(label).join(' needs the ')}.`;
}

export interface ReplayTold {
  nights: { night: string; count: number; seconds: number }[];
  count: number;
  seconds: number;
}

/** @example "In the last seven nights it would have prevented three times together, 42 min: two on 26 Nov, one on 28 Nov." */
export function replayWords({ nights, count, seconds }: ReplayTold, kind: Lock['kind']): string {
  const over = nights.length === 1 ? 'In the last night' : `In the last ${counted(nights.length, 'night')}`;
  if (count === 0)
    return `${over} it would have prevented nothing: ${kind === 'needs' ? 'the one never ran without the other' : 'the two never ran together'}.`;
  const told = nights
    .filter((one) => one.count > 0)
    .map((one) => `${nightLabel(one.night)} ${exactly(one.seconds)}`);
  const what = kind === 'needs' ? 'a run without what it needs' : 'both at once';
  return `${over} it would have prevented ${what} ${count === 1 ? 'once' : `${count} times`}, ${exactly(seconds)} in all: ${told.join(', ')}. What the loads would have done instead is not played through.`;
}
