import { describe, expect, it } from 'vitest';
import { USUAL, type Preferences } from '@/lib/units/preferences';
import { age, clock, day, dayTime, duration, moment, nightLabel } from '@/lib/units/time';
import { numberTyped, secondsTyped } from '@/lib/units/typed';

const twelve: Preferences = { ...USUAL, clock: 12 };
const spaced = (text: string) => text.replaceAll('\u00a0', ' ');
const at = (iso: string) => Date.parse(iso);

it.each([
  [0, '0 s'],
  [45, '45 s'],
  [59.6, '1 min'],
  [2400, '40 min'],
  [3599, '1 h'],
  [3900, '1 h 05 min'],
  [28_800, '8 h'],
  [86_400, '24 h'],
  [259_200, '3 days'],
])('%d s read as %s', (seconds, text) => expect(spaced(duration(seconds))).toBe(text));

it('an age counts up, and what is not past yet is just now', () =>
  expect([-50, 400, 3000, 840_000].map(age).map(spaced)).toEqual([
    'just now',
    'just now',
    '3 s ago',
    '14 min ago',
  ]));

describe('a clock time', () => {
  it('is the house’s, not the reader’s', () =>
    expect(clock(at('2026-11-26T02:14:00Z'), 'America/New_York', USUAL)).toBe('21:14'));
  it('reads in twelve hours by preference', () =>
    expect(['00:00', '12:30', '18:05'].map((time) => spaced(dayTime(time, twelve)))).toEqual([
      '12:00 am',
      '12:30 pm',
      '6:05 pm',
    ]));
  it('that follows the sun says by how much', () =>
    expect(['sunset-01:00', 'sunrise+00:30', 'sunset'].map((time) => spaced(dayTime(time, USUAL)))).toEqual([
      '1 h before sunset',
      '30 min after sunrise',
      'sunset',
    ]));
  it('says its day only when the time alone could be mistaken', () => {
    const now = at('2026-11-26T05:45:00Z');
    const read = (iso: string) => moment(at(iso), now, 'Europe/London', USUAL);
    expect(read('2026-11-25T22:10:00Z')).toBe('22:10');
    expect(read('2026-11-25T09:00:00Z')).toBe('yesterday 09:00');
    expect(read('2026-11-22T09:00:00Z')).toBe('22 Nov, 09:00');
    expect(read('2026-11-27T08:00:00Z')).toBe('tomorrow 08:00');
  });
});

it('a night is labelled with the day on which its evening was', () => {
  for (const night of ['2026-01-01', '2026-02-28', '2026-09-09', '2027-12-31'])
    expect(nightLabel(night)).toBe(day(at(`${night}T12:00:00Z`), 'UTC'));
  expect(nightLabel('2026-11-26')).toBe('26 Nov');
});

describe('what is typed', () => {
  it('may have a comma and a true minus', () =>
    expect(['4.5', '4,5', '−4,5', ' -12 ', '.5'].map(numberTyped)).toEqual([4.5, 4.5, -4.5, -12, 0.5]));
  it('that is no number is refused, not half read', () =>
    expect(['', '4.5.6', '1,500.0', '4x', 'NaN', '1e3', '--4'].map(numberTyped)).toEqual(
      Array(7).fill(null),
    ));
  it('as a time may be minutes, a clock or words', () =>
    expect(
      ['40', '40 min', '1:30', '1 h 05', '1 h', '90 s', '1,5 h', '2 min 30 s'].map(secondsTyped),
    ).toEqual([2400, 2400, 5400, 3900, 3600, 90, 5400, 150]));
  it('that is no time is refused', () =>
    expect(['', 'h', 'soon', '-5', '1:75'].map(secondsTyped)).toEqual(Array(5).fill(null)));
});
