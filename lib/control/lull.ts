/**
 * A lull: the time after a settled instant in which everything that was found then still holds, so that a step has
 * only to take its readings. It lasts until a reading crosses a line that somebody looked at (lines.ts) or is of
 * another quality than before, a command or a relay's report comes, or something falls due. What a reading or the time
 * has stirred is then found anew in its part of the house alone (parts.ts); a command or a report stirs everything. The
 * plan remembers the last step for it, as its calendar does its last answers; a step from any other memory, as after a
 * restart, settles everything and gives the same.
 */
import { isBetweenLines } from './lines';
import type { Memory } from './memory';
import type { Plan } from './plan';
import { entry, type Run } from './run';
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

/** The step that left this memory, if nothing but time and readings has come since. */
export function stepBefore(plan: Plan, memory: Memory, observed: Observed): Run | null {
  const last = lastSteps.get(plan);
  // known by identity: a memory that was changed, or written out and read back, is another
  if (last === undefined || last.memory !== memory) return null;
  const { workerStartedAt, commands, relays } = observed;
  if (workerStartedAt !== last.workerStartedAt || workerStartedAt > last.run.stepAt) return null;
  for (const command of commands) if (command.number > memory.taken) return null;
  for (const id in relays) if (id !== '') return null;
  return last.run;
}

/** Points whose readings, their quality settled, are not what was looked at in the step before; null: none. */
export function pointsStirred(run: Run, before: Run): number[] | null {
  let stirred: number[] | null = null;
  for (let point = 0; point < run.points.length; point += 1)
    if (!isAsBefore(run, before, point)) (stirred ??= []).push(point);
  return stirred;
}

function isAsBefore(run: Run, before: Run, point: number): boolean {
  if (run.usable[point] !== before.usable[point]) return false;
  const now = entry(run.points, point);
  const then = entry(before.points, point);
  if (now === then && run.readings.at[point] === before.readings.at[point]) return true;
  return now.quality === then.quality && now.why === then.why && isBetweenLines(run, point);
}

/** What is to be looked at anew; all the rest stays as it was found. */
export interface Stirred {
  parts: Set<number>;
  /** Frost, which is all the house's. */
  house: boolean;
}

/** What falls due at `run.at`, and whoever asked for one of the points: the lines that were drawn for it are gone. */
export function stir(run: Run, points: readonly number[]): Stirred {
  const { plan, at, partWake, partDue } = run;
  const parts = new Set<number>();
  for (let part = 0; part < plan.parts.length; part += 1)
    if (at >= (partWake[part] ?? NaN) || at >= (partDue[part] ?? NaN)) parts.add(part);
  let house = false;
  for (const point of points) {
    run.over[point] = -Infinity;
    run.under[point] = Infinity;
    for (const part of entry(plan.askedBy, point)) parts.add(part);
    house ||= entry(plan.points, point).isHouse;
  }
  return { parts, house };
}

/** Nothing that was found holds any more. */
export function stirAll({ over, under }: Run): null {
  over.fill(-Infinity);
  under.fill(Infinity);
  return null;
}
