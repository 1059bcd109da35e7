/** Why a reading is not good, since when, and when it was again, in words. The causes are the core's (lib/control/quality.ts). */
import { UNSTEADY } from '@/lib/control/unsteady';
import { moment } from '@/lib/units/time';
import type { Scene } from './scene';

const causes: Record<string, string> = {
  silent: 'silent',
  'never-spoke': 'never heard',
  'out-of-range': 'out of its range',
  'one-wire-fault': 'its cable or plug is bad',
  'too-fast': 'changes too fast to be true',
  frozen: 'has not moved',
  unsteady: 'comes and goes',
  'input-bad': 'a point it is made of is not trusted',
  'worker-was-away': 'not heard since the worker began',
};

export interface Doubted {
  quality: 'good' | 'uncertain' | 'bad';
  why: string | null;
  /** Epoch ms; null where it is not known. */
  since?: number | null;
}

type When = Pick<Scene, 'now' | 'zone' | 'preferences'>;

const timeWords = (at: number, { now, zone, preferences }: When): string =>
  moment(at, now, zone, preferences);

/** @example causeWords('one-wire-fault') === 'its cable or plug is bad' */
export const causeWords = (why: string | null): string =>
  why === null ? 'not trusted' : (causes[why] ?? why.replaceAll('-', ' '));

/** @example qualityWords({ quality: 'bad', why: 'silent', since }, scene) === 'not trusted since 02:10: silent'; a good reading says nothing */
export function qualityWords({ quality, why, since = null }: Doubted, scene: When): string | null {
  if (quality === 'good') return null;
  const cause = why === null ? '' : `: ${causeWords(why)}`;
  const from = since === null ? '' : ` since ${timeWords(since, scene)}`;
  return `${quality === 'bad' ? 'not trusted' : 'not sure'}${from}${cause}`;
}

export interface PastDoubt {
  why: string | null;
  /** Epoch ms. */
  from: number;
  to: number;
}

/** @example backWords(doubt, scene) === 'came back 02:40; silent from 02:10' */
export function backWords({ why, from, to }: PastDoubt, scene: When): string {
  return `came back ${timeWords(to, scene)}; ${causeWords(why)} from ${timeWords(from, scene)}`;
}

const COUNTS = ['no', 'one', 'two', 'three', 'four', 'five'];

/** The rule for a point that comes and goes, wherever one is spoken of. */
export const UNSTEADY_WORDS = `It dropped out ${COUNTS[UNSTEADY.drops] ?? UNSTEADY.drops} times within an hour. It is believed again once it has been good for ${UNSTEADY.goodForMs / 60_000} min without a break; until then rules use their stand-in, and only frost listens to it.`;
