/**
 * A lull: the time after a settled instant in which everything that was found then still holds, so that a step has
 * only to take its readings. It lasts until a reading crosses a line that somebody looked at (lines.ts) or is of
 * another quality than before, a command or a relay's report comes, or something falls due. The plan remembers the
 * last step for it, as its calendar does its last answers; a step from any other memory, as after a restart, settles
 * everything and gives the same.
 */
import { isBetweenLines } from './lines';
import type { Memory } from './memory';
import type { Plan } from './plan';
import { entry, nextWake, type Run } from './run';
import type { Observed } from './types';

interface LastStep {
  memory: Memory;
  run: Run;
  workerStartedAt: number;
}
const lastSteps = new WeakMap<Plan, LastStep>();

export function rememberStep(run: Run, memory: Memory): void {
  // what was observed is the caller's, who may change it afterwards
  const { workerStartedAt } = run.observed;
  const last = lastSteps.get(run.plan);
  if (last === undefined) lastSteps.set(run.plan, { memory, run, workerStartedAt });
  else {
    last.memory = memory;
    last.run = run;
    last.workerStartedAt = workerStartedAt;
  }
}

/** What was found in the step that left this memory, if it may still hold at `now`; readings may yet end it. */
export function lullSince(plan: Plan, memory: Memory, observed: Observed, now: number): Run | null {
  const last = lastSteps.get(plan);
  // known by identity: a memory that was changed, or written out and read back, is another
  if (last === undefined || last.memory !== memory) return null;
  const { run } = last;
  if (now >= nextWake(run) || now >= run.due) return null;
  if (observed.workerStartedAt !== last.workerStartedAt) return null;
  for (const command of observed.commands) if (command.number > memory.taken) return null;
  for (const id in observed.relays) if (id !== '') return null;
  return run;
}

/** Whether the readings of a run, their quality settled, leave all that was found before as it is. */
export function isLull(run: Run, before: Run): boolean {
  for (let point = 0; point < run.points.length; point += 1) {
    if (run.usable[point] !== before.usable[point]) return false;
    const now = entry(run.points, point);
    const then = entry(before.points, point);
    if (now === then && run.readings.at[point] === before.readings.at[point]) continue;
    if (now.quality !== then.quality || now.why !== then.why) return false;
    if (!isBetweenLines(before, point, run)) return false;
  }
  return true;
}
