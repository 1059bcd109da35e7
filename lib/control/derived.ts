/** Points that are reckoned from others. Quality is the worst of the inputs; the time is the newest input's. */
import {
  dewPoint,
  dryAirDensity,
  dryAirJPerKgK,
  pressureAtAltitude,
  saturationPressure,
} from '@/lib/physics/air';
import { plain } from './plain';
import type { PlanDerived, PlanPoint } from './plan';
import { keepQuality } from './quality';
import { putReading, timeOf, valueOf } from './readings';
import { entry, type Run } from './run';
import type { HouseConfig, PointConfig, Quality } from './types';

const HOUR_MS = 3_600_000;
const TRAIL_LENGTH = 120;

export function compileDerived(
  derived: NonNullable<PointConfig['derived']>,
  house: HouseConfig,
  find: (key: string) => number | null,
): PlanDerived {
  const [intake, back] = derived.points;
  const loop = house.loops.find((one) => one.intake === intake && one.return === back);
  return {
    of: derived.of,
    // −1 stands for a point that is not there: the derived one is then bad for good
    inputs: derived.points.map((key) => find(key) ?? -1),
    windowMs: (derived.windowS ?? 1800) * 1000,
    pressure: pressureAtAltitude(house.house.altitude),
    flowM3S: house.channels.find((one) => one.key === loop?.channel)?.flowM3S ?? null,
  };
}

/** Derived points, each after its inputs; those in a ring (refused at save) are left out and so stay bad. */
export function derivedOrder(points: readonly PlanPoint[]): number[] {
  const order: number[] = [];
  const known = new Set(points.flatMap((point, index) => (point.derived === null ? [index] : [])));
  for (let more = true; more;) {
    more = false;
    points.forEach((point, index) => {
      if (
        known.has(index) ||
        point.derived?.inputs.some((input) => input >= 0 && !known.has(input)) !== false
      )
        return;
      known.add(index);
      order.push(index);
      more = true;
    });
  }
  return order;
}

/** Values are reckoned anew only where an input has a newer reading. */
export function settleDerived(run: Run): void {
  for (const index of run.plan.derivedOrder) {
    const { derived } = entry(run.plan.points, index);
    if (derived === null) continue;
    let at = -Infinity;
    let quality: Quality = 'good';
    let why: string | null = null;
    let goodRun = 3;
    for (const input of derived.inputs) {
      const memory = input < 0 ? null : entry(run.points, input);
      at = Math.max(at, input < 0 ? -Infinity : (timeOf(run, input) ?? -Infinity));
      const worse = memory?.quality ?? 'bad';
      if (worse === 'bad' || (worse === 'uncertain' && quality === 'good')) quality = worse;
      if (worse !== 'good') why ??= `input-${worse}`;
      goodRun = Math.min(goodRun, memory?.goodRun ?? 0);
    }
    let memory = entry(run.points, index);
    // a rule comes back to it when every input has been good three times
    if (goodRun !== memory.goodRun) {
      memory = { ...memory, goodRun };
      run.points[index] = memory;
    }
    if (at > (timeOf(run, index) ?? -Infinity) && quality !== 'bad') reckon(run, index, derived, at);
    if (!entry(run.points, index).hasValue && quality !== 'bad') {
      quality = 'bad';
      why = derived.of === 'trend' ? 'window-not-full' : 'cannot-be-reckoned';
    }
    keepQuality(run, index, quality, why);
  }
}

function reckon(run: Run, index: number, derived: PlanDerived, at: number): void {
  const memory = entry(run.points, index);
  const values = derived.inputs.map((input) => valueOf(run, input) ?? NaN);
  let trail = memory.trail;
  let value: number | null;
  if (derived.of === 'trend') {
    trail = extendTrail(memory.trail ?? [], [at, values[0] ?? NaN], derived.windowMs);
    value = trend(trail, derived.windowMs);
  } else value = formulaWithinRange(derived, values);
  const hasValue = value !== null && Number.isFinite(value);
  putReading(run.readings, index, { value: hasValue ? (value ?? 0) : 0, at, lastAt: at, sameSince: at });
  if (hasValue !== memory.hasValue || trail !== memory.trail)
    run.points[index] = { ...memory, hasValue, trail };
}

/** The handbook's equations throw outside their range; a reading must not stop a house, so there the value is unknown. */
function formulaWithinRange(derived: PlanDerived, values: number[]): number | null {
  try {
    return formula(derived, values);
  } catch {
    return null;
  }
}

/**
 * K, °C, Pa or W by kind. Humidity points are in %RH, 0 to 100. loop-heat: Q = ρ V̇ c_p (return − intake), air
 * weighed at the intake, where the flow is told; null without a flow.
 */
function formula(derived: PlanDerived, values: number[]): number | null {
  const [first = NaN, second = NaN] = values;
  switch (derived.of) {
    case 'difference':
    case 'lift':
      return plain(first - second);
    case 'mean':
      return plain(values.reduce((sum, value) => sum + value, 0) / values.length);
    case 'least':
      return Math.min(...values);
    case 'greatest':
      return Math.max(...values);
    case 'dew-point':
      return dewPoint(first, Math.min(1, Math.max(0, second / 100)));
    case 'vapour-pressure-deficit':
      return saturationPressure(first) * (1 - Math.min(1, Math.max(0, second / 100)));
    case 'loop-heat':
      if (derived.flowM3S === null) return null;
      return dryAirDensity(first, derived.pressure) * derived.flowM3S * dryAirJPerKgK * (second - first);
    default:
      return null;
  }
}

/** Thinned to about 120 samples a window, so that memory does not grow with the reporting rate. */
function extendTrail(
  trail: [number, number][],
  sample: [number, number],
  windowMs: number,
): [number, number][] {
  const last = trail.at(-1);
  const kept = trail.filter(([at]) => at >= sample[0] - windowMs);
  // the newest always counts: where it is too near the one before, it takes its place
  const before = trail.at(-2);
  if (last !== undefined && before !== undefined && sample[0] - before[0] < windowMs / TRAIL_LENGTH)
    kept.pop();
  return [...kept, sample];
}

/** Slope by least squares, unit an hour; null until the samples span half the window. */
function trend(trail: [number, number][], windowMs: number): number | null {
  const first = trail[0];
  const last = trail.at(-1);
  if (first === undefined || last === undefined || last[0] - first[0] < windowMs / 2) return null;
  let sumT = 0;
  let sumV = 0;
  let sumTT = 0;
  let sumTV = 0;
  for (const [at, value] of trail) {
    const hours = (at - first[0]) / HOUR_MS;
    sumT += hours;
    sumV += value;
    sumTT += hours * hours;
    sumTV += hours * value;
  }
  const n = trail.length;
  return (n * sumTV - sumT * sumV) / (n * sumTT - sumT * sumT);
}
