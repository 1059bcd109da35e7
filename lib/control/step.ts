/** The heart: what runs now, why, and when to look again. */
import { addLookAhead } from './look-ahead';
import { rememberStep } from './lull';
import type { Memory } from './memory';
import type { Plan } from './plan';
import { play } from './play';
import { channelResult, pointResult, sourceResult } from './results';
import type { Run } from './run';
import type { StepResult } from './step-result';
import type { ControlEvent, Fault } from './events';
import type { ChannelResult, PointResult, SourceResult } from './step-result';
import type { Observed } from './types';

/**
 * Decides every channel of a house at `now` (epoch ms). Level-triggered: the same inputs give the same outputs, a
 * step with nothing new gives no event, and where things end does not depend on how often it is called. Neither the
 * memory nor the plan that it is given is changed. Throws only for a plan or memory that is none.
 *
 * @example const { memory, channels, wakeAt } = step(compile(config), emptyMemory(), observed, now)
 */
export function step(plan: Plan, memory: Memory, observed: Observed, now: number): StepResult {
  const { run, memory: next } = play(plan, memory, observed, now, { explains: true });
  rememberStep(run, next);
  return new Answer(run, next);
}

/**
 * Reasons, points and sources are reckoned when somebody looks: a replay of a winter never does. What each channel is to
 * do and by which claim stands in the memory as well.
 */
class Answer implements StepResult {
  readonly memory: Memory;
  readonly faults: Fault[];
  readonly events: ControlEvent[];
  readonly wakeAt: number | null;
  readonly #run: Run;
  #channels: ChannelResult[] | null = null;
  #points: PointResult[] | null = null;
  #sources: SourceResult[] | null = null;

  constructor(run: Run, memory: Memory) {
    this.#run = run;
    this.memory = memory;
    this.faults = memory.faults;
    this.events = run.events.length === 0 ? run.events : tellEvents(run, memory);
    this.wakeAt = memory.wakeAt;
  }

  get channels(): ChannelResult[] {
    this.#channels ??= this.#run.channels.map((_, index) => channelResult(this.#run, index));
    return this.#channels;
  }

  get points(): PointResult[] {
    this.#points ??= this.#run.plan.points.map((_, index) => pointResult(this.#run, index));
    return this.#points;
  }

  get sources(): SourceResult[] {
    this.#sources ??= this.#run.plan.sources.map((_, index) => sourceResult(this.#run, index));
    return this.#sources;
  }
}

/** Decisions that a later one of the same step overtook are marked; the others learn what comes next. */
function tellEvents(run: Run, memory: Memory): ControlEvent[] {
  const switched = new Map<string, ControlEvent>();
  const decided = new Map<string, ControlEvent>();
  for (const event of run.events) {
    if (event.kind === 'switching') switched.set(event.channel, event);
    if (event.kind === 'switching' || event.kind === 'decision') decided.set(event.channel, event);
  }
  return run.events.map((event) => {
    if (event.kind !== 'switching' && event.kind !== 'decision') return event;
    if (event.kind === 'switching' && switched.get(event.channel) !== event)
      return { ...event, overtaken: true };
    // what comes next is reckoned from where the step ends, so only for what still holds there
    if (decided.get(event.channel) !== event) return event;
    return { ...event, explanation: addLookAhead(run, memory, event.explanation) };
  });
}
