/** How a house kept over a night: how much warmer than outdoors, how damp, and whether leaves were wet. */
import { saturationPressure } from '@/lib/physics/air';
import type { Missing, NightClimate } from './nights';
import { round } from './rounding';
import { type Extent, holds, liner, type Series, unionMs } from './series';

const HIGH_HUMIDITY = 90;

export interface ClimateAnswer extends NightClimate {
  missing: Partial<Record<keyof NightClimate, Missing>>;
}

/** Over [fromMs, toMs). Only what was read counts: a gap adds nothing, and shows in the coverage. */
export function climateOf(points: ReadonlyMap<string, Series>, fromMs: number, toMs: number): ClimateAnswer {
  const of = (role: string) =>
    [...points.values()].filter((one) => one.role === role && one.good.some(({ at }) => at < toMs));
  const air = of('house-air').length > 0 ? of('house-air') : of('bench');
  const [outdoors, humidity] = [of('outdoors'), of('humidity')];
  const inside = [...of('house-air'), ...of('bench')];
  const missing: ClimateAnswer['missing'] = {};
  if (air.length === 0) missing.liftDegreeHours = 'no-readings';
  else if (outdoors.length === 0) missing.liftDegreeHours = 'no-outdoors';
  if (humidity.length === 0) missing.over90Hours = missing.underDewPointHours = 'no-humidity';
  else if (air.length === 0) missing.underDewPointHours = 'no-readings';
  const hours = (ms: number) => Math.round(ms / 3600) / 1000;
  return {
    liftDegreeHours: missing.liftDegreeHours ? null : round(liftOf(air, outdoors, fromMs, toMs), 2),
    over90Hours: missing.over90Hours ? null : hours(over(humidity, fromMs, toMs)),
    underDewPointHours: missing.underDewPointHours
      ? null
      : hours(wetMs({ air, humidity, inside }, fromMs, toMs)),
    missing,
  };
}

/** K·h between two straight lines, the mean of several points on each side. */
function liftOf(air: readonly Series[], outdoors: readonly Series[], fromMs: number, toMs: number): number {
  const cuts = cutsOf([...air, ...outdoors], fromMs, toMs);
  const longestMs = 1000 * Math.max(...[...air, ...outdoors].map((one) => one.holdS));
  const [inside, out] = [meanOf(air.map(liner)), meanOf(outdoors.map(liner))];
  const lifts = cuts.map((at) => {
    const [a, b] = [inside(at), out(at)];
    return a === null || b === null ? null : a - b;
  });
  return steps(cuts).reduce((sum, { from, to }, i) => {
    const [start, end] = [lifts[i], lifts[i + 1]];
    const known = typeof start === 'number' && typeof end === 'number' && to - from <= longestMs;
    return known ? sum + (((start + end) / 2) * (to - from)) / 3_600_000 : sum;
  }, 0);
}

function over(humidity: readonly Series[], fromMs: number, toMs: number): number {
  return unionMs(
    humidity.flatMap((one) => holds(one, fromMs, toMs).filter((held) => held.value > HIGH_HUMIDITY)),
  );
}

function wetMs(
  of: { air: readonly Series[]; humidity: readonly Series[]; inside: readonly Series[] },
  fromMs: number,
  toMs: number,
): number {
  const cuts = cutsOf([...of.inside, ...of.humidity], fromMs, toMs, true);
  const at = (all: readonly Series[]) => all.map((one) => stepper(holds(one, fromMs, toMs)));
  const [air, humidity, inside] = [at(of.air), at(of.humidity), at(of.inside)];
  return steps(cuts).reduce((sum, { from, to }) => {
    const [tempC, percent] = [meanOf(air)(from), meanOf(humidity)(from)];
    const values = inside.flatMap((one) => one(from) ?? []);
    if (tempC === null || percent === null || values.length === 0) return sum;
    // at or under the dew point is where the air's vapour saturates: so compared, no dew point need be searched for
    const vapourPa = (Math.min(100, Math.max(0, percent)) / 100) * saturationPressure(tempC);
    return saturationPressure(Math.min(...values)) <= vapourPa ? sum + to - from : sum;
  }, 0);
}

/** Instants at which something was read, the two ends included; for steps also those at which a reading ends to hold. */
function cutsOf(all: readonly Series[], fromMs: number, toMs: number, ends = false): number[] {
  const cuts = new Set([fromMs, toMs]);
  for (const { good, holdS } of all)
    for (const { at } of good) {
      if (at > fromMs && at < toMs) cuts.add(at);
      const end = at + holdS * 1000;
      if (ends && end > fromMs && end < toMs) cuts.add(end);
    }
  return [...cuts].sort((a, b) => a - b);
}

function steps(cuts: readonly number[]): Extent[] {
  return cuts.slice(0, -1).map((from, i) => ({ from, to: cuts[i + 1] ?? from }));
}

function meanOf(lines: readonly ((at: number) => number | null)[]): (at: number) => number | null {
  return (at) => {
    const values = lines.flatMap((line) => line(at) ?? []);
    return values.length === 0 ? null : values.reduce((sum, value) => sum + value, 0) / values.length;
  };
}

/** The value held at an instant; asked with instants that only grow. */
function stepper(held: readonly (Extent & { value: number })[]): (at: number) => number | null {
  let next = 0;
  return (at) => {
    while (next < held.length && (held[next]?.to ?? Infinity) <= at) next += 1;
    const one = held[next];
    return one !== undefined && one.from <= at ? one.value : null;
  };
}
