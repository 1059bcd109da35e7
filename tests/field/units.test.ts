import { describe, expect, test } from 'vitest';
import fc from 'fast-check';
import { pointUnits, toPointUnit, type PointUnit } from '@/lib/field/units';

const value = (sent: number, from: string | undefined, to: PointUnit): number | string => {
  const converted = toPointUnit(sent, from, to);
  return converted.ok ? converted.value : converted.why;
};

describe('units that are converted', () => {
  test.each<[number, string, PointUnit, number]>([
    [131, 'Far', 'Cel', 55],
    [32, 'Far', 'Cel', 0],
    [-40, 'Far', 'Cel', -40],
    [1.5, 'kW', 'W', 1500],
    [0.25, 'kWh', 'Wh', 250],
    [3600, 'J', 'Wh', 1],
    [250, 'mA', 'A', 0.25],
    [900, 'hPa', 'Pa', 90000],
    [18, 'km/h', 'm/s', 5],
    [42.5, 'l/s', 'm3/s', 0.0425],
    [0.00042, '/', 'ppm', 420],
    [450, 'ppm', 'ppm', 450],
    [55, '/100', '/', 0.55],
  ])('%d %s is %s', (sent, from, to, expected) => {
    expect(value(sent, from, to)).toBeCloseTo(expected, 12);
  });

  test('% is the same ratio as /, not a percentage (RFC 8428, 12.1 note 2)', () => {
    expect(value(0.55, '%', '/')).toBe(0.55);
    expect(value(1, '%', '%')).toBe(1);
  });

  test('a record without a unit is in the unit of its point', () => {
    expect(value(4.25, undefined, 'Cel')).toBe(4.25);
  });

  test('a value in its own unit comes back to the last bit', () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true }),
        fc.constantFrom(...pointUnits),
        (sent, unit) => {
          expect(value(sent, unit, unit)).toBe(sent);
        },
      ),
    );
  });
});

describe('units that are refused, with the reason', () => {
  test.each<[string, PointUnit, string]>([
    ['K', 'Cel', 'a temperature difference'],
    ['Cel', 'K', 'a temperature, but'],
    ['Far', 'K', 'a temperature, but'],
    ['%', '%RH', 'a ratio from 0 to 1'],
    ['/', '%RH', 'a ratio from 0 to 1'],
    ['%RH', '/', 'a relative humidity'],
    ['W', 'W/m2', 'a power'],
    ['W', 'Wh', 'a power'],
    ['cel', 'Cel', '"cel" is not known'],
    ['furlong', 'm/s', '"furlong" is not known'],
    ['', 'Cel', 'is not known'],
  ])('%s for a point in %s', (from, to, why) => {
    expect(value(1, from, to)).toContain(why);
  });

  test.each([Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.NaN])('%d is no value', (sent) => {
    expect(value(sent, 'Cel', 'Cel')).toContain('not a finite number');
  });
});
