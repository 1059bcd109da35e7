/** One reading moved, and all others left as they are: what a look ahead tries. */
import type { Memory, Readings } from './memory';
import type { Plan } from './plan';
import { copyReadings, putReading, valueOf } from './readings';
import { entry } from './run';
import type { Threshold } from './threshold';
import type { Future } from './what-if';
import { coldestPoint } from './claims/frost';

/** The house with the threshold's point at `value`; points derived from it follow. */
export function moved(
  { plan, memory, run, at }: Future,
  { point, side }: Pick<Threshold, 'point' | 'side'>,
  value: number,
): { memory: Partial<Memory>; plan?: Plan } {
  const places =
    point !== null
      ? [point]
      : side === 'below'
        ? [coldestPoint(run)].flatMap((one) => one ?? [])
        : // the coldest rises only when none is left that is colder
          plan.housePoints.filter((one) => (valueOf(run, one) ?? Infinity) < value);
  const readings = copyReadings(memory.readings);
  for (const place of places) putReading(readings, place, later(readings, place, value, at));
  const points = memory.points.map((one, place) =>
    places.includes(place) ? { ...one, hasValue: true } : one,
  );
  const isDerived = point !== null && entry(plan.points, point).derived !== null;
  const change = { memory: { points, readings } };
  return isDerived ? { ...change, plan: asMeasured(plan, point) } : change;
}

/** A millisecond later than the one before, so that derived points see it as a new reading. */
function later({ at: times, lastAt, sameSince }: Readings, place: number, value: number, at: number) {
  const next = Math.max(times[place] ?? 0, at) + 1;
  return { value, at: next, lastAt: lastAt[place] ?? 0, sameSince: sameSince[place] ?? 0 };
}

/** A derived point is made of others, and which of them would move cannot be said: here it is read like any other. */
function asMeasured(plan: Plan, point: number): Plan {
  return {
    ...plan,
    points: plan.points.map((one, place) => (place === point ? { ...one, derived: null } : one)),
    derivedOrder: plan.derivedOrder.filter((one) => one !== point),
  };
}
