/** The heart: what runs now, why, and when to look again. */
import { addLookAhead } from './look-ahead';
import type { Memory } from './memory';
import type { Plan } from './plan';
import { play } from './play';
import { channelResult, pointResult, sourceResult } from './results';
import type { Run } from './run';
import type { StepResult } from './step-result';
import type { ControlEvent, Observed } from './types';

/**
 * Decides every channel of a house at `now` (epoch ms). Level-triggered: the same inputs give the same outputs, a
 * step with nothing new gives no event, and where things end does not depend on how often it is called. Neither the
 * memory nor the plan that it is given is changed. Throws only for a plan or memory that is none.
 *
 * @example const { memory, channels, wakeAt } = step(compile(config), emptyMemory(), observed, now)
 */
export function step(plan: Plan, memory: Memory, observed: Observed, now: number): StepResult {
  const { run, memory: next } = play(plan, memory, observed, now, { explains: true });
  return {
    memory: next,
    channels: plan.channels.map((_, index) => channelResult(run, index)),
    // reckoned when somebody looks: a replay of a winter never does
    get points() {
      return plan.points.map((_, index) => pointResult(run, index));
    },
    get sources() {
      return plan.sources.map((_, index) => sourceResult(run, index));
    },
    faults: next.faults,
    events: run.events.length === 0 ? run.events : tellEvents(run, next),
    wakeAt: next.wakeAt,
  };
}

/** Switchings that a later one of the same step overtook are marked; the others learn what comes next. */
function tellEvents(run: Run, memory: Memory): ControlEvent[] {
  const last = new Map<string, ControlEvent>();
  for (const event of run.events) if (event.kind === 'switching') last.set(event.channel, event);
  return run.events.map((event) => {
    if (event.kind !== 'switching') return event;
    if (last.get(event.channel) !== event) return { ...event, overtaken: true };
    return { ...event, explanation: addLookAhead(run, memory, event.explanation) };
  });
}
