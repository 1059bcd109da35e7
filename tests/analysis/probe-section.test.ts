import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shrinkage } from '@/lib/analysis/heap-volume';
import { between, hullOf, probeSummary, spotOf, surfaceM, type Section } from '@/lib/analysis/probe-section';

const section: Section = {
  ...{ widthM: 3, heightM: 1, sunkM: 0.6, columns: 4, rows: 3, left: 'N', right: 'S' },
};
const readings = fc.array(
  fc.record({
    x: fc.double({ min: 0, max: 3, noNaN: true }),
    y: fc.double({ min: 0, max: 1.6, noNaN: true }),
    celsius: fc.double({ min: -5, max: 80, noNaN: true }),
  }),
  { minLength: 1, maxLength: 20 },
);

describe('the field between the probes', () => {
  it('meets each probe', () => {
    fc.assert(
      fc.property(readings, (all) => {
        const alone = all.filter(
          (one) => all.filter((other) => Math.hypot(one.x - other.x, one.y - other.y) < 1e-3).length === 1,
        );
        for (const one of alone) expect(between(all, one)).toBeCloseTo(one.celsius, 6);
      }),
    );
  });

  it('is nowhere hotter than the hottest probe, nor colder than the coldest', () => {
    fc.assert(
      fc.property(readings, fc.double({ min: 0, max: 3, noNaN: true }), (all, x) => {
        const value = between(all, { x, y: 0.8 });
        const celsius = all.map((one) => one.celsius);
        expect(value).toBeGreaterThanOrEqual(Math.min(...celsius) - 1e-6);
        expect(value).toBeLessThanOrEqual(Math.max(...celsius) + 1e-6);
      }),
    );
  });
});

describe('the probes’ hull', () => {
  it('is the rim of the grid, not the middle of it', () => {
    const spots = [0, 1, 2].flatMap((x) => [0, 1, 2].map((y) => ({ x, y })));
    expect(hullOf(spots)).toEqual([
      { x: 0, y: 0 },
      { x: 2, y: 0 },
      { x: 2, y: 2 },
      { x: 0, y: 2 },
    ]);
  });

  it('of a line, or of two, is none: nothing lies between them', () => {
    expect(hullOf([0, 1, 2].map((x) => ({ x, y: x })))).toEqual([]);
    expect(
      hullOf([
        { x: 0, y: 0 },
        { x: 1, y: 2 },
      ]),
    ).toEqual([]);
  });
});

it('places lie in the heap, the first column left and the first row on top', () => {
  const all = [0, 1, 2, 3].flatMap((column) => [0, 1, 2].map((row) => spotOf(section, { column, row })));
  for (const { x, y } of all) {
    expect(x > 0 && x < 3 && y > 0).toBe(true);
    expect(y).toBeLessThan(surfaceM(section, x));
  }
  expect(spotOf(section, { column: 0, row: 0 }).x).toBeLessThan(spotOf(section, { column: 3, row: 0 }).x);
  expect(spotOf(section, { column: 0, row: 0 }).y).toBeGreaterThan(spotOf(section, { column: 0, row: 2 }).y);
  expect(surfaceM(section, 1.5)).toBe(1.6);
});

it('a round is summed up by its hottest and coldest place', () => {
  const places = [
    { column: 0, row: 0, celsius: 14.8 },
    { column: 2, row: 1, celsius: 45.4 },
  ];
  expect(probeSummary(places)).toMatchObject({ hottest: { column: 2 }, coldest: { column: 0 }, many: 2 });
  expect(probeSummary([])).toBeNull();
});

describe('how a heap sinks', () => {
  const day = 86_400_000;
  it('is told from the first and the last size, and what was fed between', () => {
    const sizes = [
      { at: 28 * day, volumeM3: 8.1 },
      { at: 0, volumeM3: 10 },
      { at: 14 * day, volumeM3: 9 },
    ];
    const told = shrinkage(sizes, [7 * day, 0]);
    expect(told?.share).toBeCloseTo(0.19, 9);
    expect(told?.aWeek).toBeCloseTo(1 - 0.81 ** 0.25, 9);
    expect(told?.fedMeanwhile).toBe(1);
  });

  it('is not told from one size, and no rate from two days', () => {
    expect(shrinkage([{ at: 0, volumeM3: 10 }], [])).toBeNull();
    const two = shrinkage(
      [
        { at: 0, volumeM3: 10 },
        { at: 2 * day, volumeM3: 9.5 },
      ],
      [],
    );
    expect(two?.aWeek).toBeNull();
  });
});
