import { describe, expect, it } from 'vitest';
import { heatLine, heatNights, type HeatNight } from '@/lib/analysis/heat-outdoors';
import { summarise } from '@/lib/analysis/summarise';
import { chance } from './chance';
import { scene } from './scene';

const night = (outdoors: number, kWh: number): HeatNight => ({ night: 'any', outdoors, kWh, sd: 0.4 });

describe('heat against the cold outdoors', () => {
  // Anscombe (1973), first set: slope 0.500, intercept 3.00, residual sum of squares 13.76, slope's deviation 0.118
  const x = [10, 8, 13, 9, 11, 14, 6, 4, 12, 7, 5];
  const y = [8.04, 6.95, 7.58, 8.81, 8.33, 9.96, 7.24, 4.26, 10.84, 4.82, 5.68];

  it('is the line of least squares with the interval of its slope', () => {
    const line = heatLine(x.map((outdoors, i) => night(outdoors, y[i] ?? 0)));
    if ('why' in line) throw new Error(line.why);
    // colder is to the left, so the slope by colder degrees is the other way round
    expect(line.perColderK.value).toBeCloseTo(-0.5, 3);
    expect(line.perColderK.high - line.perColderK.value).toBeCloseTo(2.262 * 0.1179, 3);
    expect(line.scatterKWh).toBeCloseTo(Math.sqrt(13.76 / 9), 2);
    const [first, last] = [line.curve[0], line.curve.at(-1)];
    expect(first?.kWh).toBeCloseTo(3 + 0.5 * 4, 2);
    expect(last?.kWh).toBeCloseTo(3 + 0.5 * 14, 2);
  });

  it('keeps the true slope in 19 of 20 intervals', () => {
    const random = chance(11);
    let kept = 0;
    for (let run = 0; run < 1000; run += 1) {
      const nights = Array.from({ length: 12 }, () => -10 + 8 * random.uniform()).map((outdoors) =>
        night(outdoors, 2 - 0.3 * outdoors + random.normal()),
      );
      const line = heatLine(nights);
      if ('why' in line) throw new Error(line.why);
      if (line.perColderK.low <= 0.3 && line.perColderK.high >= 0.3) kept += 1;
    }
    expect(kept).toBeGreaterThan(930);
    expect(kept).toBeLessThan(970);
  });

  it('is not drawn through few nights, nor through nights all alike', () => {
    expect(heatLine([1, 2, 3, 4, 5, 6, 7].map((i) => night(-i, i)))).toEqual({ why: 'few-nights' });
    expect(heatLine([1, 2, 3, 4, 5, 6, 7, 8].map((i) => night(-i / 10, i)))).toEqual({ why: 'like-nights' });
  });

  it('is made of whole nights with a draw that was read', () => {
    const one = { ...summarise(scene()), complete: true, coverageLow: false };
    const none = [
      { ...one, complete: false },
      { ...one, coverageLow: true },
      { ...one, onSeconds: 0 },
      { ...one, heat: null },
      { ...one, outdoorsLowest: null },
    ];
    expect(heatNights(none)).toEqual([]);
    expect(heatNights([{ ...one, outdoorsLowest: { value: -4, at: one.from } }])).toHaveLength(1);
  });
});
