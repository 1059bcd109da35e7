import { describe, expect, it } from 'vitest';
import { comparable, compareNights } from '@/lib/analysis/compare';
import type { FigureKey } from '@/lib/analysis/compare-figures';
import { meanOfNights } from '@/lib/analysis/mean-of-nights';
import { nightBefore } from '@/lib/analysis/night';
import type { NightSummary } from '@/lib/analysis/nights';
import { totalOf } from '@/lib/analysis/totals';
import { t95 } from '@/lib/analysis/student';
import { summarise } from '@/lib/analysis/summarise';
import { type Chance, chance } from './chance';
import { scene } from './scene';

const one: NightSummary = { ...summarise(scene()), complete: true, coverageLow: false };
const nightsWith = (
  values: readonly number[],
  change: (value: number, place: number) => Partial<NightSummary>,
  first = '2026-11-01',
): NightSummary[] =>
  values.map((value, place) => ({
    ...one,
    night: nightBefore(first, -place),
    ...change(value, place),
  }));
const heat = (kWh: number, sd = 0.5): Partial<NightSummary> => ({
  heat: { kWh, sd, assumedRunning: false },
});
const figure = (comparison: ReturnType<typeof compareNights>, key: FigureKey) => {
  const found = comparison.figures.find((of) => of.key === key);
  if (found === undefined) throw new Error(`${key} is not compared`);
  return found;
};
/** A spell lasts: each night is so much like the one before. */
function spells(random: Chance, count: number, alike: number): number[] {
  let now = random.normal() / Math.sqrt(1 - alike ** 2);
  return Array.from({ length: count }, () => {
    const value = now;
    now = alike * now + random.normal();
    return value;
  });
}

describe('the mean of nights', () => {
  // of 1,000 runs with a true mean of nothing, how many keep it inside their 95 % interval
  it.each([
    [0, 7],
    [0, 35],
    [0.3, 10],
    [0.3, 35],
    [0.5, 14],
    [0.5, 35],
    [0.7, 100],
  ])(
    'keeps the truth in 19 of 20 intervals, also where nights are alike by %d: %i nights',
    (alike, count) => {
      const random = chance(20_261_201);
      let kept = 0;
      for (let run = 0; run < 1000; run += 1) {
        const mean = meanOfNights(spells(random, count, alike));
        if (mean !== null && Math.abs(mean.mean) <= t95(mean.degrees) * mean.sd) kept += 1;
      }
      expect(kept).toBeGreaterThan(905);
    },
  );

  it('is not so careful that a week beside a week never tells anything', () => {
    const random = chance(4);
    const halves = Array.from({ length: 500 }, () => {
      const mean = meanOfNights(spells(random, 10, 0.3));
      return mean === null ? Infinity : t95(mean.degrees) * mean.sd;
    });
    // what ten nights that are alike by 0.3 could tell at best is 0.8 of their scatter
    expect(halves.toSorted((a, b) => a - b)[250]).toBeLessThan(1.3);
  });

  it('has no deviation under three nights', () => expect(meanOfNights([1, 2])).toBeNull());
  it('of equal nights is sure', () => {
    expect(meanOfNights([2, 2, 2, 2])).toMatchObject({ mean: 2, sd: 0, nights: 4 });
  });
});

describe('nights side by side', () => {
  it('of ranges that do not differ differ beyond chance in one of twenty', () => {
    const random = chance(7);
    let beyond = 0;
    for (let run = 0; run < 400; run += 1) {
      const [a, b] = [spells(random, 14, 0.3), spells(random, 14, 0.3)].map((values) =>
        comparable(nightsWith(values, (value) => heat(4 + value))),
      );
      if (a === undefined || b === undefined) throw new Error('no nights');
      if (figure(compareNights(a, b, 'ranges'), 'heat').isBeyondChance === true) beyond += 1;
    }
    expect(beyond).toBeLessThan(0.075 * 400);
  });

  it('differ beyond chance where they do', () => {
    const random = chance(8);
    const a = comparable(nightsWith(spells(random, 20, 0.2), (value) => heat(6 + value / 2)));
    const b = comparable(nightsWith(spells(random, 20, 0.2), (value) => heat(4 + value / 2)));
    const { difference, isBeyondChance } = figure(compareNights(a, b, 'ranges'), 'heat');
    expect(isBeyondChance).toBe(true);
    expect(difference?.low).toBeGreaterThan(0);
    expect(difference?.low).toBeLessThan(2);
    expect(difference?.high).toBeGreaterThan(2);
  });

  it('of two heaps are compared night with night: weather that both have cancels', () => {
    const random = chance(9);
    const weather = spells(random, 20, 0.5).map((value) => 3 * value);
    const ran = (of: (weather: number) => number) =>
      comparable(nightsWith(weather, (value) => ({ dutyOfNight: of(value) })));
    const a = ran((value) => 0.3 + 0.03 * value + 0.002 * random.normal());
    const b = ran((value) => 0.28 + 0.03 * value + 0.002 * random.normal());
    expect(figure(compareNights(a, b, 'ranges'), 'ran').isBeyondChance).toBe(false);
    expect(figure(compareNights(a, b, 'houses'), 'ran').isBeyondChance).toBe(true);
  });

  it('of two heaps count what their sensors and flows may be wrong by, of one heap they do not', () => {
    const values = [4, 4.1, 3.9, 4.2, 3.8, 4, 4.1, 3.9];
    const a = comparable(nightsWith(values, (value) => heat(value + 0.6)));
    const b = comparable(nightsWith(values, (value) => heat(value)));
    const places = figure(compareNights(a, b, 'houses'), 'heat');
    expect(places.isBeyondChance).toBe(false);
    // two deviations of 0.5 kWh, independent of each other, and nothing from night to night
    expect((places.difference?.high ?? 0) - 0.6).toBeCloseTo(1.96 * Math.SQRT2 * 0.5, 2);
    expect(figure(compareNights(a, b, 'ranges'), 'heat').isBeyondChance).toBe(true);
  });

  it('leave out nights that last or of which too little was read, and say how many', () => {
    const nights = nightsWith([1, 2, 3, 4, 5], (value, place) => ({
      ...heat(value),
      ...(place === 4 ? { complete: false } : place === 0 ? { coverageLow: true } : {}),
    }));
    const compared = compareNights(comparable(nights), comparable(nights), 'ranges');
    expect(compared.chosen).toEqual({ nights: 3, leftOut: 2 });
    expect(figure(compared, 'heat').chosen?.mean).toBe(3);
  });

  it('of two sources of one house leave out what is the house’s own', () => {
    const nights = comparable(nightsWith([1, 2, 3, 4], (value) => heat(value)));
    const keys = compareNights(nights, nights, 'sources').figures.map(({ key }) => key);
    expect(keys).toContain('heat');
    expect(keys).not.toContain('lowest');
    expect(compareNights(nights, nights, 'houses').figures.map(({ key }) => key)).toContain('lowest');
  });

  it('of two houses may differ by what two probes may be wrong by', () => {
    const low = (value: number) => ({ lowest: { ...(one.lowest ?? { point: '', name: '', at: 0 }), value } });
    const a = comparable(nightsWith([4.1, 3.9, 4, 4.2], (value) => low(value + 0.3)));
    const b = comparable(nightsWith([4.1, 3.9, 4, 4.2], (value) => low(value)));
    expect(figure(compareNights(a, b, 'houses'), 'lowest').isBeyondChance).toBe(false);
    expect(figure(compareNights(a, b, 'ranges'), 'lowest').other?.sdWhole).toBeGreaterThan(0.28);
  });

  it('tell heat for a unit of power as Duty does: one ratio of sums, whatever a short night may show', () => {
    const nights = nightsWith([1, 9, 12, 8, 0], (kWh, place) => ({
      ...heat(kWh, kWh / 10),
      heatElectricity: { kWh: [0.005, 0.2, 0.24, 0.16, 0][place] ?? 0 },
    }));
    const told = totalOf(nights).heatPerElectricity;
    const { chosen } = figure(compareNights(comparable(nights), comparable(nights), 'houses'), 'forPower');
    expect(told?.value).toBeCloseTo(30 / 0.605, 9);
    expect(chosen?.mean).toBeCloseTo(told?.value ?? NaN, 9);
    expect(Math.sqrt((chosen?.sdWhole ?? 0) ** 2 - (chosen?.sd ?? 0) ** 2)).toBeCloseTo(told?.sd ?? NaN, 9);
  });

  it('keep the true heat for a unit of power in 19 of 20 intervals', () => {
    const random = chance(12);
    let kept = 0;
    for (let run = 0; run < 400; run += 1) {
      const nights = nightsWith(spells(random, 20, 0.3), (value) => {
        const kWh = 0.15 + 0.04 * Math.tanh(value);
        return { ...heat(40 * kWh + 0.6 * random.normal(), 0), heatElectricity: { kWh } };
      });
      const { chosen } = figure(compareNights(comparable(nights), comparable(nights), 'ranges'), 'forPower');
      if (chosen !== null && Math.abs(chosen.mean - 40) <= t95(chosen.degrees) * chosen.sd) kept += 1;
    }
    expect(kept).toBeGreaterThan(0.93 * 400);
  });

  it('say nothing of a difference where a figure is not known of one of them', () => {
    const a = comparable(nightsWith([1, 2, 3], (value) => heat(value)));
    const b = comparable(nightsWith([1, 2, 3], () => ({ heat: null, heatForPower: null })));
    expect(figure(compareNights(a, b, 'ranges'), 'heat')).toMatchObject({
      other: null,
      difference: null,
      isBeyondChance: null,
    });
  });
});
