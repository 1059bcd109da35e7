import { describe, expect, it } from 'vitest';
import { shiftOf, theilSen } from '@/lib/analysis/ranks';
import { fullyApart } from '../checks/ranks';
import { chance } from './chance';

const upTo = (n: number, from = 0) => Array.from({ length: n }, (_, i) => from + i);

describe('two groups by their ranks', () => {
  it.each(fullyApart)('of $before and $after, wholly apart, have the chance $p', ({ before, after, p }) => {
    expect(shiftOf(upTo(before), upTo(after, 100))?.p).toBeCloseTo(p, 12);
  });

  it('differ by the median of all differences', () => {
    expect(shiftOf([1, 2, 4], [11, 12, 14])?.shift.value).toBe(10);
  });

  it('have no 95 % interval while they are too few', () => {
    expect(shiftOf([1, 2, 3], [11, 12, 13])?.shift).toMatchObject({ low: null, high: null });
    expect(shiftOf([1, 2, 3, 4], [11, 12, 13, 14])?.shift).toMatchObject({ low: 7, high: 13 });
  });

  it('are alike where all are the same', () => {
    expect(shiftOf([1, 1, 1, 1], [1, 1, 1, 1])?.p).toBe(1);
  });

  it('are found different in one of twenty cases at most where nothing is', { timeout: 60_000 }, () => {
    const { normal } = chance(7);
    let found = 0;
    for (let run = 0; run < 2000; run += 1) {
      const shift = shiftOf(upTo(7).map(normal), upTo(7).map(normal));
      if (shift !== null && shift.p <= 0.05) found += 1;
    }
    expect(found / 2000).toBeLessThanOrEqual(0.055);
    expect(found / 2000).toBeGreaterThan(0.02);
  });
});

describe('a slope by the median of pairs', () => {
  it('is not moved by one wild value', () => {
    const places = upTo(9).map((x) => ({ x, y: x === 4 ? 1000 : 2 * x }));
    expect(theilSen(places)?.value).toBe(2);
  });

  it('has no interval under five places, and the whole range of slopes with five', () => {
    const line = (n: number) => theilSen(upTo(n).map((x) => ({ x, y: x * x })));
    expect(line(4)).toMatchObject({ low: null, high: null });
    expect(line(5)).toMatchObject({ low: 1, high: 7 });
  });

  it('holds the true slope in 95 % of cases at least', { timeout: 60_000 }, () => {
    const { normal } = chance(11);
    let hits = 0;
    for (let run = 0; run < 1000; run += 1) {
      const slope = theilSen(upTo(10).map((x) => ({ x, y: 0.3 * x + normal() })));
      if ((slope?.low ?? -Infinity) <= 0.3 && 0.3 <= (slope?.high ?? Infinity)) hits += 1;
    }
    expect(hits / 1000).toBeGreaterThanOrEqual(0.94);
  });
});
