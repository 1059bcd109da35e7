import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fieldText, fieldUnit, fieldValue, unreadable, type Quantity } from '@/lib/units/fields';
import { USUAL, type Preferences } from '@/lib/units/preferences';

const american: Preferences = { ...USUAL, temperature: 'F', clock: 12, flow: 'cfm' };

describe('a field', () => {
  it.each<[string, Quantity, Preferences, number | null]>([
    ['39,2', 'temperature', american, 4],
    ['−4.5', 'temperature', USUAL, -4.5],
    ['5.4', 'difference', american, 3],
    ['40', 'minutes', USUAL, 2400],
    ['1 h 30', 'minutes', USUAL, 5400],
    ['90 s', 'minutes', USUAL, 90],
    ['90', 'seconds', USUAL, 90],
    ['2 min', 'seconds', USUAL, 120],
    ['8', 'hours', USUAL, 28_800],
    ['7 h 30', 'hours', USUAL, 27_000],
    ['90', 'litres-per-second', american, 42.47527],
    ['502', 'whole', USUAL, 502],
    ['0', 'whole', USUAL, 0],
    ['1.5', 'whole', USUAL, null],
    ['', 'number', USUAL, null],
    ['four', 'temperature', USUAL, null],
    ['1e999', 'number', USUAL, null],
    ['<b>4</b>', 'temperature', USUAL, null],
  ])('reads %j as %s', (text, quantity, preferences, value) => {
    expect(fieldValue(text, quantity, preferences)).toBe(value);
  });

  it('shows nothing for what is not set', () => {
    expect([fieldText(null, 'temperature', USUAL), fieldText(undefined, 'minutes', USUAL)]).toEqual(['', '']);
  });

  it('shows a duration in the unit beside it, and says its own where that would not be whole', () => {
    expect([fieldText(2400, 'minutes', USUAL), fieldText(90, 'minutes', USUAL)]).toEqual(['40', '90 s']);
    expect([fieldText(28_800, 'hours', USUAL), fieldText(27_000, 'hours', USUAL)]).toEqual(['8', '450 min']);
  });

  it('names its unit as the reader has it', () => {
    expect(
      ['temperature', 'minutes', 'litres-per-second', 'number'].map((one) =>
        fieldUnit(one as Quantity, american),
      ),
    ).toEqual(['°F', 'min', 'cfm', undefined]);
    expect(unreadable('temperature', american)).toContain('°F');
  });

  it.each<[Quantity, Preferences]>([
    ['temperature', USUAL],
    ['temperature', american],
    ['difference', american],
  ])('gives back what it shows: %s in %j', (quantity, preferences) => {
    fc.assert(
      fc.property(fc.integer({ min: -600, max: 2000 }), (tenths) => {
        expect(fieldValue(fieldText(tenths / 10, quantity, preferences), quantity, preferences)).toBeCloseTo(
          tenths / 10,
          5,
        );
      }),
    );
  });

  it.each<Quantity>(['minutes', 'seconds', 'hours'])(
    'gives back every duration it shows in %s',
    (quantity) => {
      fc.assert(
        fc.property(fc.integer({ min: 1, max: 900_000 }), (seconds) => {
          expect(fieldValue(fieldText(seconds, quantity, USUAL), quantity, USUAL)).toBe(seconds);
        }),
      );
    },
  );
});
