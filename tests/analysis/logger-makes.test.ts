// The habits of several makes of logger, each in a few lines of our own: how they write offsets, dates and decimals.
import { describe, expect, it } from 'vitest';
import { guess, lines, read, readAsGuessed, told } from '../support/logger-files';

describe('a head that tells the offset of the clock', () => {
  it.each([
    ['"Date Time, GMT-07:00"', 'UTC-07:00', '2026-07-01T19:00:00.000Z'],
    ['Time (UTC+1)', 'UTC+01:00', '2026-07-01T11:00:00.000Z'],
    ['Zeit GMT+01:00', 'UTC+01:00', '2026-07-01T11:00:00.000Z'],
    ['Date/Time (UTC)', 'UTC', '2026-07-01T12:00:00.000Z'],
    ['Time [+05:30]', 'UTC+05:30', '2026-07-01T06:30:00.000Z'],
  ])('%s is believed, in summer too, whatever the zone of the house', (head, zone, at) => {
    const text = lines(`${head},"Bench 1 (°C)"`, '2026-07-01 12:00,20.5', '2026-07-01 12:10,20.6');
    expect(guess(text).layout.time.zone).toBe(zone);
    expect(readAsGuessed(text)[0]).toEqual([1, at, 20.5]);
  });

  it('and parts it off by a comma without quotation marks, does not push the other heads aside', () => {
    const text = lines(
      '#,Date Time, GMT-07:00,Bench 1 (°C),Humidity (%)',
      '1,07/13/26 02:30:00 PM,20.5,50.2',
      '2,07/13/26 02:40:00 PM,20.6,50.1',
    );
    expect(readAsGuessed(text).slice(0, 2)).toEqual([
      [1, '2026-07-13T21:30:00.000Z', 20.5],
      [2, '2026-07-13T21:30:00.000Z', 50.2],
    ]);
  });

  it('is also believed where the story above the head tells it', () => {
    const text = lines('Logger;Gate', 'Time zone;UTC+2', 'Time;Bench 1 (°C)', '2026-07-01 12:00;20.5');
    expect(guess(text).layout.time.zone).toBe('UTC+02:00');
  });

  it.each([['Time'], ['Time (GMT Standard Time)'], ['Time, offset +0.5 K'], ['Laptime UTCX']])(
    'is not found in %s',
    (head) =>
      expect(guess(lines(`${head};Bench 1 (°C)`, '2026-07-01 12:00;20.5')).layout.time.zone).toBe(
        'Europe/Zurich',
      ),
  );

  it('has no time that comes twice or is skipped', () => {
    const text = lines('Time (UTC+1);Bench 1 (°C)', '2026-10-25 02:30;1', '2026-03-29 02:30;2');
    const reader = read(text, guess(text).layout);
    expect(reader.doubts).toEqual([]);
    expect(told(reader).map(([, at]) => at)).toEqual([
      '2026-10-25T01:30:00.000Z',
      '2026-03-29T01:30:00.000Z',
    ]);
  });
});

describe('a date with a column beside it', () => {
  it('that holds values with a point has no time of day in it', () => {
    const text = lines(
      'Date;Bench 1 (°C);Humidity (%)',
      '2026-11-26;4.52;7.10',
      '2026-11-27;5.10;7.20',
      '2026-11-28;6.30;7.30',
    );
    expect(guess(text).layout.timeColumns).toEqual([0]);
    expect(readAsGuessed(text)[0]).toEqual([1, '2026-11-25T23:00:00.000Z', 4.52]);
  });

  it('is no time of day without a head either, where the figures do not run like one', () => {
    expect(guess(lines('2026-11-26;4.52;7.10')).layout.timeColumns).toEqual([0]);
    expect(guess(lines('2026-11-26;4.52', '2026-11-26;4.10', '2026-11-26;4.31')).layout.timeColumns).toEqual([
      0,
    ]);
  });

  it('that parts hours and minutes by a point is the time of day where its head says so', () => {
    const text = lines('Dato;Klokkeslett;Bench 1 (°C)', '26.11.2026;02.30;4,5', '26.11.2026;02.40;4,6');
    expect(guess(text).layout.timeColumns).toEqual([0, 1]);
    expect(readAsGuessed(text)[1]).toEqual([1, '2026-11-26T01:40:00.000Z', 4.6]);
  });

  it('but is none where one line cannot be a time', () => {
    const text = lines('Date;Time;Bench 1 (°C)', '2026-11-26;02.30;4.5', '2026-11-26;02.75;4.6');
    expect(guess(text).layout.timeColumns).toEqual([0]);
  });

  it('and no head is the time of day where it runs on like one, and that is asked about', () => {
    const run = ['02.30', '02.40', '02.50', '03.00'].map((time) => `26.11.2026;${time};4,5`);
    const { layout, doubts } = guess(lines(...run));
    expect(layout.timeColumns).toEqual([0, 1]);
    expect(doubts).toEqual([expect.stringMatching(/time of day/)]);
  });

  it('and no time of day at all is asked about where several lines tell one day', () =>
    expect(guess(lines('Date;Bench 1 (°C)', '2026-11-26;4.5', '2026-11-26;4.6')).doubts).toEqual([
      expect.stringMatching(/no time of day/),
    ]));
});

describe('where the time stands', () => {
  it('is behind its time of day as well', () => {
    const text = lines('Time;Date;Bench 1 (°C)', '02:30;26.11.2026;4,5', '02:40;26.11.2026;4,6');
    expect(guess(text).layout.timeColumns).toEqual([1, 0]);
    expect(readAsGuessed(text)[1]).toEqual([1, '2026-11-26T01:40:00.000Z', 4.6]);
  });

  it('is not where the story above the head tells a time', () => {
    const story = ['Device,Gate', 'Exported,2026-11-28 10:00', 'From,2026-11-26 02:30'];
    const text = lines(...story, 'Time,Bench 1 (°C)', '2026-11-26 02:30,4.5', '2026-11-26 02:40,4.6');
    expect(guess(text).layout).toMatchObject({ headLines: 4, timeColumns: [0] });
    const numbered = ['1,2026-11-26 02:30,4.5', '2,2026-11-26 02:40,4.6', '3,2026-11-26 02:50,4.7'];
    expect(guess(lines(...story, 'No,Time,Bench 1 (°C)', ...numbered)).layout).toMatchObject({
      ...{ headLines: 4, timeColumns: [1] },
    });
  });
});

describe('the order of day, month and year', () => {
  it('of a year of two digits is not taken to begin with the year, and is asked about', () => {
    const { layout, doubts } = guess(
      lines('Time,Bench 1 (°C)', '11/05/26 02:30 PM,1', '11/05/26 02:40 PM,2'),
    );
    expect(layout.time.order).not.toBe('ymd');
    expect(doubts).toEqual([expect.stringMatching(/the day, the month or the year first/)]);
  });

  it('begins with a year of two digits where the run of the lines leaves nothing else', () => {
    const days = ['26-11-05', '26-11-06', '26-11-07', '26-11-08'].map((day) => `${day} 10:00,1`);
    const { layout, doubts } = guess(lines('Time,Bench 1 (°C)', ...days));
    expect([layout.time.order, doubts]).toEqual(['ymd', []]);
  });

  it('is told by the run of the lines with the newest first as well', () => {
    const days = ['07/01/2026', '06/01/2026', '05/01/2026'].map((day) => `${day} 10:00,1`);
    const { layout, doubts } = guess(lines('Time,Bench 1 (°C)', ...days));
    expect([layout.time.order, doubts]).toEqual(['dmy', []]);
  });

  it('is not asked about where both readings are one', () =>
    expect(guess(lines('Time,Bench 1 (°C)', '26.11.26 10:00,1')).doubts).toEqual([]));
});

describe('decimal commas between commas', () => {
  it('are understood where they stand in quotation marks', () => {
    const text = lines('"Time","Bench 1 (°C)","Humidity (%)"', '"2026-11-26 02:30","4,5","91,2"');
    expect(guess(text).layout).toMatchObject({ delimiter: ',', decimal: ',' });
    expect(readAsGuessed(text)).toEqual([
      [1, '2026-11-26T01:30:00.000Z', 4.5],
      [2, '2026-11-26T01:30:00.000Z', 91.2],
    ]);
  });

  it('are not made of commas that part thousands, and what can be either is asked about', () => {
    const mixed = guess(lines('Time,Bench 1 (°C),Light (W/m2)', '2026-11-26 02:30,4.5,"1,203"'));
    expect([mixed.layout.decimal, mixed.doubts]).toEqual(['.', []]);
    const either = guess(lines('Time,Light (W/m2)', '2026-11-26 02:30,"1,203"', '2026-11-26 02:40,"1,210"'));
    expect(either.doubts).toEqual([expect.stringMatching(/thousands/)]);
  });
});
