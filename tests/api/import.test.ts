// A logger's file from its first piece to its undoing, by the interface and the worker's job.
import { beforeAll, describe, expect, it } from 'vitest';
import pino from 'pino';
import { everyHolding, everyPool, type Holding } from '@/db/client';
import { pointNumbers } from '@/db/queries/point';
import { storeReadings } from '@/db/queries/reading-write';
import { clockFrom } from '@/worker/clock';
import { runImports } from '@/worker/jobs/import-run';
import { type Asker, errorsOf, itemsOf, newHolding, personOf, type Json } from './asker';
import { furnish, type Furnished } from './furnished';

const at = '/houses/long-house';
let holding: Holding;
let owner: Asker;
let grower: Asker;
let own: Furnished;
let bench: number;
beforeAll(async () => {
  holding = await newHolding('larkmoor');
  owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  grower = await personOf(holding, 'grower', 'grower@larkmoor.example');
  own = await furnish(holding, owner);
  bench = (await pointNumbers(holding, own.ids['house'] ?? '')).get('bench-1')?.number ?? 0;
  await owner.ask('DELETE', `${at}/imports/${own.ids['import'] ?? ''}`);
});

const clock = clockFrom({ rate: 1, realAt: 0, appAt: 0 });
const work = (isLeading = () => true) =>
  runImports({
    ...{ pool: everyPool(), db: everyHolding(), clock, log: pino({ level: 'silent' }) },
    isLeading,
  });

/** Sends a file in two pieces. @returns the import's path */
async function sent(text: string | Buffer): Promise<string> {
  const bytes = Buffer.from(text);
  const made = await grower.make(`${at}/imports`, { name: 'gate.csv', bytes: bytes.length });
  const path = `${at}/imports/${String(made['id'])}`;
  const half = Math.floor(bytes.length / 2);
  await grower.ask('PUT', `${path}/piece?from=0`, bytes.subarray(0, half));
  const last = await grower.ask('PUT', `${path}/piece?from=${half}`, bytes.subarray(half));
  expect(last.body).toMatchObject({ state: 'received', received: bytes.length });
  return path;
}
const previewed = async (path: string, layout?: unknown) =>
  (await grower.ask('POST', `${path}/preview`, layout === undefined ? {} : { layout })).body;

/** Sent, looked through, and waiting for the worker to bring it in. */
async function waiting(text: string): Promise<string> {
  const path = await sent(text);
  const { layout } = await previewed(path);
  expect((await grower.ask('PUT', `${path}/layout`, layout)).status).toBe(200);
  await work();
  expect((await grower.get(path)).body).toMatchObject({ state: 'checked' });
  expect((await grower.ask('POST', `${path}/bring`)).status).toBe(200);
  return path;
}

async function brought(text: string): Promise<{ path: string; one: Json }> {
  const path = await waiting(text);
  await work();
  return { path, one: (await grower.get(path)).body };
}

async function stored(): Promise<[string, number][]> {
  const { rows } = await everyPool().query<{ at: Date; value: number }>(
    'select at, value from reading where point = $1 order by at',
    [bench],
  );
  return rows.map((row) => [row.at.toISOString(), row.value]);
}
const due = async () =>
  (await everyPool().query<{ hour: Date }>('select hour from reading_due where point = $1', [bench])).rows
    .length;

/** Lines a minute apart with their offset; one in a thousand is wrong. */
function minutes(from: string, many: number): string {
  const first = Date.parse(from);
  return Array.from({ length: many }, (_, i) => {
    const time = new Date(first + i * 60_000).toISOString();
    return `${time};${i % 1000 === 500 ? 'x' : `${i % 40},${i % 10}`}\n`;
  }).join('');
}

const HEAD = 'Time;Bench probe 1 [°C]\n';

describe('a file that is brought in', () => {
  it('gives its readings, counts those that were there, and takes back only its own', async () => {
    const there = Date.parse('2026-01-10T18:00:00Z');
    await storeReadings(everyPool(), [{ point: bench, at: there, value: 7, quality: 0 }]);
    const { path, one } = await brought(
      `${HEAD}10.01.2026 17:50;4,5\n10.01.2026 18:00;4,4\n10.01.2026 18:10;x\n10.01.2026 18:20;4,2\n10.01.2026 18:20;9\n`,
    );
    expect(one).toMatchObject({ state: 'done', brought: 2, duplicates: 2, faults: 1, progress: 1 });
    expect(await stored()).toEqual([
      ['2026-01-10T17:50:00.000Z', 4.5],
      ['2026-01-10T18:00:00.000Z', 7],
      ['2026-01-10T18:20:00.000Z', 4.2],
    ]);
    expect(await due()).toBe(2);
    const faults = await owner.get(`${path}/faults`);
    expect(faults.text).toBe(
      'line,what_is_wrong,text\r\n4,"""x"" in column 2 is no value for bench-1.",10.01.2026 18:10;x\r\n',
    );
    await everyPool().query('delete from reading_due');
    expect((await grower.ask('DELETE', path)).body).toMatchObject({ state: 'to-undo' });
    await work();
    expect((await grower.get(path)).body).toMatchObject({ state: 'undone', brought: 0 });
    expect(await stored()).toEqual([['2026-01-10T18:00:00.000Z', 7]]);
    expect(await due()).toBe(2);
  });

  it('and broken off goes on where it was, each reading and each wrong line once; or is cancelled whole', async () => {
    const before = (await stored()).length;
    const path = await waiting(HEAD + minutes('2026-03-01T00:00:00Z', 40_000));
    const onceOnly = (turns: number) => () => (turns -= 1) >= 0;
    // asked when the work is taken, and again at each batch
    await work(onceOnly(3));
    const half = (await grower.get(path)).body;
    expect(half['state']).toBe('to-bring');
    expect(half['brought']).toBeGreaterThan(0);
    expect(half['brought']).toBeLessThan(40_000);
    await work();
    expect((await grower.get(path)).body).toMatchObject({
      ...{ state: 'done', brought: 39_960, duplicates: 0, faults: 40 },
    });
    expect((await grower.get(`${path}/faults`)).text.trim().split('\r\n')).toHaveLength(41);
    await grower.ask('DELETE', path);
    await work();
    const again = await waiting(HEAD + minutes('2026-03-01T00:00:00Z', 40_000));
    await work(onceOnly(3));
    await grower.ask('DELETE', again);
    await work();
    expect((await grower.get(again)).body).toMatchObject({ state: 'undone', brought: 0 });
    expect(await stored()).toHaveLength(before);
  });

  it('in thousands of lines comes in whole, and again not at all', async () => {
    const from = Date.parse('2026-02-01T00:00:00Z');
    const lines = Array.from({ length: 25_000 }, (_, i) => {
      const time = new Date(from + i * 60_000).toISOString().slice(0, 16).replace('T', ' ');
      return `${time};${(i % 100) / 10}\n`.replace('.', ',');
    });
    const before = (await stored()).length;
    const first = await brought(HEAD + lines.join(''));
    expect(first.one).toMatchObject({ brought: 25_000, duplicates: 0, faults: 0 });
    const again = await brought(HEAD + lines.join(''));
    expect(again.one).toMatchObject({ brought: 0, duplicates: 25_000 });
    await grower.ask('DELETE', again.path);
    await work();
    expect(await stored()).toHaveLength(before + 25_000);
    await grower.ask('DELETE', first.path);
    await work();
    expect(await stored()).toHaveLength(before);
  });

  it('never brings a reading of the last day, which control might take up', async () => {
    const now = new Date(Date.now() - 3_600_000).toISOString();
    const { one } = await brought(`${HEAD}2026-01-12T10:00:00Z;4\n${now};30\n`);
    expect(one).toMatchObject({ brought: 1, faults: 1 });
  });
});

describe('before anything is written', () => {
  it('the preview tells what is understood, and shows the times in the house’s zone', async () => {
    const path = await sent(`${HEAD}10.07.2026 17:50;4,5\n11.07.2026 18:00;4,4\n`);
    const preview = await previewed(path);
    expect(preview).toMatchObject({
      layout: { delimiter: ';', decimal: ',', headLines: 1, columns: [{ column: 1, point: 'bench-1' }] },
      times: ['2026-07-10T17:50:00.000+01:00', '2026-07-11T18:00:00.000+01:00'],
    });
    const other = { ...(preview['layout'] as Json), decimal: '.' };
    expect((await previewed(path, other))['faults']).toHaveLength(2);
    await grower.ask('DELETE', path);
    expect((await grower.get(path)).status).toBe(404);
  });

  it('while no column is put to a point the times are shown, and a line is blamed by its column’s head', async () => {
    const path = await sent('Date;Time;Luft\n01.11.2026;00:00;5,1\n01.11.2026;00:10;warm\n');
    expect(await previewed(path)).toMatchObject({
      times: ['2026-11-01T00:00:00.000+00:00'],
      faults: [{ line: 3, why: '"warm" in column 3 is no value for Luft.' }],
    });
    await grower.ask('DELETE', path);
  });

  it('lines whose time comes twice are told with how they are read', async () => {
    const path = await sent(`${HEAD}2025-10-26 01:30;4\n2025-10-26 01:30;5\n`);
    const { layout } = await previewed(path);
    await grower.ask('PUT', `${path}/layout`, layout);
    await work();
    expect((await grower.get(path)).body['found']).toMatchObject({
      readings: 2,
      doubts: 2,
      firstDoubts: [
        { line: 2, kind: 'twice', readAs: '2025-10-26T00:30:00.000Z' },
        { line: 3, kind: 'twice', readAs: '2025-10-26T01:30:00.000Z' },
      ],
    });
    await grower.ask('DELETE', path);
  });

  it('a file in UTF-16 and one in Windows-1252 are read alike', async () => {
    for (const encoding of ['utf16le', 'latin1'] as const) {
      const mark = encoding === 'utf16le' ? '\uFEFF' : '';
      const path = await sent(Buffer.from(`${mark}${HEAD}10.01.2026 17:50;4,5\n`, encoding));
      expect((await previewed(path))['layout']).toMatchObject({ columns: [{ unit: 'Cel' }] });
      await grower.ask('DELETE', path);
    }
  });

  it.each([
    ['a point that is not there', { columns: [{ column: 1, point: 'no', unit: 'Cel' }] }, 'columns.0.point'],
    [
      'a unit that does not fit',
      { columns: [{ column: 1, point: 'bench-1', unit: '%RH' }] },
      'columns.0.unit',
    ],
    ['no column', { columns: [] }, 'columns'],
    [
      'a zone that is none',
      { time: { order: 'dmy', zone: 'X', twice: 'first', skipped: 'leave-out' } },
      'time.zone',
    ],
  ])('a layout with %s is refused at its path', async (_, change, place) => {
    const path = await sent(`${HEAD}10.01.2026 17:50;4,5\n`);
    const { layout } = await previewed(path);
    const told = await grower.ask('PUT', `${path}/layout`, { ...(layout as Json), ...change });
    expect([told.status, (errorsOf(told) as Json[])[0]?.['path']]).toEqual([422, place]);
    await grower.ask('DELETE', path);
  });

  it('a piece out of its turn is refused, one sent twice does no harm', async () => {
    const made = await grower.make(`${at}/imports`, { name: 'a.csv', bytes: 10 });
    const path = `${at}/imports/${String(made['id'])}`;
    const piece = (from: number, text: string) =>
      grower.ask('PUT', `${path}/piece?from=${from}`, Buffer.from(text));
    expect((await piece(5, 'abcde')).status).toBe(422);
    expect((await piece(0, 'abcde')).body).toMatchObject({ received: 5 });
    expect((await piece(0, 'abcde')).body).toMatchObject({ received: 5, state: 'receiving' });
    expect((await piece(5, 'fghijk')).status).toBe(422);
    expect((await piece(5, 'fghij')).body).toMatchObject({ received: 10, state: 'received' });
    expect((await grower.ask('POST', `${path}/preview`, {})).status).toBe(409);
    await grower.ask('DELETE', path);
  });

  it('a file over 200 MiB and a fifth one under way are refused', async () => {
    const make = (bytes: number) => grower.ask('POST', `${at}/imports`, { name: 'a.csv', bytes });
    expect((await make(201 * 1024 ** 2)).status).toBe(422);
    const statuses = [];
    for (const _ of [1, 2, 3, 4, 5]) statuses.push((await make(10)).status);
    expect(statuses).toEqual([201, 201, 201, 201, 409]);
    for (const one of itemsOf(await grower.get(`${at}/imports`)))
      if (one['state'] === 'receiving') await grower.ask('DELETE', `${at}/imports/${String(one['id'])}`);
  });
});
