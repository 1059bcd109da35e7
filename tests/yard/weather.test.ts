import { describe, expect, test } from 'vitest';
import fc from 'fast-check';
import { weatherAt } from '@/worker/yard/weather';
import { realWinters } from '../checks/weather';

const hourMs = 3_600_000;
const start = Date.UTC(2026, 9, 27, 12);

/** 35 nights, noon to noon, as hourly temperatures. */
const nightsOf = (seed: number): number[][] =>
  Array.from({ length: 35 }, (_, night) =>
    Array.from({ length: 24 }, (__, hour) => weatherAt(seed, start + (night * 24 + hour) * hourMs).tempC),
  );
const mean = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0) / values.length;
const sd = (values: readonly number[]): number =>
  Math.sqrt(mean(values.map((value) => (value - mean(values)) ** 2)));
const steps = (values: readonly number[]): number[] =>
  values.slice(1).map((value, i) => value - (values[i] ?? 0));

describe('the winter of the yard', () => {
  test('has nights between 0 and −15 °C, whatever the seed', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 2 ** 31 }), (seed) => {
        const coldest = nightsOf(seed).map((night) => Math.min(...night));
        expect(Math.min(...coldest)).toBeGreaterThan(-15);
        expect(Math.max(...coldest)).toBeLessThan(0);
      }),
      { numRuns: 60 },
    );
  });

  test('has mild and hard nights in every five weeks', () => {
    for (const seed of [1, 7, 42, 2026]) {
      const coldest = nightsOf(seed).map((night) => Math.min(...night));
      expect(Math.max(...coldest)).toBeGreaterThan(-3.5);
      expect(Math.min(...coldest)).toBeLessThan(-8);
    }
  });

  // Loosely: half to one and a half of what real lowland winters do from hour to hour and day by night, and
  // less from day to day, since an endless winter has no thaws of a week.
  test.each(realWinters)('moves from hour to hour and day to night much as $place does', (real) => {
    const nights = nightsOf(7);
    const hourly = steps(nights.flat());
    const swing = mean(nights.map((night) => Math.max(...night) - Math.min(...night)));
    expect(sd(hourly) / real.hourlyStepSdK).toBeGreaterThan(0.5);
    expect(sd(hourly) / real.hourlyStepSdK).toBeLessThan(1.5);
    expect(swing / real.dailySwingMeanK).toBeGreaterThan(0.5);
    expect(swing / real.dailySwingMeanK).toBeLessThan(1.5);
    const nextDay = sd(steps(nights.map(mean)));
    expect(nextDay / real.nextDaySdK).toBeGreaterThan(0.25);
    expect(nextDay / real.nextDaySdK).toBeLessThan(1.5);
  });

  test('is colder under clear skies than under cloud', () => {
    const hours = Array.from({ length: 35 * 24 }, (_, hour) => weatherAt(7, start + hour * hourMs));
    const nightly = hours.filter(({ sunWPerM2 }) => sunWPerM2 === 0);
    const clear = nightly.filter(({ clearness }) => clearness > 0.7).map(({ tempC }) => tempC);
    const cloudy = nightly.filter(({ clearness }) => clearness < 0.3).map(({ tempC }) => tempC);
    expect(mean(clear)).toBeLessThan(mean(cloudy) - 1.5);
  });

  test('has a low sun by day and none by night', () => {
    const noon = Date.UTC(2026, 11, 1, 12);
    expect(weatherAt(7, noon).sunWPerM2).toBeGreaterThan(10);
    expect(weatherAt(7, noon).sunWPerM2).toBeLessThan(300);
    expect(weatherAt(7, noon + 12 * hourMs).sunWPerM2).toBe(0);
  });

  test('is the same winter whenever it is asked, and another for another seed', () => {
    const ms = start + 1234567;
    expect(weatherAt(7, ms)).toEqual(weatherAt(7, ms));
    expect(weatherAt(7, ms).tempC).not.toBe(weatherAt(8, ms).tempC);
  });
});
