/** The words of the why-panel round its reasons: what is asked, since when, what followed, and what is not known. */
import type { State } from '@/lib/control/types';
import { becauseWords, isClaim } from './because';
import { stateWord } from './channel-state';
import { CLAIM_NAMES } from './claims';
import { becauseInstant } from './instants';
import { nextSentence, readNext } from './next';
import { channelName, timeWords, type Scene } from './scene';

export interface Asked {
  channel: { key: string; loadKind: string };
  state: State;
  claim: string;
  /** The moment of the past that is asked about; null: now. */
  at: number | null;
}

/** @example "Why the gate-heap fan is resting", "Why the gate-heap fan was running at 02:00" */
export function whyTitle({ channel, state, claim, at }: Asked, scene: Scene): string {
  const standing = { state, claim, reported: state, lockedOut: claim === 'lock-out' };
  const word = stateWord(standing, channel.loadKind).toLowerCase();
  const name = channelName(channel.key, scene);
  return at === null ? `Why ${name} is ${word}` : `Why ${name} was ${word} at ${timeWords(at, scene) ?? ''}`;
}

/**
 * What is, in the words of its reason. What frost would do is told with what comes next.
 * @param isPast of a moment that is over, what was read "now" was read then
 */
export function whySentence(claim: string, because: unknown, scene: Scene, isPast = false): string {
  if (typeof because !== 'object' || because === null) return becauseWords(claim, because, scene);
  const { frostBreaksBelow: _sooner, ...reason } = because as Record<string, unknown>;
  const words = becauseWords(claim, reason, scene);
  return isPast ? words.replaceAll(' now)', ' then)') : words;
}

/** What comes next, or came: "It ended at 02:14: the band turned it on." */
export function followedWords(
  told: { state: State; claim: string; next: readonly unknown[]; ended: Followed | null },
  scene: Scene,
): string {
  if (told.ended !== null) return endedWords(told.ended, told.state, scene);
  const isBand = told.claim === 'band' || told.claim === 'idle';
  // where a band starts and stops its own reason says
  const news = readNext(told.next).filter(
    (one) => !(isBand && one.kind === 'if' && (one.claim === 'band' || one.claim === 'idle')),
  );
  return isBand && news.length === 0 ? '' : nextSentence(news, scene, told.state);
}

export interface Followed {
  at: string;
  state: State;
  claim: string;
}

function endedWords({ at, state, claim }: Followed, before: State, scene: Scene): string {
  const when = timeWords(becauseInstant(at), scene) ?? '';
  if (!isClaim(claim)) return `It ended at ${when}.`;
  const did =
    claim === 'idle'
      ? `it ${state === before ? 'stayed' : 'went'} ${state}, for nothing wanted it on`
      : `${CLAIM_NAMES[claim]} ${state === before ? 'kept' : 'turned'} it ${state}`;
  return `It ended at ${when}: ${did}.`;
}
