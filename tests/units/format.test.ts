import { describe, expect, it } from 'vitest';
import { clockTime, difference, duration, figure, reading, temperature } from '@/lib/units/format';

const metric = { temperature: 'C', clock: '24' } as const;
const american = { temperature: 'F', clock: '12' } as const;
/** Figures and units are kept together by a no-break space. */
const spaced = (text: string) => text.replaceAll('\u00a0', ' ');

describe('figures', () => {
  it('carry a true minus sign', () => expect(figure(-12.25, 1)).toBe('−12.3'));
  it('round halves away from zero, on both sides', () => {
    expect([figure(0.25, 1), figure(-0.25, 1), figure(1.005, 2)]).toEqual(['0.3', '−0.3', '1.01']);
  });
  it('never read minus nought', () => expect(figure(-0.04, 1)).toBe('0.0'));
  it('drop decimals that say nothing where they may', () => {
    expect([figure(43, 0, 1), figure(43.5, 0, 1), figure(10, 0, 2), figure(100, 0)]).toEqual([
      '43',
      '43.5',
      '10',
      '100',
    ]);
  });
});

describe('units', () => {
  it('keep a temperature and a difference apart in °F', () => {
    expect(spaced(temperature(4, american))).toBe('39.2 °F');
    expect(spaced(difference(-0.5, american))).toBe('−0.9 °F');
  });
  it('say kelvin as degrees', () => expect(spaced(difference(3, metric))).toBe('3.0 °C'));
  it('read a ratio in per cent and humidity as it is', () => {
    expect(spaced(reading(0.84, '/', metric))).toBe('84 %');
    expect(spaced(reading(84, '%RH', metric))).toBe('84 % RH');
  });
});

describe('durations', () => {
  it.each([
    [1, '1 s'],
    [0, '0 s'],
    [60, '1 min'],
    [90, '90 s'],
    [150, '2 min 30 s'],
    [1500, '25 min'],
    [3600, '60 min'],
    [5400, '90 min'],
    [7200, '2 h'],
    [9000, '2 h 30 min'],
    [22200, '6 h 10 min'],
    [28800, '8 h'],
    [86400, '24 h'],
    [259200, '3 days'],
  ])('%i s reads %s', (seconds, text) => expect(spaced(duration(seconds))).toBe(text));
});

describe('clock', () => {
  it('follows the reader', () => {
    expect(clockTime('18:05', metric)).toBe('18:05');
    expect(['00:00', '12:30', '18:05'].map((time) => spaced(clockTime(time, american)))).toEqual([
      '12:00 am',
      '12:30 pm',
      '6:05 pm',
    ]);
  });
});
