/** A house as it would be if something were otherwise, and what then comes by the clock alone. */
import type { Memory } from './memory';
import type { Plan } from './plan';
import { play } from './play';
import { entry, type Run } from './run';
import type { Claim, Observed, State } from './types';

/**
 * Instants looked at: what does not come within so many is too far to be foreseen, and each costs a step. A rule that goes by
 * the hour wakes its house 24 times a day, and what comes of it within the day is to be found behind them.
 */
const WAKES = 48;

export interface Told {
  at: number;
  state: State;
  claim: Claim;
}

export interface Changes {
  change: Told | null;
  flip: Told | null;
  claim: Claim;
  isKnown: boolean;
  /** Where the look ended, to go on from. */
  end: Future;
}

/** How a channel stands in a future that is settled at one instant. */
export interface Future extends Told {
  plan: Plan;
  run: Run;
  memory: Memory;
  channel: number;
  startedAt: number;
}

/**
 * The future in which nothing is otherwise: only that nobody reports or is unplugged in it. It begins a millisecond on,
 * where a reading that is tried would come: frost that begins then is after an order of this instant.
 */
export function asItIs(run: Run, memory: Memory, channel: number): Future {
  const own = run.plan.partOf[channel];
  // loads that can never turn this one are kept still: their draws and rests would be played through for nothing
  const still = [{ id: '', why: '', by: '', placedAt: run.at }];
  const channels = memory.channels.map((one, place) => {
    const { lockouts } = one;
    return { ...one, relay: null, lockouts: run.plan.partOf[place] === own ? lockouts : still };
  });
  const startedAt = run.observed.workerStartedAt;
  return settled(run.plan, { ...memory, channels }, channel, (memory.at ?? run.at) + 1, startedAt);
}

/** The same instant with another memory, or another plan. */
export function ifInstead(future: Future, change: { memory?: Partial<Memory>; plan?: Plan }): Future {
  const { plan, memory, channel, at, startedAt } = future;
  return settled(change.plan ?? plan, { ...memory, ...change.memory }, channel, at, startedAt);
}

function settled(plan: Plan, before: Memory, channel: number, at: number, startedAt: number): Future {
  const observed: Observed = { workerStartedAt: startedAt, points: {}, relays: {}, commands: [] };
  const { run, memory } = play(plan, before, observed, at, { explains: false, readingsHold: true });
  const { wanted, claim } = entry(memory.channels, channel);
  return { plan, run, memory, channel, startedAt, at, state: wanted, claim: claim ?? 'idle' };
}

/**
 * What time alone brings up to `until`: the first change of state or claim, the first change of state, and the claim in
 * force at the first change of state, or at `until`.
 * @returns null for what does not come by then; `isKnown` is false where it was not looked that far
 */
export function changesBy(future: Future, until: number, wakes = WAKES): Changes {
  let change: Told | null = null;
  let now = future;
  for (let look = 0; ; look += 1) {
    const { wakeAt } = now.memory;
    if (wakeAt === null || wakeAt > until)
      return { change, flip: null, claim: now.claim, isKnown: true, end: now };
    if (look === wakes) return { change, flip: null, claim: now.claim, isKnown: false, end: now };
    now = settled(now.plan, now.memory, now.channel, wakeAt, now.startedAt);
    const { at, state, claim } = now;
    if (claim !== future.claim || state !== future.state) change ??= { at, state, claim };
    if (state !== future.state) return { change, flip: { at, state, claim }, claim, isKnown: true, end: now };
  }
}
