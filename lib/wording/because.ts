/** Why a channel stands as it does, in one or two plain sentences, from the reason that the core gave as data. */
import type { Reasons } from '@/lib/control/because';
import { CLAIMS, type Claim } from '@/lib/control/types';
import * as held from './because-held';
import * as night from './because-night';
import { withInstants, type Scene } from './scene';

type Words = { [Name in Claim]: (reason: Partial<Reasons[Name]>, scene: Scene) => string };

const WORDS: Words = {
  'lock-out': held.lockOutWords,
  interlock: held.interlockWords,
  limit: held.limitWords,
  proving: held.provingWords,
  'short-cycle': held.shortCycleWords,
  hand: night.handWords,
  'source-guard': held.sourceGuardWords,
  frost: night.frostWords,
  'fail-safe': held.failSafeWords,
  rest: night.restWords,
  band: night.bandWords,
  idle: night.idleWords,
};

/** Decisions without a switching were once kept by their claim alone. */
const UNTOLD = 'No more was kept of it than this.';

export function isClaim(value: string): value is Claim {
  return (CLAIMS as readonly string[]).includes(value);
}

/**
 * @param because as the core gave it, or as it came over the wire with its instants in ISO
 * @example becauseWords('band', {…}, scene) reads "The bench is at 3.6 °C, under 4.0 °C. Stops above 7.5 °C."
 */
export function becauseWords(claim: string, because: unknown, scene: Scene): string {
  if (!isClaim(claim)) return '';
  const reason = withInstants(because);
  if (typeof reason !== 'object' || reason === null || Object.keys(reason).length === 0) return UNTOLD;
  // a reason kept by an older release may lack fields, so every field is optional to the words
  const words: (reason: object, scene: Scene) => string = WORDS[claim];
  return words(reason, scene);
}
