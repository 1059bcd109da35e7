import { describe, expect, it } from 'vitest';
import { loopHeat, NO_HEAT } from '@/lib/analysis/heat';
import type { Series } from '@/lib/analysis/series';
import { thumbRule, thumbRuleAt2400 } from '../checks/nights';

const hour = 3_600_000;
const step = 30_000;

/** One reading every 30 s from 0 to 2 h. */
function line(key: string, value: (at: number) => number | null): Series {
  const good = Array.from({ length: 241 }, (_, i) => ({ at: i * step, value: value(i * step) }));
  return {
    key,
    name: key,
    role: 'other',
    holdS: 90,
    sd: 0.3,
    good: good.flatMap(({ at, value: v }) => (v === null ? [] : [{ at, value: v }])),
  };
}
const flow = { m3PerS: thumbRule.m3PerS, sdM3PerS: 0.004, from: 'measured' };
const intake = line('in', () => 20);
const warmer = line('out', () => 20 + thumbRule.kelvin);
const anHour = [{ from: 0, to: hour }];

describe('heat of a loop', () => {
  it('agrees with the rule of thumb at sea level to 1 %', () => {
    const watts = loopHeat(anHour, intake, warmer, flow, 0).kWh * 1000;
    expect(Math.abs(watts / thumbRule.watts - 1)).toBeLessThan(0.01);
  });

  it('is a quarter less at 2400 m', () => {
    const watts = loopHeat(anHour, intake, warmer, flow, 2400).kWh * 1000;
    expect(Math.abs(watts / thumbRuleAt2400 - 1)).toBeLessThan(0.01);
  });

  it('counts only while the fan ran, to the second between readings', () => {
    const whole = loopHeat(anHour, intake, warmer, flow, 0);
    const part = loopHeat([{ from: 10_000, to: 10_000 + 600_000 }], intake, warmer, flow, 0);
    expect(part.kWh / whole.kWh).toBeCloseTo(600 / 3600, 9);
    expect(part.measuredS).toBe(600);
  });

  it('stays negative where the loop cools the house', () => {
    expect(loopHeat(anHour, warmer, intake, flow, 0).kWh).toBeLessThan(-0.25);
  });

  it('takes a straight line between readings, so a warming return gives its mean', () => {
    const rising = line('out', (at) => 20 + (10 * at) / hour);
    const { kWh, parts } = loopHeat(anHour, intake, rising, flow, 0);
    // the rising probe may be behind the air: 155 s at 10 K an hour, of the 5 K that it reads on the mean
    expect(parts.delay / kWh).toBeCloseTo(((155 / 3600) * 10) / 5, 9);
    const steady = loopHeat(
      anHour,
      intake,
      line('out', () => 25),
      flow,
      0,
    ).kWh;
    expect(kWh).toBeCloseTo(steady, 9);
  });

  it('leaves out a silence of one probe, and says how much it measured', () => {
    const broken = line('out', (at) => (at > 600_000 && at < 1_800_000 ? null : 25));
    const heat = loopHeat(anHour, intake, broken, flow, 0);
    expect(heat.measuredS).toBe(3600 - 1200);
  });

  it('leaves out a silence of both probes, though they come back in the same pack', () => {
    const quiet = (at: number) => at > 600_000 && at < 1_800_000;
    const heat = loopHeat(
      anHour,
      line('in', (at) => (quiet(at) ? null : 20)),
      line('out', (at) => (quiet(at) ? null : 25)),
      flow,
      0,
    );
    expect(heat.measuredS).toBe(3600 - 1200);
  });

  it('has the deviation of its flow and of two probes of 0.3 K, in squares, where nothing warms up', () => {
    const heat = loopHeat(anHour, intake, warmer, flow, 0);
    const ofFlow = (heat.kWh * 0.004) / thumbRule.m3PerS;
    const ofProbes = (heat.kWh / thumbRule.kelvin) * Math.sqrt(2) * 0.3;
    expect(heat.sd).toBeCloseTo(Math.sqrt(ofFlow ** 2 + ofProbes ** 2), 12);
  });

  it('is uncertain by its probes even where it moves nothing', () => {
    const heat = loopHeat(anHour, intake, intake, flow, 0);
    expect(heat.kWh).toBe(0);
    expect(heat.sd).toBeGreaterThan(0.02);
  });

  it('is nothing, for sure, while the fan stands', () => {
    expect(loopHeat([], intake, warmer, flow, 0)).toEqual(NO_HEAT);
  });
});
