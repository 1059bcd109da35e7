// The warm-hand test finds the probe that is held, and says when nothing can be told.
import { describe, expect, it } from 'vitest';
import { warmHand } from '@/lib/analysis/warm-hand';
import { USUAL } from '@/lib/units/preferences';
import { handWords } from '@/lib/wording/warm-hand';

const HELD = 100_000;
const point = (key: string, before: readonly number[], since: readonly number[]) => ({
  key,
  readings: [
    ...before.map((value, at) => ({ at: HELD - (before.length - at) * 10_000, value })),
    ...since.map((value, at) => ({ at: HELD + (at + 1) * 10_000, value })),
  ],
});
const still = point('air', [6, 6.1, 6], [6, 6.2, 6.1]);

describe('a held probe', () => {
  it('is the one that warms by 3 °C over what it read before', () => {
    expect(warmHand([point('bench', [5, 5, 5], [6, 8.1]), still], HELD).warmed).toBe('bench');
    expect(warmHand([point('bench', [5, 5, 5], [6, 7.9]), still], HELD).warmed).toBeNull();
  });
  it('may be let go again: the greatest rise counts', () => {
    expect(warmHand([point('bench', [5], [9, 6]), still], HELD).warmed).toBe('bench');
  });
  it('is not told from another that warms with it', () => {
    const found = warmHand([point('bench', [5], [9]), point('by', [5], [8]), still], HELD);
    expect(found).toMatchObject({ warmed: null, with: ['bench', 'by'] });
  });
  it('is not judged by one reading that lies before, and a point without readings warms by nothing', () => {
    const found = warmHand([point('bench', [], [9]), point('new', [5], [])], HELD);
    expect(found).toEqual({
      rises: [
        { key: 'bench', rise: null },
        { key: 'new', rise: null },
      ],
      ...{ warmed: null, with: [] },
    });
  });
});

describe('in words', () => {
  const name = (key: string) => ({ bench: 'Bench probe 1', air: 'House air' })[key] ?? key;
  const words = (rising: string, seconds = 40) => {
    const points = ['bench', 'air'].map((key) => point(key, [5], [key === rising ? 9 : 5]));
    return handWords(warmHand(points, HELD), 'bench', name, seconds, USUAL);
  };
  it('the right probe is said to be where it should be', () => {
    expect(words('bench')).toMatchObject({ tone: 'good', exchangeWith: null });
  });
  it('a swapped one is named, and the two can be exchanged', () => {
    const told = words('air');
    expect(told.exchangeWith).toBe('air');
    expect(told.text).toContain('You hold Bench probe 1, yet House air warmed by 4.0');
  });
  it('nothing after three minutes is said to be nothing', () => {
    expect(words('none').tone).toBe('quiet');
    expect(words('none', 181).text).toContain('Nothing warmed');
  });
});
