import { describe, expect, it } from 'vitest';
import { climateOf } from '@/lib/analysis/climate';
import type { Series } from '@/lib/analysis/series';
import { dewPoint } from '@/lib/physics/air';
import { night, series } from './scene';

const climate = (...all: Series[]) =>
  climateOf(new Map(all.map((one) => [one.key, one])), night.from, night.to);
const air = (value: (m: number) => number | null) => series('house-air', 'house-air', value);
const outdoors = (value: (m: number) => number | null) => series('outdoors', 'outdoors', value);
const humidity = (value: (m: number) => number | null) => series('humidity', 'humidity', value);
const bench = (value: (m: number) => number | null) => series('bench-1', 'bench', value);

describe('lift over outdoors', () => {
  it('of 8 K all night is 192 degree-hours', () => {
    expect(
      climate(
        air(() => 5),
        outdoors(() => -3),
      ).liftDegreeHours,
    ).toBeCloseTo(192, 0);
  });

  it('counts a house colder than outdoors below nothing', () => {
    expect(
      climate(
        air(() => -1),
        outdoors(() => 1),
      ).liftDegreeHours,
    ).toBeCloseTo(-48, 0);
  });

  it('is not made of the time in which either was silent', () => {
    const half = climate(
      air(() => 5),
      outdoors((m) => (m < 720 ? -3 : null)),
    );
    expect(half.liftDegreeHours).toBeCloseTo(96, 0);
  });

  it('without a point outdoors is not known, and says why', () => {
    const none = climate(air(() => 5));
    expect([none.liftDegreeHours, none.missing.liftDegreeHours]).toEqual([null, 'no-outdoors']);
  });
});

describe('damp', () => {
  it('counts the hours over 90 %, not those at 90 %', () => {
    const damp = climate(
      air(() => 8),
      humidity((m) => (m < 120 ? 95 : 90)),
    );
    expect(damp.over90Hours).toBeCloseTo(2 + 10 / 3600, 1);
  });

  it('counts the hours in which a bench is at or under the dew point of the air', () => {
    const dew = dewPoint(8, 0.85) ?? 0;
    const wet = climate(
      air(() => 8),
      humidity(() => 85),
      bench((m) => (m >= 600 && m < 780 ? dew - 0.05 : dew + 0.05)),
    );
    expect(wet.underDewPointHours).toBeCloseTo(3, 2);
  });

  it('takes a probe that reads 103 % for saturated air', () => {
    const wet = climate(
      air(() => 8),
      humidity(() => 103),
      bench(() => 7.9),
    );
    expect(wet.underDewPointHours).toBeCloseTo(24, 1);
  });

  it('without a humidity point is not known', () => {
    const dry = climate(air(() => 8));
    expect([dry.over90Hours, dry.underDewPointHours, dry.missing.over90Hours]).toEqual([
      null,
      null,
      'no-humidity',
    ]);
  });
});
