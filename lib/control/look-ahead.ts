/**
 * What comes next for a channel: by the clock alone, by a reading that passes a threshold, and by what somebody does.
 * Nothing here reasons about the claims: each candidate is tried on the core itself, and told only if it would change
 * what runs, when, or what decides.
 */
import { isAskedFor } from './condition-thresholds';
import type { NextIf, NextReason, NextThen } from './next';
import { eventsAhead } from './events-ahead';
import type { Memory } from './memory';
import { entry, type Run } from './run';
import { moved } from './moved';
import type { Threshold } from './threshold';
import { thresholdsOf } from './thresholds';
import type { Explanation } from './events';
import { CLAIMS, type Data } from './types';
import { asItIs, changesBy, ifInstead, type Future, type Told } from './what-if';

const AHEAD_MS = 24 * 3_600_000;
/** What a reading sets going comes within a few instants: a least time, two minutes without gain, a delay. */
const NEAR_WAKES = 5;

/** What an explanation's look ahead starts from, and what it found. */
interface Ahead {
  run: Run;
  memory: Memory;
  told: Explanation;
  next: Data[] | null;
}

/**
 * One getter for all: an object with a getter of its own gets a hidden class of its own, and that keeps the whole step
 * alive until the next great collection of garbage.
 */
const NEXT = {
  enumerable: true,
  get(this: { ahead: Ahead }): Data[] {
    const { ahead } = this;
    // reasons are plain JSON by their types; an interface only lacks the index that Data asks for
    ahead.next ??= whatNext(ahead.run, ahead.memory, ahead.told).map((one) => one as unknown as Data);
    return ahead.next;
  },
};

/**
 * Adds what follows to an explanation of the instant at which `run` stands. It costs some dozens of steps, so it is
 * reckoned when somebody reads it: a replay of a winter never does. @param memory as the step left it
 */
export function addLookAhead(run: Run, memory: Memory, told: Explanation): Explanation {
  const ahead: Ahead = { run, memory, told, next: null };
  return Object.defineProperties({ ...told }, { ahead: { value: ahead }, next: NEXT });
}

function whatNext(run: Run, memory: Memory, { channel: id, state, claim }: Explanation): NextReason[] {
  const channel = memory.channels.findIndex((one) => one.id === id);
  if (channel < 0) return [];
  const base = asItIs(run, memory, channel);
  const events = eventsAhead(run, base, { state, claim }, base.at + AHEAD_MS);
  // it waits for a relay's report: what comes of readings cannot be said before
  if (base.state !== state || base.claim !== claim) return events;
  const { change, flip } = changesBy(base, base.at + AHEAD_MS);
  const thens = [change, flip].flatMap((one, place, both): NextThen[] =>
    one === null || (place === 1 && both[0]?.at === one.at) ? [] : [{ kind: 'then', ...one }],
  );
  const thresholds = thresholdsOf(run, channel, flip?.at ?? null);
  const ifs = thresholds.flatMap((one) => tried(base, flip, one, amidst(run, one, thresholds)));
  return [...thens, ...nearest(ifs, base.at), ...events];
}

/** What a reading past the threshold would bring; nothing: no news. */
function tried(base: Future, flip: Told | null, threshold: Threshold, among: Amidst): NextIf[] {
  const { point, side, value, orAt, of } = threshold;
  const step = (side === 'above' ? 1 : -1) * 1e-6 * Math.max(1, Math.abs(value));
  const exactly = orAt && threshold.isEqual;
  const outcome = outcomeOf(base, flip, threshold, orAt ? value : value + step);
  // where somebody asks for the value itself, it can bring what no other on that side does
  if (exactly || (orAt && among.isMet)) {
    const isAsPast = isSame(outcomeOf(base, flip, threshold, value + step), outcome);
    if (exactly && isAsPast) return [];
    if (!exactly && !isAsPast)
      return [{ isEqual: true }, { orAt: false }].flatMap((change) =>
        tried(base, flip, { ...threshold, ...change }, among),
      );
  }
  if (outcome === null) return [];
  const keepsState = outcome.state === base.state;
  // with nothing else to come, another claim for the same state is news only where it is the deciding one that lets go
  const letsGo = of === base.claim && CLAIMS.indexOf(outcome.claim) > CLAIMS.indexOf(base.claim);
  if (keepsState && flip === null && !letsGo) return [];
  // what a threshold on the way there brings already is told of that one
  const near = orAt ? value - step : value;
  const isSure = among.isAlone && outcome.at === base.at;
  if (!isSure && isSame(outcomeOf(base, flip, { ...threshold, overTime: true }, near), outcome)) return [];
  const key = point === null ? null : entry(base.plan.points, point).key;
  const told: NextIf = {
    ...{ kind: 'if', point: key, side, value },
    ...(orAt ? { orAt } : {}),
    ...(exactly ? { exactly } : {}),
    ...(outcome.at > base.at ? { at: outcome.at } : {}),
    ...(flip !== null && outcome.at > flip.at ? { later: true } : {}),
    ...{ state: outcome.state, claim: outcome.claim },
  };
  return [told];
}

interface Amidst {
  /** No other threshold lies on the way to it: none of its point, of the coldest, or of a point made of others. */
  isAlone: boolean;
  /** A condition asks whether some point is at the same value, be it another load's, which this one gives way to. */
  isMet: boolean;
}

function amidst(run: Run, one: Threshold, all: readonly Threshold[]): Amidst {
  const isMade = ({ point }: Threshold) => point === null || entry(run.plan.points, point).derived !== null;
  const others = all.filter((other) => other !== one);
  return {
    isAlone: others.every((other) => other.point !== one.point && !isMade(other) && !isMade(one)),
    isMet: isAskedFor(run, one.value),
  };
}

/** What a channel does differently when a reading is `value`. */
function outcomeOf(base: Future, flip: Told | null, threshold: Threshold, value: number): Told | null {
  const future = ifInstead(base, moved(base, threshold, value));
  if (future.state !== base.state) return future;
  if (flip === null && future.claim !== base.claim) return future;
  if (!threshold.overTime && !isMoved(base, future)) return null;
  const horizon = base.at + AHEAD_MS;
  const other = flip === null ? changesBy(future, horizon, NEAR_WAKES) : changesBy(future, flip.at);
  // that another claim does the same at the same time is no news
  if (other.flip !== null && other.flip.at === flip?.at) return null;
  if (other.flip !== null || flip === null || !other.isKnown) return other.flip;
  // what was to come by the clock does not: later, or not at all
  const later = changesBy(other.end, horizon, NEAR_WAKES);
  return later.flip ?? { at: flip.at, state: base.state, claim: other.claim };
}

const isSame = (a: Told | null, b: Told | null): boolean =>
  a !== null && b !== null && a.at === b.at && a.state === b.state && a.claim === b.claim;

/** Whether a reading has turned anything in the house that bears on the channel, beside its own value. */
function isMoved(base: Future, { run, claim }: Future): boolean {
  const { source } = entry(base.plan.channels, base.channel);
  const before = base.run;
  if (claim !== base.claim || run.frost.on !== before.frost.on) return true;
  if (run.standing.some((standing, rule) => standing !== before.standing[rule])) return true;
  if (run.channels.some((one, place) => one.overHighLimit !== before.channels[place]?.overHighLimit))
    return true;
  return source !== null && entry(run.sources, source) !== entry(before.sources, source);
}

/** Of thresholds of one point that bring the same, the one that is reached first; the soonest first. */
function nearest(ifs: NextIf[], now: number): NextIf[] {
  return ifs
    .filter((one, place) => !ifs.some((other, at) => at !== place && hides(other, one, at < place)))
    .sort((a, b) => (a.at ?? now) - (b.at ?? now));
}

function hides(other: NextIf, one: NextIf, isBefore: boolean): boolean {
  if (other.point !== one.point || other.side !== one.side || other.state !== one.state) return false;
  // a value that may be jumped over says nothing of what lies behind it
  if (other.exactly === true && one.exactly !== true) return false;
  if (other.value !== one.value)
    return one.side === 'above' ? one.value > other.value : one.value < other.value;
  return other.exactly === one.exactly ? isBefore : other.orAt === true;
}
