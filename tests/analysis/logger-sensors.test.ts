// Long tables: a line a sensor, with a column that names it.
import { describe, expect, it } from 'vitest';
import { isNumeric } from '@/lib/analysis/logger-columns';
import { guessLayout } from '@/lib/analysis/logger-guess';
import type { FileLayout } from '@/lib/analysis/logger-layout';
import { guess, lines, read, readAsGuessed } from '../support/logger-files';

const LONG = lines(
  'No;Time;Sensor;Value;Unit',
  '1;26.11.2026 02:30;Bench 1;4,5;°C',
  '2;26.11.2026 02:30;Humidity;91;%',
  '3;26.11.2026 02:40;Bench 1;4,6;°C',
  '4;26.11.2026 02:40;Humidity;90,5;%',
);

describe('a table with a line a sensor', () => {
  it('is understood by its names, which go to points, each with the unit that stands beside it', () => {
    const { layout, columns, doubts } = guess(LONG);
    expect(layout).toMatchObject({ timeColumns: [1], sensorColumn: 2 });
    expect(layout.columns).toEqual([
      { column: 3, sensor: 'Bench 1', point: 'bench-1', unit: 'Cel' },
      { column: 3, sensor: 'Humidity', point: 'humidity', unit: '%RH' },
    ]);
    expect(columns.filter((one) => !one.isTime).map(({ head, sample }) => [head, sample])).toEqual([
      ['Bench 1', ['4,5', '4,6']],
      ['Humidity', ['91', '90,5']],
    ]);
    expect(doubts).toEqual([expect.stringMatching(/Column 3 .* names the sensor/)]);
    expect(readAsGuessed(LONG)).toEqual([
      [1, '2026-11-26T01:30:00.000Z', 4.5],
      [2, '2026-11-26T01:30:00.000Z', 91],
      [1, '2026-11-26T01:40:00.000Z', 4.6],
      [2, '2026-11-26T01:40:00.000Z', 90.5],
    ]);
  });

  it('with several values has a column for each value of each sensor', () => {
    const text = lines(
      'Time,Device,Temperature (°C),Humidity (%)',
      ...['10:00', '10:10'].flatMap((time) =>
        ['Gate', 'Far end'].map((name, at) => `2026-11-26 ${time},${name},${at + 4}.5,9${at}.1`),
      ),
    );
    const { columns } = guess(text);
    expect(columns.filter((one) => !one.isTime).map(({ head, unit }) => [head, unit])).toEqual([
      ['Gate, Temperature (°C)', 'Cel'],
      ['Gate, Humidity (%)', '%RH'],
      ['Far end, Temperature (°C)', 'Cel'],
      ['Far end, Humidity (%)', '%RH'],
    ]);
  });

  it('whose sensors tell their values at times of their own is understood where the head says so', () => {
    const rows = ['a', 'b', 'a', 'b', 'a', 'b'].map(
      (name, at) => `2026-11-26 10:0${at},probe ${name},${at}.5`,
    );
    expect(guess(lines('Time,Probe,Value', ...rows)).layout.sensorColumn).toBe(1);
  });

  it.each([
    [
      'words beside each time',
      ['OK', 'low', 'OK', 'low'].map((word, at) => `2026-11-26 10:0${at},${word},4.5`),
    ],
    ['one name throughout', ['0', '1', '2', '3'].map((at) => `2026-11-26 10:0${at},Gate,4.5`)],
  ])('is not made of %s', (_, rows) =>
    expect(guess(lines('Time,State,Bench 1 (°C)', ...rows)).layout.sensorColumn).toBeUndefined(),
  );

  it('may be told by somebody; sensors that go nowhere are left out, and a line without one is told', () => {
    const layout: FileLayout = {
      ...{ encoding: 'utf-8', delimiter: ',', decimal: '.', headLines: 0, timeColumns: [0], sensorColumn: 1 },
      time: { order: 'ymd', zone: 'UTC', twice: 'by-order', skipped: 'before-gap' },
      columns: [{ column: 2, sensor: '101', point: 'bench-1', unit: 'Cel' }],
    };
    const text = lines(
      '2026-11-26 10:00,101,4.5',
      '2026-11-26 10:00, 102 ,x',
      '2026-11-26 10:10',
      'noon,101,5',
    );
    const reader = read(text, layout);
    expect(reader.readings).toMatchObject([{ point: 1, value: 4.5 }]);
    expect(reader.faults.map(({ line, why }) => [line, why])).toEqual([
      [3, expect.stringMatching(/no column 2, which names the sensor/)],
      [4, expect.stringMatching(/no time/)],
    ]);
    const shown = guessLayout(text, 'utf-8', 'UTC', layout)?.columns ?? [];
    expect(shown.map(({ sensor }) => sensor)).toEqual([null, '101', '102']);
    expect(shown.map((one) => isNumeric(one, '.'))).toEqual([false, true, false]);
  });

  it('has the passes of a time that comes twice told for each sensor by itself', () => {
    const hours = ['01:00', '01:00', '02:00'].flatMap((time) =>
      ['Bench 1', 'Humidity'].map(
        (name) => `2026-10-25 ${time},${name},5,${name === 'Bench 1' ? '°C' : '%'}`,
      ),
    );
    const text = lines('Time,Sensor,Value,Unit', ...hours);
    const { layout } = guess(text, 'Europe/London');
    expect(layout.sensorColumn).toBeUndefined();
    const named: FileLayout = {
      ...layout,
      sensorColumn: 1,
      columns: [
        { column: 2, sensor: 'Bench 1', point: 'bench-1', unit: 'Cel' },
        { column: 2, sensor: 'Humidity', point: 'humidity', unit: '%RH' },
      ],
    };
    expect(read(text, named).readings.map(({ at }) => new Date(at).toISOString().slice(11, 16))).toEqual([
      ...['00:00', '00:00', '01:00', '01:00', '02:00', '02:00'],
    ]);
  });
});
