// What an interlock would have prevented, worked by hand on a minute's scale.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { byNight, prevented, united, without, type Stretch } from '@/lib/analysis/interlock-replay';
import { interlockRefusal, replayWords } from '@/lib/wording/interlock-replay';
import { interlockLayout } from '@/components/wiring/interlock-layout';

const min = (from: number, to: number): Stretch => ({ from: from * 60_000, to: to * 60_000 });

describe('never-with', () => {
  const never = (delayS: number) => ({ kind: 'never-with' as const, delayS });
  it('would have prevented the time in which both ran', () => {
    expect(prevented(never(0), [min(0, 10), min(20, 30)], [min(5, 25)])).toEqual([min(5, 10), min(20, 25)]);
  });
  it('would have kept the wait between the two, whichever came first', () => {
    expect(prevented(never(60), [min(0, 10)], [min(10, 20)])).toEqual([min(10, 11)]);
    expect(prevented(never(120), [min(11, 20)], [min(0, 10)])).toEqual([min(11, 12)]);
    expect(prevented(never(60), [min(0, 10)], [min(11, 20)])).toEqual([]);
  });
});

describe('needs', () => {
  const needs = (delayS: number) => ({ kind: 'needs' as const, delayS });
  it('would have prevented the run without the other, and before its wait was over', () => {
    expect(prevented(needs(0), [min(0, 30)], [min(10, 20)])).toEqual([min(0, 10), min(20, 30)]);
    expect(prevented(needs(120), [min(10, 20)], [min(10, 20)])).toEqual([min(10, 12)]);
    expect(prevented(needs(3600), [min(10, 20)], [min(10, 20)])).toEqual([min(10, 20)]);
    expect(prevented(needs(0), [], [min(10, 20)])).toEqual([]);
  });
});

const stretches = fc
  .array(fc.tuple(fc.integer({ min: 0, max: 200 }), fc.integer({ min: 1, max: 40 })), { maxLength: 8 })
  .map((all) => all.map(([from, long]) => ({ from, to: from + long })));
const inside = (all: readonly Stretch[], at: number) => all.some(({ from, to }) => at >= from && at < to);

it('each instant is prevented just when the plain rule says so', () => {
  fc.assert(
    fc.property(stretches, stretches, (own, other) => {
      const both = prevented({ kind: 'never-with', delayS: 0 }, own, other);
      const alone = prevented({ kind: 'needs', delayS: 0 }, own, other);
      for (let at = 0; at <= 240; at += 1) {
        expect(inside(both, at)).toBe(inside(own, at) && inside(other, at));
        expect(inside(alone, at)).toBe(inside(own, at) && !inside(other, at));
      }
      expect(united(both)).toEqual(both);
      expect(without(own, own)).toEqual([]);
    }),
  );
});

it('a stretch over noon is counted in both nights, with its seconds where they fell', () => {
  const nights = [
    { night: '2026-11-26', ...min(0, 100) },
    { night: '2026-11-27', ...min(100, 200) },
  ];
  expect(byNight([min(90, 130)], nights)).toEqual([
    { night: '2026-11-26', count: 1, seconds: 600 },
    { night: '2026-11-27', count: 1, seconds: 1800 },
  ]);
});

describe('in words', () => {
  it('tells nights, times and how long', () => {
    const nights = [
      { night: '2026-11-26', count: 2, seconds: 1500 },
      { night: '2026-11-27', count: 0, seconds: 0 },
    ];
    expect(replayWords({ nights, count: 2, seconds: 1500 }, 'never-with')).toMatch(
      /^In the last two nights it would have prevented both at once 2 times, 25\u00a0min in all: 26 Nov 25\u00a0min\./,
    );
    expect(replayWords({ nights: [], count: 0, seconds: 0 }, 'needs')).toContain('prevented nothing');
  });
  const label = (key: string) => key.toUpperCase();
  const needs = (channel: string, other: string) => ({ channel, kind: 'needs' as const, other });
  it('a ring of needs is refused while it is typed, by name', () => {
    expect(interlockRefusal(needs('c', 'a'), [needs('a', 'b'), needs('b', 'c')], label)).toBe(
      'Each would wait for the next: the C needs the A needs the B needs the C.',
    );
    expect(interlockRefusal(needs('a', 'c'), [needs('a', 'b'), needs('b', 'c')], label)).toBeNull();
  });
  it('the same twice, itself, and a contradiction are refused', () => {
    const never = { channel: 'a', kind: 'never-with' as const, other: 'b' };
    expect(interlockRefusal(never, [{ ...never, channel: 'b', other: 'a' }], label)).toContain('already');
    expect(interlockRefusal(needs('a', 'b'), [never], label)).toContain('never run together');
    expect(interlockRefusal(needs('a', 'a'), [], label)).toContain('itself');
  });
});

it('the drawing has an arc for each interlock whose channels are there, none upon another', () => {
  const lock = (channel: string, other: string) => ({ channel, kind: 'never-with' as const, other });
  const { arcs, rows, width } = interlockLayout(
    ['a', 'b', 'c'],
    [lock('a', 'b'), { ...lock('b', 'a'), kind: 'needs' }, lock('a', 'gone'), lock('a', 'a'), lock('a', 'c')],
  );
  expect(arcs.map(({ channel, other }) => `${channel}${other}`)).toEqual(['ab', 'ba', 'ac']);
  expect(new Set(arcs.map((one) => one.middle.x)).size).toBe(3);
  expect(Math.max(...arcs.map((one) => one.middle.x))).toBeLessThan(width);
  expect(rows).toHaveLength(3);
});
