/** Time at temperature goes from reading to reading: a slow probe has its hours, and no rounding lifts a spell to a rule. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { unsureSpans, withReadings } from '@/lib/analysis/heat-edges';
import type { HeatStep } from '@/lib/analysis/hot-spells';
import { heatRecord, RULE_LINES } from '@/lib/analysis/hygiene';

const STEP = 300_000;
const minute = 60_000;
const rule = (record: ReturnType<typeof heatRecord>, name: string) =>
  record?.rules.find((one) => one.rule === name);

describe('a probe that reads every ten minutes', () => {
  const readings = (hours: number, tempC: number, from = 0): HeatStep[] =>
    Array.from({ length: hours * 6 + 1 }, (_, i) => {
      const at = from + i * 10 * minute;
      return { from: at, to: at, least: tempC, greatest: tempC };
    });

  it('shows as many hours as passed, and is not silent', () => {
    expect(heatRecord(readings(72, 56), [])).toMatchObject({
      ...{ hoursFromHot: 72, measuredHours: 72, silentHours: 0 },
      longestHot: { hours: 72 },
    });
    expect(rule(heatRecord(readings(130, 55.1), []), 'five-days')?.hoursOverHot?.made).toBe(120);
  });

  it('has the hours of its spells, and none of what lies between them', () => {
    const cold = readings(1, 54, 11 * 60 * minute);
    const record = heatRecord([...readings(10, 56), ...cold, ...readings(20, 56, 13 * 60 * minute)], []);
    expect(record?.hoursFromHot).toBe(30);
  });
});

describe('the edges of a spell', () => {
  const line = (minutes: number, tempC: number, from: number) =>
    Array.from({ length: minutes }, (_, i) => ({ at: from + i * minute, value: tempC }));
  /** As the roll-ups have them. */
  const rolled = (readings: readonly { at: number; value: number }[]): HeatStep[] => {
    const steps = new Map<number, HeatStep>();
    for (const { at, value } of readings) {
      const from = Math.floor(at / STEP) * STEP;
      const { least, greatest } = steps.get(from) ?? { least: value, greatest: value };
      const both = { least: Math.min(least, value), greatest: Math.max(greatest, value) };
      steps.set(from, { from, to: from + STEP, ...both });
    }
    return [...steps.values()];
  };
  const looked = (readings: readonly { at: number; value: number }[]) => {
    const steps = rolled(readings);
    const spans = unsureSpans(steps, RULE_LINES);
    const asked = readings.filter(({ at }) => spans.some(({ from, to }) => at >= from && at < to));
    return { record: heatRecord(withReadings(steps, spans, asked), []), asked: asked.length };
  };
  /** Hot from 00:04 to so many minutes later, both read. */
  const hot = (minutes: number) => [
    ...line(4, 50, 0),
    ...line(minutes + 1, 56, 4 * minute),
    ...line(30, 50, (5 + minutes) * minute),
  ];

  it('are readings, not the steps that hold them: from 00:04 to 71:59 is no 72 h', () => {
    const short = looked(hot(72 * 60 - 5));
    expect(rule(short.record, 'still')).toMatchObject({ isReached: false, hours: 72 - 5 / 60 });
    expect(rule(looked(hot(72 * 60 - 1)).record, 'still')?.isReached).toBe(false);
    expect(rule(looked(hot(72 * 60)).record, 'still')).toMatchObject({ isReached: true, hours: 72 });
    // what lies within the spell is not asked for
    expect(short.asked).toBeLessThan(60);
  });

  it('are looked for where the probe may have been silent', () => {
    const first = line(40 * 60, 56, 4 * minute);
    const end = first.at(-1)?.at ?? NaN;
    const gap = (minutes: number) => [...first, ...line(40 * 60, 56, end + minutes * minute)];
    expect(looked(gap(15)).record?.longestHot?.hours).toBeGreaterThan(80);
    expect(looked(gap(16)).record?.longestHot?.hours).toBeCloseTo(40 - 1 / 60, 9);
  });

  it('agree with those of all the readings, whatever they are', () => {
    const reading = fc.record({
      after: fc.integer({ min: 1, max: 40 }),
      value: fc.constantFrom(39, 40, 54.9, 55, 56, 76, 77),
    });
    fc.assert(
      fc.property(fc.array(reading, { minLength: 2, maxLength: 60 }), (list) => {
        let at = 0;
        const readings = list.flatMap(({ after, value }) => {
          const begin = at;
          at += after * minute;
          // read for a while and then silent, so that there are insides and gaps
          return line(Math.ceil(after / 2), value, begin);
        });
        const single = readings.map(({ at: from, value }) => ({
          from,
          to: from,
          least: value,
          greatest: value,
        }));
        const [some, all] = [looked(readings).record, heatRecord(single, [])];
        expect(some?.hoursFromHot).toBeCloseTo(all?.hoursFromHot ?? NaN, 9);
        expect(some?.hoursOverTop).toBeCloseTo(all?.hoursOverTop ?? NaN, 9);
        expect(some?.silentHours).toBeCloseTo(all?.silentHours ?? NaN, 9);
        const figures = (record: typeof all) =>
          record?.rules.map(({ hours, hoursOverHot }) => [hours.toFixed(9), hoursOverHot?.made.toFixed(9)]);
        expect(figures(some)).toEqual(figures(all));
      }),
    );
  });
});
