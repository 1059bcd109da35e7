/** Runs a house from its last step to now, through every instant in between at which something was due. */
import { takeCommands } from './commands';
import { extendLease, noteRelay } from './counting';
import { faultsNow } from './faults';
import { fit } from './fit';
import { isLull, lullSince } from './lull';
import { MEMORY_VERSION, type Memory, type PointMemory } from './memory';
import type { Plan } from './plan';
import { silenceAhead, takeReading } from './quality';
import { takeRunsAlone } from './ran-alone';
import { copyReadings } from './readings';
import { entry, filled, nextWake, nothingFound, type Run } from './run';
import { settle, settleDecisions, settleReadings, settleUndriven } from './settle';
import type { Observed, Quality } from './types';

export interface Played {
  run: Run;
  memory: Memory;
}

export interface PlayOptions {
  /** Whether switchings carry their ladder. */
  explains: boolean;
  /** A look ahead: the readings stay as they are, no point falls silent and none that is silent speaks. */
  readingsHold?: boolean;
}

/**
 * A late step ends where a punctual one would: rests end, credits run out, least times and hands pass at their own
 * instants, under what was known then. Only what was observed since counts from now.
 */
export function play(
  plan: Plan,
  given: Memory,
  observed: Observed,
  now: number,
  options: PlayOptions,
): Played {
  const memory = fit(plan, given);
  // a clock that went back stands still for control
  const stepAt = memory.at === null ? now : Math.max(now, memory.at);
  const before = lullSince(plan, memory, observed, stepAt);
  const run = begin(plan, memory, observed, stepAt, options, before);
  if (memory.at !== null && memory.at < stepAt) {
    if (observed.workerStartedAt > memory.at) passUndriven(run, memory.at);
    else if (memory.wakeAt !== null && memory.wakeAt < stepAt) pass(run, memory.wakeAt);
  }
  run.at = stepAt;
  for (let index = 0; index < plan.points.length; index += 1) {
    const point = entry(plan.points, index);
    const seen = observed.points[point.id];
    if (seen !== undefined && point.derived === null) takeReading(run, index, seen);
  }
  for (let index = 0; before === null && index < plan.channels.length; index += 1) {
    noteRelay(run, index);
    takeRunsAlone(run, index);
  }
  const taken = takeCommands(run, memory.taken);
  settleReadings(run);
  if (before !== null) {
    if (isLull(run, before)) return { run, memory: remember(run, memory, taken, memory.faults) };
    // from here on everything is found anew, and the step before keeps what it found
    Object.assign(run, nothingFound(plan));
    ownLists(run);
  }
  settleDecisions(run);
  const faults = faultsNow(run, memory.faults);
  return { run, memory: remember(run, memory, taken, faults) };
}

function begin(
  plan: Plan,
  memory: Memory,
  observed: Observed,
  stepAt: number,
  options: PlayOptions,
  before: Run | null,
): Run {
  const found = before ?? nothingFound(plan);
  const run = {
    plan,
    observed,
    at: stepAt,
    stepAt,
    undriven: false,
    awayFrom: null,
    silentAt: options.readingsHold === true ? memory.points.map(heldSilence) : null,
    points: memory.points.slice(),
    readings: copyReadings(memory.readings),
    rules: memory.rules,
    sources: memory.sources,
    channels: memory.channels,
    frost: memory.frost,
    wake: found.wake,
    readingsWake: Infinity,
    due: found.due,
    over: found.over,
    under: found.under,
    usable: before === null ? filled<Quality>(plan.points.length, 'bad') : before.usable.slice(),
    calendars: found.calendars,
    standing: found.standing,
    lowerClaim: found.lowerClaim,
    lowerState: found.lowerState,
    demandClaim: found.demandClaim,
    demandState: found.demandState,
    interlocked: found.interlocked,
    drawRate: found.drawRate,
    drawCount: found.drawCount,
    events: [],
    explains: options.explains,
  };
  if (before === null) ownLists(run);
  return run;
}

/** The memory given is not changed: what a step may write into is its own. */
function ownLists(run: Run): void {
  run.rules = run.rules.slice();
  run.sources = run.sources.slice();
  run.channels = run.channels.slice();
}

const heldSilence = ({ why }: PointMemory): number =>
  why === 'silent' || why === 'worker-was-away' ? -Infinity : Infinity;

/** Through the instants between, under what the last step knew; but leases were renewed and readings fill silences. */
function pass(run: Run, first: number): void {
  const own = run.silentAt;
  for (let channel = 0; channel < run.plan.channels.length; channel += 1) extendLease(run, channel);
  run.silentAt =
    own ?? run.plan.points.map(({ id }, index) => silenceAhead(run, index, run.observed.points[id]));
  for (let at = first; at < run.stepAt; at = nextWake(run)) {
    run.at = at;
    settle(run);
  }
  run.silentAt = own;
}

/** Through a gap of the worker's own: nobody was commanded. */
function passUndriven(run: Run, from: number): void {
  for (let channel = 0; channel < run.plan.channels.length; channel += 1) extendLease(run, channel);
  run.undriven = true;
  run.awayFrom = from;
  for (let at = from; at < run.stepAt; at = nextWake(run)) {
    run.at = at;
    settleUndriven(run);
  }
  run.undriven = false;
}

function remember(run: Run, memory: Memory, taken: number, faults: Memory['faults']): Memory {
  const wake = nextWake(run);
  return {
    version: MEMORY_VERSION,
    at: run.stepAt,
    wakeAt: wake === Infinity ? null : wake,
    shape: run.plan.shape,
    taken,
    points: run.points,
    readings: run.readings,
    rules: run.rules,
    sources: run.sources,
    channels: run.channels,
    frost: run.frost,
    faults,
    parked: memory.parked,
  };
}
