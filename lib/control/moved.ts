/** One reading moved, and all others left as they are: what a look ahead tries. */
import type { Memory, PointMemory } from './memory';
import type { Plan } from './plan';
import { entry } from './run';
import type { Threshold } from './thresholds';
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
          plan.housePoints.filter((one) => (entry(memory.points, one).value ?? Infinity) < value);
  const points = memory.points.map((one, place) => (places.includes(place) ? reads(one, value, at) : one));
  const isDerived = point !== null && entry(plan.points, point).derived !== null;
  return isDerived ? { memory: { points }, plan: asMeasured(plan, point) } : { memory: { points } };
}

/** A millisecond later than the one before, so that derived points see it as a new reading. */
const reads = (memory: PointMemory, value: number, at: number): PointMemory => ({
  ...memory,
  value,
  at: Math.max(memory.at ?? at, at) + 1,
});

/** A derived point is made of others, and which of them would move cannot be said: here it is read like any other. */
function asMeasured(plan: Plan, point: number): Plan {
  return {
    ...plan,
    points: plan.points.map((one, place) => (place === point ? { ...one, derived: null } : one)),
    derivedOrder: plan.derivedOrder.filter((one) => one !== point),
  };
}
