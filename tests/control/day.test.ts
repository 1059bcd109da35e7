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

it('rises by each channel that draws and falls by each that leaves, until the next of these changes', () => {
  let source = settleDay(fresh, 2, 0);
  expect(source.day).toEqual({ usedMs: 0, at: 0, slope: 2, nextAt: DAY });
  source = settleDay(source, 1, 10 * MIN);
  expect(source.day).toEqual({ usedMs: 20 * MIN, at: 10 * MIN, slope: 1, nextAt: DAY });
  source = settleDay(source, 0, 20 * MIN);
  expect(source.day).toEqual({ usedMs: 30 * MIN, at: 20 * MIN, slope: 0, nextAt: DAY });
  // nothing has changed before: it is still reckoned from the instant at which something last did
  expect(settleDay(source, 0, DAY - 1).day).toEqual(source.day);
  source = settleDay(source, 0, DAY);
  expect(source.day).toEqual({ usedMs: 30 * MIN, at: DAY, slope: -2, nextAt: DAY + 10 * MIN });
  source = settleDay(source, 0, DAY + 10 * MIN);
  expect(source.day).toEqual({ usedMs: 10 * MIN, at: DAY + 10 * MIN, slope: -1, nextAt: DAY + 20 * MIN });
  source = settleDay(source, 0, DAY + 20 * MIN);
  expect(source.day).toEqual({ usedMs: 0, at: DAY + 20 * MIN, slope: 0, nextAt: null });
  expect(source.spans).toEqual([]);
});

it('of a load that has run for longer than a day is the whole day, and stays it', () => {
  let source = settleDay(fresh, 1, 0);
  source = settleDay(source, 1, DAY);
  expect(source.day).toEqual({ usedMs: DAY, at: DAY, slope: 0, nextAt: null });
  expect(usedMs(source, 3 * DAY)).toBe(DAY);
  source = settleDay(source, 0, 3 * DAY);
  expect(source.day).toEqual({ usedMs: DAY, at: 3 * DAY, slope: -1, nextAt: 4 * DAY });
});

it('draws told afterwards leave the one that goes on the last, whenever they began, and are in order', () => {
  const drawing = settleDay(fresh, 1, 100 * MIN);
  const told = addSpans(
    drawing,
    [
      [110 * MIN, 115 * MIN, 2],
      [20 * MIN, 50 * MIN, 1],
      [5 * MIN, 6 * MIN, 1],
    ],
    120 * MIN,
  );
  expect(told.spans).toEqual([
    [5 * MIN, 6 * MIN, 1],
    [20 * MIN, 50 * MIN, 1],
    [110 * MIN, 115 * MIN, 2],
    [100 * MIN, null, 1],
  ]);
  // 1 + 30 + 2 · 5 + 20 min; the first to leave is that of 5 min
  expect(told.day).toEqual({ usedMs: 61 * MIN, at: 120 * MIN, slope: 1, nextAt: DAY + 5 * MIN });
});

it('of several channels that flap keeps its content when the oldest spans become one', () => {
  let source = fresh;
  for (let turn = 0; turn < 1400; turn += 1) source = settleDay(source, turn % 2 === 0 ? 2 : 0, turn * MIN);
  expect(source.spans).toHaveLength(500);
  expect(usedMs(source, 1400 * MIN)).toBeCloseTo(1400 * MIN, 0);
  // 700 draws of a minute in 500 spans: the first holds 201 of them, from 0 to 401 min, the rest are as they were
  expect(source.spans[0]?.slice(0, 2)).toEqual([0, 401 * MIN]);
  expect(source.spans[0]?.[2]).toBeCloseTo((201 * 2) / 401, 9);
  expect(source.spans[1]).toEqual([402 * MIN, 403 * MIN, 2]);
});
