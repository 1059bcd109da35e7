import { describe, expect, test } from 'vitest';
import * as units from '@/lib/units/conversion';

describe('temperatures and their differences', () => {
  // (F − 32) / 1.8 by definition: the setpoints and limits that the trade gives in °F.
  test.each([
    [35, 1.6667],
    [45, 7.2222],
    [50, 10],
    [110, 43.3333],
    [130, 54.4444],
    [131, 55],
    [170, 76.6667],
  ])('%d °F is %d °C', (fahrenheit, celsius) => {
    expect(units.celsius(fahrenheit)).toBeCloseTo(celsius, 4);
    expect(units.fahrenheit(units.celsius(fahrenheit))).toBeCloseTo(fahrenheit, 10);
  });

  test('131 °F is 55 °C to the last bit, and 130 °F stays under it', () => {
    expect(units.celsius(131)).toBe(55);
    expect(units.celsius(130)).toBeLessThan(55);
  });

  test('a difference of 10 °F is 5.5556 K, with no offset', () => {
    expect(units.kelvinDifference(10)).toBeCloseTo(5.5556, 4);
    expect(units.fahrenheitDifference(units.kelvinDifference(10))).toBeCloseTo(10, 12);
  });
});

describe('flow, length, energy and heat loss', () => {
  // Exact: ft = 0.3048 m.
  test('90 cfm is 0.04247527 m³/s, or 42.5 L/s', () => {
    const flow = units.cubicMetresPerSecondFromCfm(90);
    expect(flow).toBeCloseTo(0.04247527, 8);
    expect(units.litresPerSecond(flow)).toBeCloseTo(42.475, 3);
    expect(units.cfm(flow)).toBeCloseTo(90, 10);
  });

  // Exact: a cubic yard.
  test('a cube of 3 ft holds 0.764555 m³ within 5.01676 m²', () => {
    expect(units.cubicMetres(27)).toBeCloseTo(0.764555, 6);
    expect(units.squareMetres(54)).toBeCloseTo(5.01676, 5);
  });

  // Exact definition of the Btu (IT).
  test('1 Btu/h is 0.29307107 W', () => {
    expect(units.watts(1)).toBeCloseTo(0.29307107, 8);
    expect(units.btuPerHour(units.watts(1))).toBeCloseTo(1, 12);
  });

  test('1 Btu/(h·ft²·°F) is 5.678263 W/(m²·K)', () => {
    expect(units.wattsPerSquareMetreKelvin(1)).toBeCloseTo(5.678263, 6);
  });

  test.each([
    [units.kilowattHours, units.joules],
    [units.feet, units.metres],
    [units.squareFeet, units.squareMetres],
    [units.cubicFeet, units.cubicMetres],
    [units.pounds, units.kilograms],
    [units.litresPerSecond, units.cubicMetresPerSecond],
    [units.btuPerHourSquareFootFahrenheit, units.wattsPerSquareMetreKelvin],
  ])('%o is undone by %o', (there, back) => {
    expect(back(there(12.34))).toBeCloseTo(12.34, 10);
  });
});
