import { describe, expect, it } from 'vitest';
import * as format from '@/lib/units/format';
import { USUAL, type Preferences } from '@/lib/units/preferences';

const american: Preferences = { temperature: 'F', clock: 12, flow: 'cfm', length: 'ft' };
/** Figures and units are kept together by a no-break space. */
const spaced = (text: string) => text.replaceAll('\u00a0', ' ');

describe('a figure', () => {
  it('carries a true minus sign', () => expect(format.decimal(-12.25, 1)).toBe('−12.3'));
  it('rounds halves away from zero on both sides', () =>
    expect([0.25, -0.25, 1.05].map((value) => format.decimal(value, 1))).toEqual(['0.3', '−0.3', '1.1']));
  it('never reads minus nought', () =>
    expect([-0.04, -0, 0].map((value) => format.decimal(value, 1))).toEqual(['0.0', '0.0', '0.0']));
});

describe('a temperature', () => {
  it('stands with its unit in the reader’s degrees', () => {
    expect(spaced(format.temperature(-12.34, USUAL))).toBe('−12.3 °C');
    expect(spaced(format.temperature(4, american))).toBe('39.2 °F');
  });
  it('keeps a difference apart from a temperature in °F', () => {
    expect(spaced(format.difference(10, american))).toBe('18.0 °F');
    expect(spaced(format.change(-0.2, USUAL))).toBe('−0.2 °C');
    expect(spaced(format.change(0.2, USUAL))).toBe('+0.2 °C');
    expect(spaced(format.change(0.01, USUAL))).toBe('0.0 °C');
  });
  it('says warmer and colder instead of kelvin', () => {
    expect(spaced(format.warmer(3, USUAL))).toBe('3.0 °C warmer');
    expect(spaced(format.warmer(-5, american))).toBe('9.0 °F colder');
    expect(format.warmer(0.01, USUAL)).toBe('just as warm');
  });
  it('that is missing is not known yet', () =>
    expect([format.temperature(null, USUAL), format.power(null), format.energy(null)]).toEqual(
      Array(3).fill('not known yet'),
    ));
});

describe('heat and power', () => {
  it('carry ± only where they are an estimate', () => {
    expect(spaced(format.energy(2.71, 1, 0.4))).toBe('2.7 ± 0.4 kWh');
    expect(spaced(format.energy(0.0312, 3))).toBe('0.031 kWh');
  });
  it('read in watts, then in kilowatts', () =>
    expect([714.3, 12_345].map(format.power).map(spaced)).toEqual(['714 W', '12.3 kW']));
  it('share, flow and altitude follow the reader', () => {
    expect(spaced(format.share(0.308))).toBe('31 %');
    expect(spaced(format.flow(0.0425, USUAL))).toBe('42.5 L/s');
    expect(spaced(format.flow(0.0425, american))).toBe('90 cfm');
    expect(spaced(format.altitude(310, USUAL))).toBe('310 m');
    expect(spaced(format.altitude(310, american))).toBe('1017 ft');
  });
});

it.each([
  [4, 'Cel', '4.0 °C'],
  [3, 'K', '3.0 °C'],
  [84, '%RH', '84 % RH'],
  [0.84, '/', '84 %'],
  [250.4, 'W/m2', '250 W/m²'],
  [812, 'ppm', '812 ppm'],
  [0.42, 'A', '0.42 A'],
  [12.1, 'm/s', '12.10 m/s'],
])('a point at %d %s reads %s', (value, unit, text) =>
  expect(spaced(format.pointValue(value, unit, USUAL))).toBe(text),
);

it('a count agrees with its noun', () =>
  expect([format.count(1, 'start'), format.count(4, 'start')].map(spaced)).toEqual(['1 start', '4 starts']));
