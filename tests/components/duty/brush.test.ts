import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { brushOf, drawn, handleAt, keyStep, moved, placeAt } from '@/components/duty/brush';

const brush = { first: 10, last: 16 };

describe('a brush over nights', () => {
  it('takes the night under the pointer, and the last one at the very edge', () => {
    expect([0, 0.2857, 0.999, 1, -0.2, 1.3].map((part) => placeAt(part, 35))).toEqual([0, 9, 34, 34, 0, 34]);
  });

  it('is drawn from where the pointer went down to where it is, either way', () => {
    expect(drawn(20, 14, 35)).toEqual({ first: 14, last: 20 });
    expect(drawn(30, 90, 35)).toEqual({ first: 30, last: 34 });
  });

  it('moves one end by a key and stops at the other', () => {
    expect(moved(brush, 'first', 1, 35)).toEqual({ first: 11, last: 16 });
    expect(moved(brush, 'first', 50, 35)).toEqual({ first: 16, last: 16 });
    expect(moved(brush, 'last', -50, 35)).toEqual({ first: 10, last: 10 });
  });

  it('keeps its length when it is moved whole, also at the ends', () => {
    expect(moved(brush, 'both', 100, 35)).toEqual({ first: 28, last: 34 });
    expect(moved(brush, 'both', -100, 35)).toEqual({ first: 0, last: 6 });
  });

  it('knows the keys of a slider and no others', () => {
    expect(keyStep('ArrowRight', 35)).toBe(1);
    expect(keyStep('PageDown', 35)).toBe(-7);
    expect(keyStep('End', 35)).toBe(35);
    expect(keyStep('a', 35)).toBeNull();
  });

  it('is taken by an end, by its inside, or not at all', () => {
    expect(handleAt(brush, 9.5, 1)).toBe('first');
    expect(handleAt(brush, 16.5, 1)).toBe('last');
    expect(handleAt(brush, 13, 1)).toBe('both');
    expect(handleAt(brush, 20, 1)).toBeNull();
  });

  it('of one night can be pulled apart to either side', () => {
    const one = { first: 5, last: 5 };
    expect(handleAt(one, 4.5, 1)).toBe('first');
    expect(handleAt(one, 5.5, 1)).toBe('last');
  });

  it('finds its nights by name, also where the address names some that are not there', () => {
    const nights = ['2026-11-01', '2026-11-02', '2026-11-04'];
    expect(brushOf(nights, '2026-11-02', '2026-11-03')).toEqual({ first: 1, last: 1 });
    expect(brushOf(nights, '2026-10-01', '2026-12-24')).toEqual({ first: 0, last: 2 });
    expect(brushOf(nights, '2026-12-01', '2026-12-24')).toBeNull();
  });

  it('never leaves the row nor turns over, however it is moved', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 400 }),
        fc.nat(500),
        fc.nat(500),
        fc.array(fc.tuple(fc.constantFrom('first', 'last', 'both'), fc.integer({ min: -500, max: 500 }))),
        (count, from, to, moves) => {
          let now = drawn(from, to, count);
          for (const [handle, by] of moves) {
            now = moved(now, handle, by, count);
            expect(now.first).toBeGreaterThanOrEqual(0);
            expect(now.last).toBeLessThan(count);
            expect(now.first).toBeLessThanOrEqual(now.last);
          }
        },
      ),
    );
  });
});
