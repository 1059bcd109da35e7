import { describe, expect, it } from 'vitest';
import { coreTrend } from '@/lib/analysis/core';

const day = 86_400_000;
const dawns = (...values: number[]) => values.map((value, i) => ({ at: i * day, value }));

describe('the way of a core', () => {
  it('is a lasting fall where each day takes a like share of it', () => {
    const trend = coreTrend(dawns(52, 51.4, 50.9, 50.2, 49.8, 49.1, 48.6, 48));
    expect(trend).toMatchObject({ days: 7, isLastingFall: true });
    expect(trend?.changeK).toBeCloseTo(-4, 9);
  });

  it('is none where the core only wanders, however low the last day happens to be', () => {
    expect(coreTrend(dawns(50, 51.8, 49.9, 51.6, 50.1, 51.9, 50, 47.8))?.isLastingFall).toBe(false);
  });

  it('is none under 2 K', () => {
    expect(coreTrend(dawns(50, 49.8, 49.6, 49.4, 49.2, 49, 48.8, 48.6))?.isLastingFall).toBe(false);
  });

  it('is of the last week only', () => {
    const trend = coreTrend(dawns(70, 65, 60, 50, 50, 50, 50, 50, 50, 50, 50, 50));
    expect(trend).toEqual({ changeK: 0, days: 7, isLastingFall: false });
  });

  it('is not told from fewer than five dawns', () => {
    expect(coreTrend(dawns(52, 50, 48, 46))).toBeNull();
  });
});
