// A sensor's health against certified and hand-worked figures.
import { describe, expect, it } from 'vitest';
import { lineThrough } from '@/lib/analysis/line';
import {
  differenceToSiblings,
  driftOf,
  gapsOf,
  healthFindings,
  noiseOf,
  type HealthNight,
} from '@/lib/analysis/sensor-health';
import { steadiness } from '@/lib/analysis/steadiness';

// SOURCE: NIST Statistical Reference Datasets, Norris (linear regression), with its certified values.
const NORRIS_Y = `0.1 338.8 118.1 888.0 9.2 228.1 668.5 998.5 449.1 778.9 559.2 0.3 0.1 778.1 668.8 339.3 448.9 10.8
  557.7 228.3 998.0 888.8 119.6 0.3 0.6 557.6 339.3 888.0 998.5 778.9 10.2 117.6 228.9 668.4 449.2 0.2`;
const NORRIS_X = `0.2 337.4 118.2 884.6 10.1 226.5 666.3 996.3 448.6 777.0 558.2 0.4 0.6 775.5 666.9 338.0 447.5 11.6
  556.0 228.1 995.8 887.6 120.2 0.3 0.3 556.8 339.1 887.2 999.0 779.0 11.1 118.3 229.2 669.1 448.9 0.5`;
const norris = () => {
  const x = NORRIS_X.split(/\s+/).map(Number);
  return NORRIS_Y.split(/\s+/).map((y, at) => ({ x: x[at] ?? NaN, y: Number(y) }));
};

describe('the line of least squares', () => {
  it('has the certified values of Norris', () => {
    const line = lineThrough(norris());
    expect(line?.slope).toBeCloseTo(1.00211681802045, 11);
    expect(line?.at0).toBeCloseTo(-0.262323073774029, 9);
    expect(line?.sd).toBeCloseTo(0.884796396144373, 10);
    expect(line?.slopeSd).toBeCloseTo(0.429796848199937e-3, 12);
  });
  it('is none through one value, or values at one place', () => {
    expect(lineThrough([{ x: 1, y: 1 }])).toBeNull();
    expect(
      lineThrough([
        { x: 1, y: 1 },
        { x: 1, y: 2 },
      ]),
    ).toBeNull();
  });
});

const WINDOW = 600_000;
/** Readings each minute from `begin`, by a function of the minute. */
const minutes = (begin: number, value: (minute: number) => number, many = 10) =>
  Array.from({ length: many }, (_, minute) => ({ at: begin + minute * 60_000, value: value(minute) }));

describe('noise', () => {
  it('does not take a house that cools for a probe that shakes', () => {
    expect(noiseOf(minutes(0, (minute) => 8 - 0.05 * minute))).toBeCloseTo(0, 9);
  });
  it('is the deviation about the line', () => {
    // ± 0.1 in turn over ten: squares 0.1 less the line’s 0.5² ÷ 82.5, ÷ 8, root: 0.110096
    expect(noiseOf(minutes(0, (minute) => 5 + (minute % 2 === 0 ? 0.1 : -0.1)))).toBeCloseTo(0.110096, 6);
  });
  it('is not spoilt by ten minutes in which a door stood open', () => {
    const calm = [0, 1, 2, 4].flatMap((window) =>
      minutes(window * WINDOW, (minute) => (minute % 2 === 0 ? 0.1 : -0.1)),
    );
    const door = minutes(3 * WINDOW, (minute) => (minute > 3 && minute < 7 ? -6 : 4));
    expect(noiseOf([...calm, ...door])).toBeCloseTo(0.110096, 6);
  });
  it('does not take a fan that warms the house for half an hour for one either', () => {
    // towards 5 °C more with a time constant of 20 min; a parabola’s bend in ten minutes leaves some hundredths
    const warms = minutes(0, (minute) => 4 + 5 * (1 - Math.exp(-minute / 20)), 30);
    expect(noiseOf(warms)).toBeLessThan(0.06);
  });
  it('is not known from a few readings', () => {
    expect(noiseOf(minutes(0, () => 5, 7))).toBeNull();
    expect(noiseOf([])).toBeNull();
  });
});

describe('gaps', () => {
  it('are counted between readings and to both edges, longer than the silence only', () => {
    const s = (seconds: number) => seconds * 1000;
    expect(gapsOf([s(100), s(130), s(400), s(430)], 0, s(1000), 90)).toEqual({
      ...{ count: 3, longestS: 570, totalS: 100 + 270 + 570 },
    });
    expect(gapsOf([s(30), s(60), s(90)], 0, s(120), 90)).toEqual({ count: 0, longestS: 0, totalS: 0 });
  });
  it('are one where nothing came at all', () => {
    expect(gapsOf([], 0, 3_600_000, 90)).toEqual({ count: 1, longestS: 3600, totalS: 3600 });
  });
});

describe('siblings', () => {
  it('are compared over steps that both have, by their middle', () => {
    const own = new Map([
      [0, 6],
      [1, 6.5],
      [2, 9],
    ]);
    const siblings = [
      new Map([
        [0, 5],
        [1, 5],
      ]),
      new Map([
        [0, 5.5],
        [1, 6],
      ]),
      new Map([[0, 40]]),
    ];
    // at 0 the middle of 5, 5.5, 40 is 5.5: 0.5; at 1 that of 5, 6 is 5.5: 1.0; 2 is not shared
    expect(differenceToSiblings(own, siblings)).toBeCloseTo(0.75, 12);
    expect(differenceToSiblings(own, [])).toBeNull();
  });
  it('show a drift with its 95 % interval', () => {
    // worked by hand: y = 0, 1, 1, 2 over days 0 to 3: slope 0.6, squares 0.2, sd √0.1, slope’s √(0.1 ÷ 5), t(2) = 4.303
    const drift = driftOf([0, 1, 1, 2].map((difference, day) => ({ day, difference })));
    expect(drift?.perWeek).toBeCloseTo(4.2, 12);
    expect(drift?.give).toBeCloseTo(7 * Math.sqrt(0.02) * 4.302653, 4);
  });
});

describe('what wants a look', () => {
  const night = (day: number, more: Partial<HealthNight> = {}): HealthNight => ({
    night: `2026-11-${String(day).padStart(2, '0')}`,
    ...{ readings: 2880, noise: 0.03, difference: 0.2, gaps: { count: 0, longestS: 0, totalS: 0 } },
    ...more,
  });
  const nights = (of: (place: number) => Partial<HealthNight>) =>
    Array.from({ length: 10 }, (_, place) => night(place + 10, of(place)));
  it('is nothing of a sound sensor', () => {
    expect(
      healthFindings(
        nights(() => ({})),
        true,
      ),
    ).toEqual([]);
  });
  it('is a drift that is surer than chance, and not the scatter of its nights', () => {
    const [drift] = healthFindings(
      nights((place) => ({ difference: 0.1 * place + (place % 2) * 0.02 })),
      true,
    );
    expect(drift).toMatchObject({ what: 'drifts' });
    expect(
      healthFindings(
        nights((place) => ({ difference: place % 2 === 0 ? 1 : -1 })),
        true,
      ),
    ).toEqual([]);
  });
  it('is noise, silence, and standing apart from those that share its air', () => {
    expect(
      healthFindings(
        nights((place) => (place === 9 ? { noise: 0.6 } : {})),
        true,
      ),
    ).toEqual([{ what: 'noisy', noise: 0.6, usual: 0.03 }]);
    expect(
      healthFindings(
        nights(() => ({ difference: 2 })),
        true,
      ),
    ).toEqual([{ what: 'apart', difference: 2 }]);
    expect(
      healthFindings(
        nights(() => ({ difference: 2 })),
        false,
      ),
    ).toEqual([]);
    const gaps = { count: 2, longestS: 300, totalS: 400 };
    expect(
      healthFindings(
        nights((place) => (place < 3 ? { gaps } : {})),
        true,
      ),
    ).toEqual([{ what: 'gaps', nights: 3 }]);
  });
});

describe('a probe in a bath', () => {
  const every30 = (values: readonly number[]) => values.map((value, at) => ({ at: at * 30_000, value }));
  it('is steady once five readings over two minutes lie together', () => {
    const calm = every30([0.4, 0.44, 0.4, 0.38, 0.4]);
    const told = steadiness(calm, 125_000, 90);
    expect(told).toMatchObject({ isSteady: true, why: null, readings: 5, seconds: 120 });
    expect(told.mean).toBeCloseTo(0.404, 12);
    // squares about 0.404: 3 × 0.000016 + 0.001296 + 0.000576 = 0.00192; ÷ 4, root: 0.021909
    expect(told.sd).toBeCloseTo(0.021909, 6);
  });
  it('is not while it still cools, scatters, has said little, or nothing of late', () => {
    expect(steadiness(every30([9, 6, 4, 3, 2.4, 2]), 155_000, 90).why).toBe('moving');
    expect(steadiness(every30([0, 0.4, 0, 0.4, 0, 0.4, 0, 0.4, 0]), 245_000, 90).why).toBe('scattered');
    expect(steadiness(every30([0, 0, 0, 0]), 95_000, 90).why).toBe('few');
    expect(steadiness(every30([0]), 5_000, 90)).toMatchObject({ why: 'few', sd: null, mean: 0 });
    expect(steadiness(every30([0, 0, 0, 0, 0]), 300_000, 90).why).toBe('silent');
    expect(steadiness([], 300_000, 90).why).toBe('silent');
  });
});
