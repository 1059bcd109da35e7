// Files as other people's loggers write them: what is understood of each, and what is read by that.
import { describe, expect, it } from 'vitest';
import { encodingOf, guessLayout } from '@/lib/analysis/logger-guess';
import type { FileLayout } from '@/lib/analysis/logger-layout';
import type { LoggerReader } from '@/lib/analysis/logger-reader';
import { guess, read, told } from '../support/logger-files';

const NORDIC = [
  'Serial;4711',
  'Location;Gate',
  'Datum;Uhrzeit;Bench 1 [°C];Humidity [%RH]',
  '26.11.2026;02:30;4,5;91',
  '26.11.2026;02:40;−0,5;92,5',
  '',
].join('\r\n');
const AMERICAN = [
  '"Date/Time","Bench 1 (°F)","Humidity (%)"',
  '"11/26/2026 2:30:00 PM",50,91.5',
  '"11/26/2026 2:40:00 PM",-40,--',
].join('\n');
const PLAIN = 'time\tbench-1\thumidity\n2026-11-26T02:30:00Z\t4.5\t91\n2026-11-26T02:40:00+01:00\t5\t90\n';

describe('what is understood', () => {
  it('of a file with a decimal comma, a split time and a story above its head', () => {
    const { layout, doubts } = guess(NORDIC);
    expect(layout).toMatchObject({ delimiter: ';', decimal: ',', headLines: 3, timeColumns: [0, 1] });
    expect(layout.time).toMatchObject({ order: 'dmy', zone: 'Europe/Zurich' });
    expect(layout.columns).toEqual([
      { column: 2, point: 'bench-1', unit: 'Cel' },
      { column: 3, point: 'humidity', unit: '%RH' },
    ]);
    expect(doubts).toEqual([]);
    expect(told(read(NORDIC, layout))).toEqual([
      [1, '2026-11-26T01:30:00.000Z', 4.5],
      [2, '2026-11-26T01:30:00.000Z', 91],
      [1, '2026-11-26T01:40:00.000Z', -0.5],
      [2, '2026-11-26T01:40:00.000Z', 92.5],
    ]);
  });

  it('of a file whose story was filled up to the width of its table', () => {
    const padded = 'Logger 7;;\nDate;Bench 1;Humidity\n;°C;%RH\n26.11.2026 02:30;4,5;91\n';
    expect(guess(padded).columns.map((column) => column.head)).toEqual([
      'Date',
      'Bench 1 °C',
      'Humidity %RH',
    ]);
  });

  it('of an American file in °F, whose last line has no end', () => {
    const { layout } = guess(AMERICAN, 'America/Denver');
    expect(layout).toMatchObject({ delimiter: ',', decimal: '.', headLines: 1, timeColumns: [0] });
    expect(layout.time.order).toBe('mdy');
    expect(told(read(AMERICAN, layout))).toEqual([
      [1, '2026-11-26T21:30:00.000Z', 10],
      [2, '2026-11-26T21:30:00.000Z', 91.5],
      [1, '2026-11-26T21:40:00.000Z', -40],
    ]);
  });

  it('of a file with tabs whose times tell their offsets, which go before the zone', () => {
    const { layout, columns } = guess(PLAIN);
    expect(layout).toMatchObject({ delimiter: '\t', time: { order: 'ymd' } });
    // its heads name no units, and those are never guessed
    expect(layout.columns).toEqual([]);
    expect(columns.map((column) => column.head)).toEqual(['time', 'bench-1', 'humidity']);
    const chosen: FileLayout = { ...layout, columns: [{ column: 1, point: 'bench-1', unit: 'Cel' }] };
    expect(told(read(PLAIN, chosen)).map(([, at]) => at)).toEqual([
      '2026-11-26T02:30:00.000Z',
      '2026-11-26T01:40:00.000Z',
    ]);
  });

  it('of seconds since 1970, and of units in a line of their own', () => {
    const text = 'epoch,Bench 1,Humidity\ns,°C,%\n1795660200,4.5,91\n1795660800,4.4,91\n';
    const { layout } = guess(text);
    expect(layout).toMatchObject({ headLines: 2, time: { order: 'seconds' } });
    expect(layout.columns.map((column) => column.unit)).toEqual(['Cel', '%RH']);
  });

  it('of days and months that can be either is said to be doubtful; the order of the lines settles others', () => {
    expect(guess('t,Bench 1 (C)\n05/06/2026 10:00,1\n05/06/2026 11:00,1\n').doubts).toHaveLength(1);
    const settled = guess('t,Bench 1 (C)\n05/01/2026 10:00,1\n06/01/2026 10:00,1\n07/01/2026 10:00,1\n');
    expect([settled.layout.time.order, settled.doubts]).toEqual(['dmy', []]);
  });

  it('of a text without a time is nothing', () =>
    expect(guessLayout('a letter, about a heap\nand more of it\n', 'utf-8', 'Europe/London')).toBeNull());
});

it.each([
  ['UTF-16 by its mark', Buffer.from('\uFEFFa;1', 'utf16le'), 'utf-16le'],
  ['UTF-16 without one', Buffer.from('26.11.2026;4,5\r\n', 'utf16le'), 'utf-16le'],
  ['big-endian UTF-16', Buffer.from([0xfe, 0xff, 0, 0x61]), 'utf-16be'],
  ['UTF-8 cut within a letter', Buffer.from('Bench °').subarray(0, 7), 'utf-8'],
  ['Windows-1252', Buffer.from('Bench 1 (\xb0C);\n', 'latin1'), 'windows-1252'],
])('the encoding of %s is known by its bytes', (_, bytes, encoding) =>
  expect(encodingOf(bytes)).toBe(encoding),
);

describe('where the clock changes', () => {
  const layout = (time: Partial<FileLayout['time']> = {}): FileLayout => ({
    ...{ encoding: 'utf-8', delimiter: ',', decimal: '.', headLines: 0, timeColumns: [0] },
    time: { order: 'ymd', zone: 'Europe/London', twice: 'by-order', skipped: 'before-gap', ...time },
    columns: [{ column: 1, point: 'bench-1', unit: 'Cel' }],
  });
  // back at 02:00 on 25 October 2026, forward at 01:00 on 29 March 2026
  const autumn = ['00:30', '01:00', '01:30', '01:00', '01:30', '02:00'];
  const AUTUMN = autumn.map((time, at) => `2026-10-25 ${time},${at}\n`).join('');
  const SPRING = ['00:30', '01:30', '02:30'].map((time, at) => `2026-03-29 ${time},${at}\n`).join('');
  const times = (reader: LoggerReader) => told(reader).map(([, at]) => String(at).slice(11, 16));

  it('a time that comes twice is read by the order of the lines, and each such line is told', () => {
    const reader = read(AUTUMN, layout());
    expect(times(reader)).toEqual(['23:30', '00:00', '00:30', '01:00', '01:30', '02:00']);
    expect(reader.doubts.map((doubt) => [doubt.line, doubt.kind])).toEqual(
      [2, 3, 4, 5].map((line) => [line, 'twice']),
    );
  });

  it('a file with the newest line first has both passes, none over the other', () => {
    const newest = AUTUMN.trim().split('\n').reverse().join('\n');
    expect(times(read(newest, layout()))).toEqual(['02:00', '01:30', '01:00', '00:30', '00:00', '23:30']);
    // and where it begins within the hour that comes twice
    const within = newest.split('\n').slice(1).join('\n');
    expect(times(read(within, layout()))).toEqual(['01:30', '01:00', '00:30', '00:00', '23:30']);
  });

  it('a long file gives the same readings whichever way it runs', () => {
    const first = Date.parse('2026-10-24T12:00:00Z');
    const wall = new Intl.DateTimeFormat('sv', {
      timeZone: 'Europe/London',
      dateStyle: 'short',
      timeStyle: 'short',
    });
    const oldest = Array.from(
      { length: 300 },
      (_, at) => `${wall.format(first + at * 600_000)},${at % 50}\n`,
    );
    const readings = read(oldest.join(''), layout()).readings;
    expect(readings.map(({ at }) => at)).toEqual(oldest.map((_, at) => first + at * 600_000));
    expect(read(oldest.toReversed().join(''), layout()).readings.toReversed()).toEqual(readings);
  });

  it('the direction is told by most of the first lines, not by one that is out of its place', () => {
    const jumbled = `2026-10-25 00:40,9\n2026-10-25 00:20,9\n${AUTUMN}`;
    expect(times(read(jumbled, layout())).slice(2)).toEqual(times(read(AUTUMN, layout())));
  });

  it('it is always the first, always the second, or left out, as somebody chose', () => {
    expect(times(read(AUTUMN, layout({ twice: 'first' }))).slice(1, 5)).toEqual([
      ...['00:00', '00:30', '00:00', '00:30'],
    ]);
    expect(times(read(AUTUMN, layout({ twice: 'second' }))).slice(1, 3)).toEqual(['01:00', '01:30']);
    expect(times(read(AUTUMN, layout({ twice: 'leave-out' })))).toEqual(['23:30', '02:00']);
  });

  it('a time that the clock skips is told, and read as before the gap or left out', () => {
    const reader = read(SPRING, layout());
    expect(times(reader)).toEqual(['00:30', '01:30', '01:30']);
    expect(reader.doubts).toMatchObject([{ line: 2, kind: 'skipped' }]);
    expect(times(read(SPRING, layout({ skipped: 'leave-out' })))).toEqual(['00:30', '01:30']);
  });
});

describe('a hostile or broken file', () => {
  const layout: FileLayout = {
    ...{ encoding: 'utf-8', delimiter: ',', decimal: '.', headLines: 0, timeColumns: [0] },
    time: { order: 'ymd', zone: 'UTC', twice: 'by-order', skipped: 'before-gap' },
    columns: [{ column: 1, point: 'bench-1', unit: 'Cel' }],
  };
  const good = '2026-11-01 00:00,1\n';
  it.each([
    ['a line of 10 MB', `${'x'.repeat(10_000_000)}\n`, /over 64 KiB/],
    ['10 000 columns', `2026-11-01 00:10${',1'.repeat(9999)}\n`, /over 1000 columns/],
    ['NULs', '2026-11-01 00:10,\0\n', /UTF-16/],
    ['a formula', '2026-11-01 00:10,=1+1\n', /no value for bench-1/],
    ['a time that is none', '2026-02-30 00:10,1\n', /no time/],
    ['a clock that was not set', '1970-01-01 00:10,1\n', /before 2000/],
    ['a time ahead', '2031-01-01 00:10,1\n', /again tomorrow/],
    ['a cell too few', '2026-11-01 00:10\n', /no column 2/],
    ['less than absolute zero', '2026-11-01 00:10,-300\n', /no value/],
  ])('%s is told with its line, and the lines round it are read', (_, text, why) => {
    const reader = read(good + text + good.replace('00:00', '00:20'), layout, 65_536);
    expect(reader.faults).toHaveLength(1);
    expect(reader.faults[0]).toMatchObject({ line: 2, why: expect.stringMatching(why) });
    expect(reader.readings).toHaveLength(2);
  });

  it('a quotation mark that is never closed is told at the line where it is opened', () => {
    const reader = read(`${good}"2026-11-01 00:10,1\n${good.repeat(10)}`, layout);
    expect(reader.faults).toMatchObject([{ line: 2, why: expect.stringMatching(/not closed/) }]);
  });

  it('a value outside what the point can show is kept as bad', () => {
    expect(read('2026-11-01 00:10,85\n', layout).readings).toMatchObject([{ value: 85, quality: 2 }]);
  });
});
