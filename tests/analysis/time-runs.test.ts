import fc from 'fast-check';
import { expect, it } from 'vitest';
import { timeRuns, timesOfRuns } from '@/lib/analysis/time-runs';

it('a winter of even steps is three numbers', () => {
  const times = Array.from({ length: 50_000 }, (_, i) => 1_700_000_000_000 + i * 300_000);
  expect(timeRuns(times)).toEqual([1_700_000_000_000, 300_000, 50_000]);
});

it('any times come back as they were, in their order', () => {
  fc.assert(
    fc.property(fc.array(fc.integer({ min: 0, max: 20 })), (times) => {
      expect(timesOfRuns(timeRuns(times))).toEqual(times);
    }),
  );
});
