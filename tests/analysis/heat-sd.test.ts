import { describe, expect, it } from 'vitest';
import { heatSum, loopHeat, NO_HEAT } from '@/lib/analysis/heat';
import { classSd } from '@/lib/analysis/sensor-class';
import { fanDay, gain, thumbRule, thumbRuleAt2400 } from '../checks/nights';
import { chance } from './chance';

const minute = 60_000;
const line = (key: string, sd: number, value: (m: number) => number) => ({
  ...{ key, name: key, role: 'other', holdS: 180, sd },
  good: Array.from({ length: 301 }, (_, m) => ({ at: m * minute, value: value(m) })),
});
/** Three draws of 40 min. */
const runs = [20, 100, 200].map((m) => ({ from: m * minute, to: (m + 40) * minute }));
const SD = { flow: 0.004, probe: 0.29 };

/** Heat of the three draws as three wrong things would show it: a flow, and each probe by its own constant error. */
function measured(flowError = 0, intakeError = 0, backError = 0, delayS = 0) {
  const intake = line('in', SD.probe, (m) => 5 + 0.01 * m + intakeError);
  const truth = (m: number) => 22 - 0.02 * m + backError;
  const lagged = (m: number) => {
    const run = runs.find(({ from, to }) => m * minute >= from && m * minute < to);
    const since = run === undefined ? 0 : m * 60 - run.from / 1000;
    return run === undefined || delayS === 0
      ? truth(m)
      : 8 + (truth(m) - 8) * (1 - Math.exp(-since / delayS));
  };
  const flow = { m3PerS: 0.0425 + flowError, sdM3PerS: SD.flow, from: 'measured' };
  return runs
    .map((run) => loopHeat([run], intake, line('out', SD.probe, lagged), flow, 310))
    .reduce(heatSum, NO_HEAT);
}

describe('the deviation of heat', () => {
  it('is what 2,000 wrong flows and probes make of it', { timeout: 60_000 }, () => {
    const { normal } = chance(17);
    const kWh = Array.from({ length: 2000 }, () =>
      measured(SD.flow * normal(), SD.probe * normal(), SD.probe * normal()),
    ).map((heat) => heat.kWh);
    const mean = kWh.reduce((sum, one) => sum + one, 0) / kWh.length;
    const sd = Math.sqrt(kWh.reduce((sum, one) => sum + (one - mean) ** 2, 0) / (kWh.length - 1));
    const { parts } = measured();
    // 2,000 draws tell a deviation to 1.6 %; twice that and a little
    expect(Math.abs(sd / Math.hypot(parts.flow, parts.probes) - 1)).toBeLessThan(0.05);
  });

  it.each([55, 90, 155])(
    'covers the warm air that a probe of %i s has not followed yet, within two deviations',
    (delayS) => {
      const lagging = measured(0, 0, 0, delayS);
      expect(lagging.parts.delay).toBeGreaterThan(0);
      expect(Math.abs(lagging.kWh - measured().kWh)).toBeLessThan(2 * lagging.parts.delay);
    },
  );

  it('of draws together keeps what is wrong in each, and does not average it out', () => {
    const [one, three] = [measured(), heatSum(heatSum(measured(), measured()), measured())];
    expect(three.sd).toBeCloseTo(3 * one.sd, 9);
  });
});

describe('what a sensor’s class says', () => {
  // IEC 60751: at 60 °C class A is within 0.27 K, class B within 0.60 K
  it.each([
    ['Pt100 class A', 60, 0.27],
    ['PT100 class B', 60, 0.6],
    ['Pt1000', 0, 0.15],
    ['one-wire', 20, 0.5],
    [null, 20, 0.5],
  ])('%s at %i °C is within %f K', (sensor, atC, tolerance) => {
    expect(classSd(sensor, atC)).toBeCloseTo(tolerance / Math.sqrt(3), 9);
  });
});

it('90 cfm and 10 °F are some 285 W at sea level, 24 for each watt of a 12 W fan, and 18 at 2400 m', () => {
  const hour = [{ from: 0, to: 60 * minute }];
  const intake = line('in', 0.3, () => 20);
  const back = line('out', 0.3, () => 20 + thumbRule.kelvin);
  const watts = (altitudeM: number) =>
    loopHeat(hour, intake, back, { m3PerS: thumbRule.m3PerS, sdM3PerS: null, from: 'rated' }, altitudeM).kWh *
    1000;
  expect(Math.abs(watts(0) / thumbRule.watts - 1)).toBeLessThan(0.01);
  expect(Math.abs(watts(0) / fanDay.powerW / gain.seaLevel - 1)).toBeLessThan(0.01);
  expect(Math.abs(watts(2400) / thumbRuleAt2400 - 1)).toBeLessThan(0.01);
  expect(Math.abs(watts(2400) / fanDay.powerW / gain.at2400m - 1)).toBeLessThan(0.01);
  expect(thumbRule.kelvin).toBeCloseTo(5.5556, 4);
});
