/** What comes next for a load: line by line, and the nearest of it in one sentence. */
import type { NextIf, NextReason, NextThen, NextWhen } from '@/lib/control/next';
import type { Claim, State } from '@/lib/control/types';
import { isClaim } from './because';
import { CLAIM_NAMES } from './claims';
import {
  begin,
  channelName,
  pointName,
  sourceName,
  timeWords,
  valueOf,
  withInstants,
  type Scene,
} from './scene';

/** Reasons as they came off the wire; what this release does not know is left out. */
export function readNext(next: readonly unknown[]): NextReason[] {
  return next.flatMap((one) => {
    const reason = withInstants(one);
    return isNext(reason) ? [reason] : [];
  });
}

/**
 * What follows, the soonest first.
 * @param present how the load stands, where that is known: then what would keep it so is told as that
 * @example "At 06:06, if no reading changes: the band turns it on." and "If the house air falls under 3.0 °C: frost turns it on."
 */
export function nextWords(next: readonly unknown[], scene: Scene, present?: State): string[] {
  return readNext(next).map((one) => {
    const does = doesWords(one, scene, present);
    if (one.kind === 'then') return `At ${timeWords(one.at, scene) ?? ''}, if no reading changes: ${does}.`;
    const earliest = one.at === undefined ? '' : whenWords(one, one.at, scene, present);
    const asked = one.kind === 'if' ? `if ${passes(one, scene)}` : `when ${happens(one, scene)}`;
    return `${begin(asked)}: ${does}${earliest}.`;
  });
}

/**
 * The nearest of it in one sentence.
 * @example "At 02:14 the band turns it on; sooner if the coldest sensor of the house falls under 3.0 °C."
 */
export function nextSentence(next: readonly unknown[], scene: Scene, present: State): string {
  const known = readNext(next);
  const turns = known.filter((one) => one.state !== undefined && one.state !== present);
  const clock = turns.find((one): one is NextThen => one.kind === 'then');
  const reading = turns.find(
    (one): one is NextIf =>
      one.kind === 'if' && (clock === undefined || one.at === undefined || one.at < clock.at),
  );
  const event = known.find((one): one is NextWhen => one.kind === 'when');
  if (clock !== undefined) {
    const sooner = reading === undefined ? '' : `; sooner if ${passes(reading, scene)}`;
    const held = reading === undefined ? ', if no reading changes' : '';
    return `At ${timeWords(clock.at, scene) ?? ''} ${doesWords(clock, scene, present)}${sooner}${held}.`;
  }
  if (event !== undefined) return `${begin(doesWords(event, scene, present))} when ${happens(event, scene)}.`;
  if (reading !== undefined)
    return `${begin(doesWords(reading, scene, present))} if ${passes(reading, scene)}.`;
  return 'Nothing is foreseen by the clock; a reading or a person may change it.';
}

function whenWords(one: NextIf | NextWhen, at: number, scene: Scene, present: State | undefined): string {
  const time = timeWords(at, scene) ?? '';
  if (one.state === present) return ` beyond ${time}`;
  return one.kind === 'if' && one.later === true
    ? `, but not before ${time}`
    : `, at ${time} at the earliest`;
}

function doesWords({ state, claim }: NextReason, scene: Scene, present: State | undefined): string {
  if (state === undefined || claim === undefined) return 'its rules are asked again';
  const keeps = state === present;
  if (claim === 'idle') return keeps ? `it stays ${state}` : `it goes ${state}`;
  return `${CLAIM_NAMES[claim]} ${keeps ? 'keeps' : 'turns'} it ${state}`;
}

function passes({ point, side, value, orAt, exactly }: NextIf, scene: Scene): string {
  // without a point it is the coldest of the house, which frost looks at
  const who = point === null ? 'the coldest sensor of the house' : pointName(point, scene);
  const moves = side === 'below' ? 'falls' : 'rises';
  const past = exactly === true ? 'to exactly' : orAt === true ? 'to' : side === 'below' ? 'under' : 'above';
  return `${who} ${moves} ${past} ${valueOf(point, value, scene)}`;
}

function happens({ what, other = '', source = '', point = '' }: NextWhen, scene: Scene): string {
  switch (what) {
    case 'unlocked':
      return 'its lock-out is removed';
    case 'given-back':
      return 'it is given back to auto';
    case 'other-off':
      return `${channelName(other, scene)} is off`;
    case 'other-on':
      return `${channelName(other, scene)} is on`;
    case 'ready':
      return `somebody says that ${sourceName(source, scene)} is ready`;
    case 'answers':
      return `${pointName(point, scene)} answers again`;
  }
}

const EVENTS: readonly string[] = [
  'unlocked',
  'given-back',
  'other-off',
  'other-on',
  'ready',
  'answers',
] satisfies NextWhen['what'][];

function isNext(value: unknown): value is NextReason {
  if (typeof value !== 'object' || value === null) return false;
  const one = value as Partial<Record<string, unknown>>;
  const told = isClaimOf(one['claim']) && typeof one['state'] === 'string';
  switch (one['kind']) {
    case 'then':
      return told && typeof one['at'] === 'number';
    case 'if':
      return told && typeof one['value'] === 'number';
    case 'when':
      return typeof one['what'] === 'string' && EVENTS.includes(one['what']) && (told || !('state' in one));
    default:
      return false;
  }
}

const isClaimOf = (claim: unknown): claim is Claim => typeof claim === 'string' && isClaim(claim);
