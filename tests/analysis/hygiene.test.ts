import { describe, expect, it } from 'vitest';
import { mostHoursAbove, spells, type HeatStep } from '@/lib/analysis/hot-spells';
import {
  heatRecord,
  HOT_C,
  ORGANIC_FROM_C,
  ORGANIC_TO_C,
  reachesFiveDays,
  reachesStill,
  reachesWindrow,
  requiredDays,
} from '@/lib/analysis/hygiene';
import { celsius } from '@/lib/units/conversion';
import { appendixB, C_OF_130F, fiveDays, organicRule, requiredDaysTable } from '../checks/heap-book';

const STEP = 300_000;
/** Steps of five minutes, each with its temperature. */
function steps(hours: number, tempC: number, from = 0): HeatStep[] {
  return Array.from({ length: Math.round(hours * 12) }, (_, i) => {
    const at = from + i * STEP;
    return { from: at, to: at + STEP, least: tempC, greatest: tempC };
  });
}
const end = (all: readonly HeatStep[]) => all.at(-1)?.to ?? 0;
const rule = (record: ReturnType<typeof heatRecord>, name: string) =>
  record?.rules.find((one) => one.rule === name);

describe('published rules of time at temperature', () => {
  it.each(appendixB)(
    '%s, %d h at %d °C with %d turnings: reached %s',
    (method, hours, leastC, turnings, reached) => {
      const is = method === 'still' ? reachesStill(hours, leastC) : reachesWindrow(hours, leastC, turnings);
      expect(is).toBe(reached);
    },
  );

  it.each(fiveDays)(
    'five days: %d h at %d °C with %d h over 55: reached %s',
    (hours, leastC, overHot, reached) => {
      expect(reachesFiveDays(hours, leastC, overHot)).toBe(reached);
    },
  );

  it.each(requiredDaysTable)('at %d °C the equation asks for %d days', (tempC, days) => {
    expect(Math.abs((requiredDays(tempC) ?? 0) / days - 1)).toBeLessThan(2e-4);
  });

  it('the equation is silent under 50 °C', () => expect(requiredDays(49.99)).toBeNull());

  it('the organic rule’s band is 131 to 170 °F', () => {
    expect(ORGANIC_FROM_C).toBe(organicRule.fromC);
    expect(ORGANIC_TO_C).toBeCloseTo(organicRule.toC, 4);
  });

  it('130 °F is not 55 °C, however long', () => {
    expect(celsius(130)).toBeCloseTo(C_OF_130F, 3);
    const record = heatRecord(steps(24 * 40, celsius(130)), []);
    expect(record?.hoursFromHot).toBe(0);
    expect(record?.rules.filter((one) => one.isReached)).toEqual([]);
  });
});

describe('a spell', () => {
  it('of 72 h counts, of one step less does not', () => {
    expect(rule(heatRecord(steps(72, 55), []), 'still')?.isReached).toBe(true);
    expect(rule(heatRecord(steps(72 - 1 / 12, 55), []), 'still')?.isReached).toBe(false);
  });

  it('ends where the probe was silent: a gap is no proof of heat', () => {
    const first = steps(40, 60);
    const record = heatRecord([...first, ...steps(40, 60, end(first) + 3_600_000)], []);
    expect(rule(record, 'still')).toMatchObject({ isReached: false, hours: 40 });
    expect(record?.silentHours).toBeCloseTo(1, 9);
  });

  it('goes on over a quarter of an hour, which is a slow probe and no silence', () => {
    const first = steps(40, 60);
    expect(spells([...first, ...steps(40, 60, end(first) + 600_000)], HOT_C)).toHaveLength(1);
  });

  it('ends with one reading under 55 °C, by a hundredth', () => {
    const first = steps(40, 60);
    const dip = steps(1 / 12, 54.99, end(first));
    expect(spells([...first, ...dip, ...steps(40, 60, end(dip))], HOT_C)).toHaveLength(2);
  });

  it('does not count for the organic rule over 170 °F', () => {
    const record = heatRecord(steps(80, 77), []);
    expect(rule(record, 'still')?.isReached).toBe(true);
    expect(rule(record, 'organic-still')).toMatchObject({ isReached: false, hours: 0 });
    expect(record?.hoursOverTop).toBeCloseTo(80, 9);
  });

  it('of 15 days needs five turnings inside it', () => {
    const hot = steps(360, 58);
    const at = [1, 2, 3, 4, 5].map((day) => day * 86_400_000);
    expect(rule(heatRecord(hot, at), 'windrow')?.isReached).toBe(true);
    expect(rule(heatRecord(hot, [...at.slice(1), 400 * 3_600_000]), 'windrow')).toMatchObject({
      isReached: false,
      turnings: { made: 4, of: 5 },
    });
  });
});

describe('the five-day rule', () => {
  it('counts four hours over 55 °C only where they lie in one five days', () => {
    const parts: HeatStep[] = [];
    for (const [hours, tempC] of [
      [2, 56],
      [130, 45],
      [2, 56],
    ] as const)
      parts.push(...steps(hours, tempC, end(parts)));
    expect(mostHoursAbove(parts, 55, 120)).toBeCloseTo(2, 9);
    expect(rule(heatRecord(parts, []), 'five-days')?.isReached).toBe(false);
  });

  it('asks for more than 55 °C, not for 55', () => {
    expect(rule(heatRecord(steps(130, 55), []), 'five-days')?.isReached).toBe(false);
    expect(rule(heatRecord(steps(130, 55.1), []), 'five-days')?.isReached).toBe(true);
  });
});

it('without a reading there is no record', () => expect(heatRecord([], [])).toBeNull());
