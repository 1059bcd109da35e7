import { describe, expect, it } from 'vitest';
import { barsPath, BARS_HIGH, overviewTicks } from '@/components/duty/overview-layout';
import { packStrip, stripPaths } from '@/components/duty/strip-paths';
import { arrowStep, dayAt, type YearDay, yearLayout } from '@/components/duty/year-layout';
import { nightBefore } from '@/lib/analysis/night';
import type { StripSpan } from '@/lib/analysis/nights';

/** Seconds from the night's noon at which strokes of a path begin and end. */
function strokesOf(path: string): [number, number][] {
  let at = 0;
  return [...path.matchAll(/m(\d+) 0h(\d+)/g)].map(([, skip = '', length = '']) => {
    const from = at + Number(skip);
    at = from + Number(length);
    return [from, at];
  });
}

const drawn = (spans: readonly StripSpan[]) => stripPaths(packStrip(spans));

describe('a strip', () => {
  it('draws every run from its second to its second, and each kind apart', () => {
    const strip = drawn([
      ['run', 600, 1800, true],
      ['rest', 1800, 3600, false],
      ['run', 3600, 4200, true],
      ['held', 4200, 9000, false],
    ]);
    expect(strokesOf(strip.run ?? '')).toEqual([
      [600, 1800],
      [3600, 4200],
    ]);
    expect(strokesOf(strip.rest ?? '')).toEqual([[1800, 3600]]);
    expect(strokesOf(strip.held ?? '')).toEqual([[4200, 9000]]);
    expect(Object.keys(strip).sort()).toEqual(['held', 'rest', 'run']);
  });

  it('draws spans that meet as one, and none of no length', () => {
    const spans: StripSpan[] = [
      ['run', 60, 120, true],
      ['run', 120, 120, true],
      ['run', 120, 300, true],
    ];
    expect(drawn(spans)).toEqual({ run: 'm60 0h240' });
  });

  it('leaves what was off, and what nobody knows, empty', () => {
    const spans: StripSpan[] = [
      ['off', 0, 300, false],
      ['run', 300, 900, true],
      ['off', 900, 1200, false],
      ['run', 1500, 1800, true],
      ['off', 1800, 86_400, false],
    ];
    expect(strokesOf(drawn(spans).run ?? '')).toEqual([
      [300, 900],
      [1500, 1800],
    ]);
    expect(Object.keys(drawn(spans))).toEqual(['run']);
    expect(drawn([['off', 0, 86_400, false]])).toEqual({});
  });

  it('goes over the line with each second told once', () => {
    const spans: StripSpan[] = [
      ['run', 600, 1800, true],
      ['rest', 1800, 3600, false],
      ['off', 3600, 86_400, false],
    ];
    expect(packStrip(spans)).toBe('n600r1200x1800');
  });

  it('outlines what was by hand, on apart from off', () => {
    const strip = drawn([
      ['hand', 0, 900, true],
      ['hand', 900, 1200, false],
    ]);
    expect(strip).toEqual({
      handOn: 'M0-.45h900v.9H0z',
      handOff: 'M900-.45h300v.9H900z',
    });
  });
});

const nights = (first: string, count: number) =>
  Array.from({ length: count }, (_, place) => nightBefore(first, -place));

describe('the overview', () => {
  it('draws the greatest night as high as there is room, and a negative one below the line', () => {
    const { bars, zero } = barsPath([3, null, -1]);
    expect(zero).toBe(BARS_HIGH * 0.75);
    expect(bars).toBe('M0.1 0h.8v30h-.8zM2.1 30h.8v10h-.8z');
  });

  it('draws nothing where nothing was given', () => {
    expect(barsPath([0])).toEqual({ bars: '', zero: 0 });
  });

  it('names Sundays under weeks and months under a year, and never too many', () => {
    expect(overviewTicks(nights('2026-11-01', 35)).map((tick) => tick.label)).toEqual([
      '1 Nov',
      '8 Nov',
      '15 Nov',
      '22 Nov',
      '29 Nov',
    ]);
    const year = overviewTicks(nights('2025-11-15', 380));
    expect(year.length).toBeLessThanOrEqual(8);
    expect(year.map((tick) => tick.label)).toContain('Dec');
  });
});

const day = (night: string, more: Partial<YearDay> = {}): YearDay => ({
  ...{ night, ran: 0 },
  ...more,
});

describe('the year', () => {
  const year = nights('2025-11-27', 371).map((night) => day(night, { ran: 0.2 }));
  const layout = yearLayout(year);

  it('has a column a week from Monday, so that a week apart is a column apart', () => {
    // 27 November 2025 was a Thursday
    expect(layout.cells[0]).toEqual({ week: 0, weekday: 3 });
    expect(layout.cells[7]).toEqual({ week: 1, weekday: 3 });
    expect(layout.weeks).toBe(54);
  });

  it('finds the night under a pointer, and none before the first', () => {
    expect(dayAt(layout, 1, 3)).toBe(7);
    expect(dayAt(layout, 0, 0)).toBeNull();
  });

  it('goes a night up and down and a week left and right', () => {
    expect(['ArrowUp', 'ArrowDown', 'ArrowLeft', 'ArrowRight', 'x'].map(arrowStep)).toEqual([
      -1,
      1,
      -7,
      7,
      null,
    ]);
  });

  it('fills a night by area: half the run is half the square', () => {
    const { fills } = yearLayout([day('2026-11-23', { ran: 0.4 }), day('2026-11-24', { ran: 0.2 })]);
    const sides = [...fills.matchAll(/h([\d.]+)v/g)].map(([, side]) => Number(side));
    expect(sides[0]).toBeCloseTo(0.86, 2);
    expect((sides[1] ?? 0) ** 2 / (sides[0] ?? 1) ** 2).toBeCloseTo(0.5, 1);
  });

  it('leaves a night out that is not kept, and outlines one under the frost limit', () => {
    const gap = yearLayout([day('2026-11-23'), day('2026-11-25', { isCold: true })]);
    expect(gap.cells).toEqual([
      { week: 0, weekday: 0 },
      { week: 0, weekday: 2 },
    ]);
    expect(gap.cold.match(/M/g)).toHaveLength(1);
    expect(yearLayout([]).weeks).toBe(0);
  });
});
