/** A step beside one that finds everything anew from the same memory: the two must say the same. */
import { expect } from 'vitest';
import type { Memory } from '@/lib/control/memory';
import type { Plan } from '@/lib/control/plan';
import { step } from '@/lib/control/step';
import type { StepResult } from '@/lib/control/step-result';
import type { Observed } from '@/lib/control/types';

/** Nothing is known of a plan that was never stepped, so this settles everything. */
const anew = (plan: Plan): Plan => ({ ...plan });

const all = (result: StepResult) => ({
  memory: result.memory,
  channels: result.channels,
  points: result.points,
  sources: result.sources,
  faults: result.faults,
  // what comes next is tried on the core when it is read: dozens of steps a switching
  events: result.events.map((event) =>
    'explanation' in event ? [event.kind, event.at, event.explanation.ladder] : event,
  ),
  wakeAt: result.wakeAt,
});

export function stepBoth(plan: Plan, memory: Memory, observed: Observed, now: number): StepResult {
  const result = step(plan, memory, observed, now);
  expect(all(result)).toEqual(all(step(anew(plan), memory, observed, now)));
  return result;
}
