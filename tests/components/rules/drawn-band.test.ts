import { describe, expect, it } from 'vitest';
import type { NightLayout } from '@/components/chart/night-layout';
import { drawnBand } from '@/components/rules/drawn-band';
import { RuleBody } from '@/lib/schema/rule';
import { USUAL } from '@/lib/units/preferences';

/** A night of 1440 px, one a minute, and 10 px a kelvin, 0 °C at the foot. */
const layout = {
  ...{ x0: 0, x1: 1440, yTop: 0, yBottom: 100 },
  degrees: [
    { celsius: 0, y: 100 },
    { celsius: 10, y: 0 },
  ],
} as unknown as NightLayout;
const pieces = (from: string[], sun = { sunset: 240, sunrise: 1200 }) => {
  const band = from.map((one, place) => ({ from: one, low: 2 + place, high: 5 + place }));
  const body = RuleBody.parse({ purpose: 'warm', point: 'bench', band });
  return drawnBand(body, layout, sun, USUAL).map(({ x, y, width }) => [x, width, y]);
};

describe('the band over a night', () => {
  it('of one period lies over all of it', () => expect(pieces(['06:00'])).toEqual([[0, 1440, 50]]));

  it('changes where the clock says, the last one holding from before', () => {
    // 22:00 is 600 min after noon, 06:00 is 1080
    expect(pieces(['22:00', '06:00'])).toEqual([
      [0, 600, 40],
      [600, 480, 50],
      [1080, 360, 40],
    ]);
  });

  it('changes where the sun says on that night', () => {
    expect(pieces(['sunrise+00:30', 'sunset-01:00'])).toEqual([
      [0, 180, 50],
      [180, 1050, 40],
      [1230, 210, 50],
    ]);
  });

  it('leaves out what the sun does not do that night', () => {
    const polar = { sunset: null, sunrise: null } as unknown as { sunset: number; sunrise: number };
    expect(pieces(['00:00', 'sunset'], polar)).toEqual([
      [0, 720, 50],
      [720, 720, 50],
    ]);
  });
});
