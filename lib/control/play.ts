/** Runs a house from its last step to now, through every instant in between at which something was due. */
import { takeCommands } from './commands';
import { extendLease, noteRelay } from './counting';
import { faultsNow } from './faults';
import { fit } from './fit';
import { MEMORY_VERSION, type Memory, type PointMemory } from './memory';
import type { Plan } from './plan';
import { silenceAhead, takeReading } from './quality';
import { takeRunsAlone } from './ran-alone';
import { entry, type Run } from './run';
import { settle, settleUndriven } from './settle';
import type { Observed } from './types';

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
  const run = begin(plan, memory, observed, stepAt, options);
  if (memory.at !== null && memory.at < stepAt) {
    if (observed.workerStartedAt > memory.at) passUndriven(run, memory.at);
    else if (memory.wakeAt !== null && memory.wakeAt < stepAt) pass(run, memory.wakeAt);
  }
  run.at = stepAt;
  for (let index = 0; index < plan.points.length; index += 1) {
    const point = entry(plan.points, index);
    const seen = observed.points[point.id];
    if (seen !== undefined && point.derived === null)
      run.points[index] = takeReading(point, entry(run.points, index), seen, stepAt);
  }
  for (let index = 0; index < plan.channels.length; index += 1) {
    noteRelay(run, index);
    takeRunsAlone(run, index);
  }
  const taken = takeCommands(run, memory.taken);
  settle(run);
  const faults = faultsNow(run, memory.faults);
  return { run, memory: remember(run, memory, taken, faults) };
}

function begin(plan: Plan, memory: Memory, observed: Observed, stepAt: number, options: PlayOptions): Run {
  const channels = plan.channels.length;
  return {
    plan,
    observed,
    at: stepAt,
    stepAt,
    undriven: false,
    awayFrom: null,
    silentAt: options.readingsHold === true ? memory.points.map(heldSilence) : null,
    wake: Infinity,
    points: memory.points.slice(),
    rules: memory.rules.slice(),
    sources: memory.sources.slice(),
    channels: memory.channels.slice(),
    frost: memory.frost,
    usable: new Array<Run['usable'][number]>(plan.points.length).fill('bad'),
    calendars: [],
    standing: [],
    lowerClaim: new Array<Run['lowerClaim'][number]>(channels).fill('idle'),
    lowerState: new Array<Run['lowerState'][number]>(channels).fill('off'),
    demandClaim: new Array<Run['demandClaim'][number]>(channels).fill('idle'),
    demandState: new Array<Run['demandState'][number]>(channels).fill('off'),
    interlocked: new Array<Run['interlocked'][number]>(channels).fill(null),
    drawRate: [],
    drawCount: [],
    events: [],
    explains: options.explains,
  };
}

const heldSilence = ({ why }: PointMemory): number =>
  why === 'silent' || why === 'worker-was-away' ? -Infinity : Infinity;

/** Through the instants between, under what the last step knew; but leases were renewed and readings fill silences. */
function pass(run: Run, first: number): void {
  const own = run.silentAt;
  for (let channel = 0; channel < run.plan.channels.length; channel += 1) extendLease(run, channel);
  run.silentAt =
    own ??
    run.plan.points.map((point, index) =>
      silenceAhead(point, entry(run.points, index), run.observed.points[point.id]),
    );
  for (let at = first; at < run.stepAt; at = run.wake) {
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
  for (let at = from; at < run.stepAt; at = run.wake) {
    run.at = at;
    settleUndriven(run);
  }
  run.undriven = false;
}

function remember(run: Run, memory: Memory, taken: number, faults: Memory['faults']): Memory {
  return {
    version: MEMORY_VERSION,
    at: run.stepAt,
    wakeAt: run.wake === Infinity ? null : run.wake,
    shape: run.plan.shape,
    taken,
    points: run.points,
    rules: run.rules,
    sources: run.sources,
    channels: run.channels,
    frost: run.frost,
    faults,
    parked: memory.parked,
  };
}
