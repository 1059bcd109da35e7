import { describe, expect, it } from 'vitest';
import { pastDoubts } from '@/components/watch/standing';
import type { HouseState } from '@/lib/schema/house-state';

const MIN = 60_000;
const iso = (minutes: number) => new Date(minutes * MIN).toISOString();
type Doubt = [from: number, to: number, why?: string];
const state = (...points: { name: string; doubt: Doubt | null; quality?: 'good' | 'bad' }[]): HouseState => ({
  ...{ at: iso(1000), channels: [], sources: [], nodes: [] },
  points: points.map(({ name, doubt, quality = 'good' }) => ({
    ...{ key: name, name, role: 'bench', unit: 'Cel', value: 5, at: iso(1000), quality, why: null },
    lastDoubt: doubt && { from: iso(doubt[0]), to: iso(doubt[1]), why: doubt[2] ?? 'silent' },
  })),
});

describe('Doubts of a night that are over', () => {
  it('are told the latest first, without those of before the night, of seconds, and of points not good yet', () => {
    const told = pastDoubts(
      state(
        { name: 'early', doubt: [10, 40] },
        { name: 'a', doubt: [110, 140] },
        { name: 'b', doubt: [200, 230, 'frozen'] },
        { name: 'short', doubt: [300, 300.5] },
        { name: 'bad', doubt: [300, 330], quality: 'bad' },
        { name: 'never', doubt: null },
      ),
      100 * MIN,
    );
    expect(told).toEqual([
      { name: 'b', why: 'frozen', from: 200 * MIN, to: 230 * MIN },
      { name: 'a', why: 'silent', from: 110 * MIN, to: 140 * MIN },
    ]);
  });

  it('are one where three points and more fell silent together', () => {
    const told = pastDoubts(
      state(
        { name: 'a', doubt: [110, 140] },
        { name: 'b', doubt: [111, 140.2] },
        { name: 'c', doubt: [112, 140.4] },
        { name: 'd', doubt: [110, 150] },
      ),
      0,
    );
    expect(told.map(({ name, from }) => [name, from / MIN])).toEqual([
      ['d', 110],
      ['3 points', 110],
    ]);
  });

  it('are none of a house that no step has seen', () => expect(pastDoubts(null, 0)).toEqual([]));
});
