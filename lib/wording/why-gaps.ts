/** Hours in which control did not run, beside the answer to "why": one line however often it was, and all of them behind it. */
import { duration } from '@/lib/units/time';
import { begin, timeWords, type Scene } from './scene';
import { becauseInstant } from './instants';

/** As it stands on the wire; `to` null: control does not run now. */
export interface Gap {
  from: string;
  to: string | null;
}

interface Over {
  from: number;
  to: number;
}

/**
 * That control does not run now, which makes the answer an old one; null: it runs.
 * @example "Control has not run since 02:10: what is shown is how things stood then."
 */
export function gapNowWords(gaps: readonly Gap[], scene: Scene): string | null {
  const open = gaps.find(({ to }) => to === null);
  if (open === undefined) return null;
  const began = timeWords(becauseInstant(open.from), scene) ?? '';
  return `Control has not run since ${began}: what is shown is how things stood then.`;
}

/**
 * What is over, in one sentence; null: control ran all the time.
 * @param isPast of a moment that is over, whose last gap need not be the newest there was
 * @example "Control was not running 3 times since 00:40, the longest from 02:10 to 02:14, the last from 05:00 to 05:02:
 * nothing was decided in those times."
 */
export function gapsOverWords(gaps: readonly Gap[], scene: Scene, isPast = false): string | null {
  const over = overIn(gaps);
  const [first] = over;
  const last = over.at(-1);
  if (first === undefined || last === undefined) return null;
  if (over.length === 1)
    return `Control was not running ${spanWords(first, scene)}: nothing was decided in that time.`;
  const began = timeWords(first.from, scene) ?? '';
  const within = isPast ? `between ${began} and ${timeWords(last.to, scene) ?? ''}` : `since ${began}`;
  // of equal ones the last, which is then named once
  const longest = over.reduce((best, one) => (lengthOf(one) >= lengthOf(best) ? one : best));
  const which =
    longest === last
      ? `the last and longest ${spanWords(last, scene)}`
      : `the longest ${spanWords(longest, scene)}, the last ${spanWords(last, scene)}`;
  return `Control was not running ${over.length} times ${within}, ${which}: nothing was decided in those times.`;
}

/** All that is over, the first first; empty where the one sentence says all. @example "From 02:10 to 02:14" */
export function gapLines(gaps: readonly Gap[], scene: Scene): string[] {
  const over = overIn(gaps);
  return over.length < 2 ? [] : over.map((one) => begin(spanWords(one, scene)));
}

function overIn(gaps: readonly Gap[]): Over[] {
  return gaps
    .flatMap((gap) => {
      const from = becauseInstant(gap.from);
      const to = becauseInstant(gap.to);
      return from === null || to === null ? [] : [{ from, to }];
    })
    .sort((a, b) => a.from - b.from);
}

const lengthOf = ({ from, to }: Over): number => to - from;

/** A restart that is over within its minute has no two times to tell, but a length. */
function spanWords(gap: Over, scene: Scene): string {
  const began = timeWords(gap.from, scene) ?? '';
  const ended = timeWords(gap.to, scene) ?? '';
  return began === ended ? `at ${began} for ${duration(lengthOf(gap) / 1000)}` : `from ${began} to ${ended}`;
}
