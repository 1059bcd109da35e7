// Files of several makes of logger through the interface: what the preview says of them, and what may be chosen instead.
import { beforeAll, describe, expect, it } from 'vitest';
import pino from 'pino';
import { everyHolding, everyPool, type Holding } from '@/db/client';
import { clockFrom } from '@/worker/clock';
import { runImports } from '@/worker/jobs/import-run';
import { type Asker, errorsOf, type Json, newHolding, personOf } from './asker';
import { furnish } from './furnished';

const at = '/houses/long-house/imports';
let holding: Holding;
let grower: Asker;
beforeAll(async () => {
  holding = await newHolding('larkmoor');
  const owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  grower = await personOf(holding, 'grower', 'grower@larkmoor.example');
  const own = await furnish(holding, owner);
  await owner.ask('DELETE', `${at}/${own.ids['import'] ?? ''}`);
});

async function sent(text: string): Promise<string> {
  const bytes = Buffer.from(text);
  const made = await grower.make(at, { name: 'gate.csv', bytes: bytes.length });
  const path = `${at}/${String(made['id'])}`;
  await grower.ask('PUT', `${path}/piece?from=0`, bytes);
  return path;
}
const preview = async (path: string, layout?: unknown) =>
  (await grower.ask('POST', `${path}/preview`, layout === undefined ? {} : { layout })).body;

describe('the preview', () => {
  it('shows the fixed offset of a head, and reads summer by it', async () => {
    const path = await sent('"Date Time, GMT-07:00","Bench probe 1 (°C)"\n07/13/26 02:30:00 PM,20.5\n');
    const told = await preview(path);
    expect(told).toMatchObject({
      layout: { time: { zone: 'UTC-07:00', order: 'mdy' } },
      times: ['2026-07-13T22:30:00.000+01:00'],
      doubts: [],
    });
    expect((await grower.ask('PUT', `${path}/layout`, told['layout'])).status).toBe(200);
    await grower.ask('DELETE', path);
  });

  it('takes a fixed offset that somebody gives, in any way of writing it, and none that no place has', async () => {
    const path = await sent('Time;Bench probe 1 [°C]\n13.07.2026 14:30;4,5\n');
    const layout = (await preview(path))['layout'] as Json;
    const by = (zone: string) => preview(path, { ...layout, time: { ...(layout['time'] as Json), zone } });
    for (const zone of ['UTC+01:00', 'gmt+1', '+0100'])
      expect((await by(zone))['times']).toEqual(['2026-07-13T14:30:00.000+01:00']);
    for (const zone of ['UTC+15', 'UTC+1:75', 'summer'])
      expect(await by(zone)).toMatchObject({ errors: [{ path: 'layout.time.zone' }] });
    await grower.ask('DELETE', path);
  });

  it('keeps columns of quoted decimal commas', async () => {
    const path = await sent('Time,Bench probe 1 [°C]\n"13.07.2026 14:30","4,5"\n');
    expect(await preview(path)).toMatchObject({
      layout: { delimiter: ',', decimal: ',', columns: [{ column: 1, point: 'bench-1' }] },
      faults: [],
    });
    await grower.ask('DELETE', path);
  });
});

describe('a table with a line a sensor', () => {
  const LONG = [
    'Time;Sensor;Value;Unit',
    ...['14:30', '14:40'].flatMap((time) => [
      `13.07.2026 ${time};Bench probe 1;4,5;°C`,
      `13.07.2026 ${time};Far end;5,5;°C`,
    ]),
    '',
  ].join('\n');

  it('is shown by its sensors, and those that are put to a point are looked through', async () => {
    const path = await sent(LONG);
    const told = await preview(path);
    expect(told).toMatchObject({
      heads: ['Time', 'Sensor', 'Value', 'Unit'],
      layout: {
        sensorColumn: 1,
        columns: [{ column: 2, sensor: 'Bench probe 1', point: 'bench-1', unit: 'Cel' }],
      },
      times: ['2026-07-13T14:30:00.000+01:00', '2026-07-13T14:40:00.000+01:00'],
    });
    expect((told['columns'] as Json[]).map((one) => one['sensor'])).toEqual([
      ...[null, 'Bench probe 1', 'Far end'],
    ]);
    expect((await grower.ask('PUT', `${path}/layout`, told['layout'])).status).toBe(200);
    await runImports({
      ...{ pool: everyPool(), db: everyHolding(), log: pino({ level: 'silent' }) },
      ...{ clock: clockFrom({ rate: 1, realAt: 0, appAt: 0 }), isLeading: () => true },
    });
    expect((await grower.get(path)).body).toMatchObject({ found: { readings: 2, faults: 0 } });
    await grower.ask('DELETE', path);
  });

  it('with a point for which no sensor is named, or a sensor that no column names, is refused', async () => {
    const path = await sent(LONG);
    const layout = (await preview(path))['layout'] as Json;
    const refused = async (change: Json) => {
      const told = await grower.ask('PUT', `${path}/layout`, { ...layout, ...change });
      return [told.status, (errorsOf(told) as Json[])[0]?.['path']];
    };
    const column = { column: 2, point: 'bench-1', unit: 'Cel' };
    expect(await refused({ columns: [column] })).toEqual([422, 'columns.0.sensor']);
    expect(await refused({ columns: [{ ...column, sensor: 'Far end', column: 1 }] })).toEqual([
      ...[422, 'columns.0.column'],
    ]);
    const { sensorColumn: _, ...wide } = layout;
    const told = await grower.ask('PUT', `${path}/layout`, {
      ...wide,
      columns: [{ ...column, sensor: 'Far end' }],
    });
    expect([told.status, (errorsOf(told) as Json[])[0]?.['path']]).toEqual([422, 'columns.0.sensor']);
    await grower.ask('DELETE', path);
  });
});
