// Times as loggers and spreadsheets write them.
import { describe, expect, it } from 'vitest';
import { type DateOrder, readTime } from '@/lib/analysis/logger-time';
import { guess, lines, readAsGuessed } from '../support/logger-files';

function shown(text: string, order: DateOrder): string | null {
  const read = readTime(text, order);
  if (read === null) return null;
  return 'wall' in read
    ? new Date(read.wall).toISOString().slice(0, 19)
    : new Date(read.instant).toISOString();
}

it.each<[string, DateOrder, string]>([
  ['26.11.2026 02:30', 'dmy', '2026-11-26T02:30:00'],
  ['26.11.2026 2:30 p. m.', 'dmy', '2026-11-26T14:30:00'],
  ['26/11/2026 2:30:05 a.m.', 'dmy', '2026-11-26T02:30:05'],
  ['11/26/2026 12:30\u202fAM', 'mdy', '2026-11-26T00:30:00'],
  ['Nov 26, 2026 14:30', 'mdy', '2026-11-26T14:30:00'],
  ['November 26, 2026, 2:30 PM', 'mdy', '2026-11-26T14:30:00'],
  ['26 Nov 2026', 'dmy', '2026-11-26T00:00:00'],
  ['26-Nov-26 14:30', 'dmy', '2026-11-26T14:30:00'],
  ['Thu, 26 Nov 2026 14:30:00 +0100', 'dmy', '2026-11-26T13:30:00.000Z'],
  ['20261126 02:30', 'ymd', '2026-11-26T02:30:00'],
  ['20261126T023000', 'ymd', '2026-11-26T02:30:00'],
  ['20261126023005', 'ymd', '2026-11-26T02:30:05'],
  ['20261126', 'ymd', '2026-11-26T00:00:00'],
  ['20261126T0230Z', 'ymd', '2026-11-26T02:30:00.000Z'],
  ['2026-11-26T02:30+01', 'ymd', '2026-11-26T01:30:00.000Z'],
  ['2026-11-26 02:30:00-0330', 'ymd', '2026-11-26T06:00:00.000Z'],
  ['2026-11-26 02:30 UTC+1', 'ymd', '2026-11-26T01:30:00.000Z'],
  ['1795660200', 'seconds', '2026-11-26T02:30:00.000Z'],
  ['1795660200000', 'milliseconds', '2026-11-26T02:30:00.000Z'],
  ['46352.104166667', 'serial', '2026-11-26T02:30:00'],
  ['46352,6041667', 'serial', '2026-11-26T14:30:00'],
  ['46352', 'serial', '2026-11-26T00:00:00'],
])('%s, %s, is read as %s', (text, order, at) => expect(shown(text, order)).toBe(at));

it.each<[string, DateOrder]>([
  ['2026-02-30 02:30', 'ymd'],
  ['20261326 02:30', 'ymd'],
  ['12345678', 'ymd'],
  ['25-Nov-26 14:30', 'ymd'],
  ['Nov 26, 2026', 'dmy'],
  ['26 Nov 2026', 'mdy'],
  ['13:30 PM', 'dmy'],
  ['26.11.2026 13:30 PM', 'dmy'],
  ['19999.5', 'serial'],
  ['80001', 'serial'],
  ['4,5', 'ymd'],
])('%s, %s, is no time', (text, order) => expect(shown(text, order)).toBeNull());

describe('a spreadsheet’s count of days', () => {
  it('is understood where the head says date or time', () => {
    const text = lines('Date/Time;Bench 1 (°C)', '46352,104166667;4,5', '46352,111111111;4,6');
    expect(guess(text).layout).toMatchObject({ time: { order: 'serial' }, timeColumns: [0], decimal: ',' });
    expect(readAsGuessed(text)).toEqual([
      [1, '2026-11-26T01:30:00.000Z', 4.5],
      [1, '2026-11-26T01:40:00.000Z', 4.6],
    ]);
  });

  it('is not made of other figures: lux beside a time, or lux alone', () => {
    const light = lines('Lux,Time,Bench 1 (°C)', '45000.5,2026-11-26 02:30,4.5');
    expect(guess(light).layout).toMatchObject({ time: { order: 'ymd' }, timeColumns: [1] });
    expect(() => guess(lines('Lux,Bench 1 (°C)', '45000.5,4.5'))).toThrow('nothing was understood');
  });
});

it('a quoted time with the month’s name and a comma is understood', () =>
  expect(readAsGuessed(lines('Time,Bench 1 (°C)', '"Nov 26, 2026 14:30",4.5'))).toEqual([
    [1, '2026-11-26T13:30:00.000Z', 4.5],
  ]));

it('a date without marks, and the time of day beside it, are understood', () =>
  expect(readAsGuessed(lines('Date;Time;Bench 1 (°C)', '20261126;02:30;4,5'))).toEqual([
    [1, '2026-11-26T01:30:00.000Z', 4.5],
  ]));
