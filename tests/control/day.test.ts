// On time over the rolling 24 h as the spans say it, against their plain sum; and what is kept of them.
import fc from 'fast-check';
import { expect, it } from 'vitest';
import { addSpans, settleDay, usedMs } from '@/lib/control/day';
import type { SourceMemory } from '@/lib/control/memory';

const DAY = 86_400_000;
const MIN = 60_000;
const fresh: SourceMemory = {
  ...{ id: 'heap', credit: 1, creditAt: 0, slope: 0, resting: false, restSince: null, restWhy: null },
  ...{ ranToMost: false, draws: 0, spans: [], underFloor: false, ready: true, aboveSince: null },
  day: { usedMs: 0, at: 0, slope: 0, nextAt: null },
};

/** By definition: each channel's on time within the 24 h up to `at`. */
const plainSum = (drawn: readonly [number, number, number][], at: number): number =>
  drawn.reduce((sum, [from, to, channels]) => {
    const length = Math.min(to, at) - Math.max(from, at - DAY);
    return length > 0 ? sum + length * channels : sum;
  }, 0);

it('the sum over 24 h is the plain sum of the draws, whenever it is asked', () => {
  const turns = fc.array(
    fc.record({ after: fc.integer({ min: 1, max: 500 }), draws: fc.integer({ min: 0, max: 3 }) }),
    { minLength: 1, maxLength: 60 },
  );
  fc.assert(
    fc.property(turns, fc.integer({ min: 0, max: 3000 }), (steps, later) => {
      let source = fresh;
      let now = 0;
      const drawn: [number, number, number][] = [];
      for (const { after, draws } of steps) {
        const from = now;
        now += after * MIN;
        if (source.draws > 0) drawn.push([from, now, source.draws]);
        source = settleDay(source, draws, now);
        expect(usedMs(source, now)).toBeCloseTo(plainSum(drawn, now), 3);
      }
      const asked = now + later * MIN;
      const all =
        source.draws > 0 ? [...drawn, [now, asked, source.draws] as [number, number, number]] : drawn;
      expect(usedMs(source, asked)).toBeCloseTo(plainSum(all, asked), 3);
    }),
  );
});

it('a draw that is told afterwards counts, and the one that goes on is still ended where it ends', () => {
  const drawing = settleDay(fresh, 1, 100 * MIN);
  const told = addSpans(drawing, [[20 * MIN, 50 * MIN, 1]], 120 * MIN);
  expect(told.spans).toEqual([
    [20 * MIN, 50 * MIN, 1],
    [100 * MIN, null, 1],
  ]);
  expect(usedMs(told, 120 * MIN)).toBe(50 * MIN);
  const ended = settleDay(told, 0, 130 * MIN);
  expect(ended.spans.at(-1)).toEqual([100 * MIN, 130 * MIN, 1]);
  expect(usedMs(ended, 200 * MIN)).toBe(60 * MIN);
});

it('what is older than a day is no longer kept, and what is on still is', () => {
  let source = settleDay(fresh, 1, 0);
  source = settleDay(source, 0, 10 * MIN);
  source = settleDay(source, 1, DAY);
  source = settleDay(source, 2, DAY + 11 * MIN);
  expect(source.spans).toEqual([
    [DAY, DAY + 11 * MIN, 1],
    [DAY + 11 * MIN, null, 2],
  ]);
  expect(settleDay(source, 0, DAY + 12 * MIN).spans).toHaveLength(2);
});

it('a load that flaps swells no memory: the oldest spans become one of the same content', () => {
  let source = fresh;
  for (let turn = 0; turn < 1400; turn += 1) source = settleDay(source, turn % 2 === 0 ? 1 : 0, turn * MIN);
  expect(source.spans).toHaveLength(500);
  expect(usedMs(source, 1400 * MIN)).toBeCloseTo(700 * MIN, 0);
  const many = Array.from({ length: 600 }, (_, one): [number, number, number] => [
    one * 2 * MIN,
    (one * 2 + 1) * MIN,
    1,
  ]);
  const told = addSpans(fresh, many, 1400 * MIN);
  expect(told.spans).toHaveLength(500);
  expect(usedMs(told, 1400 * MIN)).toBeCloseTo(600 * MIN, 0);
});
