/** Runs a house from its last step to now, through every instant in between at which something was due. */
import { takeCommands } from './commands';
import { extendLease, noteRelay } from './counting';
import { faultsNow } from './faults';
import { fit } from './fit';
import { pointsStirred, stepBefore } from './lull';
import { MEMORY_VERSION, type Memory, type PointMemory } from './memory';
import type { Plan } from './plan';
import { silenceAhead, takeReading } from './quality';
import { takeRunsAlone } from './ran-alone';
import { copyReadings } from './readings';
import { copyFound, entry, filled, nextWake, nothingFound, type Run } from './run';
import { settleDecisions, settleReadings, settleUndriven } from './settle';
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
  const memory = given.shape === plan.shape ? given : fit(plan, given);
  // a clock that went back stands still for control
  const stepAt = memory.at === null ? now : Math.max(now, memory.at);
  const before = stepBefore(plan, memory, observed);
  const run = begin(plan, memory, observed, stepAt, options, before);
  let isOwn = before === null;
  if (memory.at !== null && memory.at < stepAt) {
    if (observed.workerStartedAt > memory.at) passUndriven(run, memory.at);
    else if (memory.wakeAt !== null && memory.wakeAt < stepAt) {
      if (!isOwn) leaveLull(run);
      isOwn = true;
      pass(run, memory.wakeAt);
    }
  }
  run.at = stepAt;
  for (let index = 0; index < plan.points.length; index += 1) {
    const point = entry(plan.points, index);
    const seen = observed.points[point.id];
    if (seen !== undefined && point.derived === null) takeReading(run, index, seen);
  }
  const taken = before === null ? takeOrders(run, memory.taken) : memory.taken;
  settleReadings(run);
  const points = before === null ? null : pointsStirred(run, before);
  if (!isOwn && points === null && stepAt < run.wake && stepAt < run.due)
    return { run, memory: remember(run, memory, taken, memory.faults) };
  if (!isOwn) leaveLull(run);
  settleDecisions(run, points ?? []);
  const faults = faultsNow(run, memory.faults);
  return { run, memory: remember(run, memory, taken, faults) };
}

/** What relays report and people order, which may bear on anything. Gives the greatest number of an order taken. */
function takeOrders(run: Run, taken: number): number {
  for (let index = 0; index < run.plan.channels.length; index += 1) {
    noteRelay(run, index);
    takeRunsAlone(run, index);
  }
  run.houseWake = -Infinity;
  return takeCommands(run, taken);
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
    readingsWake: before?.readingsWake ?? -Infinity,
    due: found.due,
    partWake: found.partWake,
    partDue: found.partDue,
    houseWake: found.houseWake,
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

/** From here on something is found anew, and the step before keeps what it found. */
function leaveLull(run: Run): void {
  Object.assign(run, copyFound(run));
  ownLists(run);
}

const heldSilence = ({ why }: PointMemory): number =>
  why === 'silent' || why === 'worker-was-away' ? -Infinity : Infinity;

/** Through the instants between, under what the last step knew; but leases were renewed and readings fill silences. */
function pass(run: Run, first: number): void {
  const own = run.silentAt;
  for (let channel = 0; channel < run.plan.channels.length; channel += 1) extendLease(run, channel);
  run.silentAt =
    own ?? run.plan.points.map(({ id }, index) => silenceAhead(run, index, run.observed.points[id]));
  let isAnew = false;
  for (let at = first; at < run.stepAt; at = nextWake(run)) {
    run.at = at;
    if (at >= run.readingsWake) {
      settleReadings(run);
      run.houseWake = -Infinity;
      isAnew = true;
    }
    settleDecisions(run, []);
  }
  // a point that fell silent in between and speaks again is as the step before found it, but not as it was found since
  if (isAnew) run.houseWake = -Infinity;
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
