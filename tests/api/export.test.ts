// Tables that go out: as an outside program reads them.
import { beforeAll, expect, it } from 'vitest';
import { everyPool } from '@/db/client';
import { pointNumbers } from '@/db/queries/point';
import { storeReadings } from '@/db/queries/reading-write';
import { type Asker, errorsOf, newHolding, personOf, type Json } from './asker';
import { furnish } from './furnished';

const at = '/houses/long-house';
let owner: Asker;
beforeAll(async () => {
  const holding = await newHolding('larkmoor');
  owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  const { ids } = await furnish(holding, owner);
  const numbers = await pointNumbers(holding, ids['house'] ?? '');
  const row = (key: string, time: string, value: number, quality: 0 | 2 = 0) => ({
    ...{ point: numbers.get(key)?.number ?? 0, at: Date.parse(time), value, quality },
  });
  await storeReadings(everyPool(), [
    row('bench-1', '2026-10-25T00:30:00Z', -0.1),
    row('bench-1', '2026-10-25T01:30:00Z', 5),
    row('outdoors', '2026-10-25T01:30:00Z', 85, 2),
    row('outdoors', '2026-10-26T01:30:00Z', 3),
  ]);
});

it('readings have a line a time with its offset, a column a point with its unit, and numbers stay numbers', async () => {
  const span = 'from=2026-10-24T00:00:00Z&to=2026-10-27T00:00:00Z';
  const told = await owner.get(`${at}/export/readings?points=bench-1,outdoors&${span}`);
  expect(told.headers.get('content-type')).toBe('text/csv; charset=utf-8');
  expect(told.headers.get('content-disposition')).toBe('attachment; filename="long-house-readings.csv"');
  expect(told.text.split('\r\n')).toEqual([
    'at,bench-1_Cel,bench-1_quality,outdoors_Cel,outdoors_quality',
    '2026-10-25T01:30:00.000+01:00,-0.1,good,,',
    '2026-10-25T01:30:00.000+00:00,5,good,85,bad',
    '2026-10-26T01:30:00.000+00:00,,,3,good',
    '',
  ]);
});

it('text of the heap book that a spreadsheet would take for a formula is kept from being one', async () => {
  const text = '=HYPERLINK("http://elsewhere.example","press")';
  await owner.make(`${at}/heap-entries`, { source: 'gate-heap', kind: 'note', text });
  const told = await owner.get(`${at}/export/heap-book`);
  expect(told.text).toContain(`note,"'=HYPERLINK(""http://elsewhere.example"",""press"")"`);
  expect(told.text).toContain('forty litres');
});

it('probe rounds have a line a place, with column and row as they are counted by hand', async () => {
  const section = { widthM: 3, heightM: 1.2, sunkM: 0.5, columns: 4, rows: 3, left: 'N', right: 'S' };
  const places = [
    { column: 0, row: 0, celsius: 16.2 },
    { column: 3, row: 2, celsius: 37.9 },
  ];
  const round = { source: 'gate-heap', at: '2026-10-24T07:20:00Z', section, places, text: '=1+1' };
  await owner.make(`${at}/probe-sets`, round);
  const told = await owner.get(`${at}/export/probe-rounds`);
  const [head, ...lines] = told.text.split('\r\n');
  const own = lines.filter((line) => line.startsWith('2026-10-24T08:20:00.000+01:00,gate-heap,'));
  expect(head).toBe('at,heap,column,row,temperature_Cel,left,right,text,by,entered_at,amended_by,amended_at');
  expect(own.map((line) => line.split(',').slice(2, 8))).toEqual([
    ['1', '1', '16.2', 'N', 'S', "'=1+1"],
    ['4', '3', '37.9', 'N', 'S', "'=1+1"],
  ]);
});

it('switchings have their head where none was made', async () => {
  const told = await owner.get(`${at}/export/switchings?from=2026-10-24T00:00:00Z&to=2026-10-27T00:00:00Z`);
  expect(told.text).toBe('at,channel,from,to,claim,command,rule_version\r\n');
});

it('what loads did has a line a span, with what is reckoned from it', async () => {
  const told = await owner.get(`${at}/export/runs?from=2026-10-24T00:00:00Z&to=2026-10-24T01:00:00Z`);
  expect(told.text.split('\r\n').slice(0, 2)).toEqual([
    'channel,key,from,to,seconds,load,kind,claim,power_W,flow_L_per_s,intake,return,altitude_m',
    '1,gate-heap-fan,2026-10-24T01:00:00.000+01:00,2026-10-24T02:00:00.000+01:00,3600,off,off,,12,42.5,loop-intake,loop-return,310',
  ]);
});

it('what loads did ends now, whatever is asked for', async () => {
  const [from, to] = [Date.now() - 3_600_000, Date.now() + 86_400_000];
  const told = await owner.get(
    `${at}/export/runs?from=${new Date(from).toISOString()}&to=${new Date(to).toISOString()}`,
  );
  const [, row = ''] = told.text.split('\r\n');
  expect(Number(row.split(',')[4])).toBeLessThan(3_700);
});

it.each([
  ['points=nobody&from=2026-10-24T00:00:00Z&to=2026-10-27T00:00:00Z', 'points'],
  ['points=bench-1&from=2026-10-28T00:00:00Z&to=2026-10-27T00:00:00Z', 'from'],
  ['points=bench-1&from=2026-10-28T00:00:00Z', 'to'],
])('%s is refused at its path', async (query, path) => {
  const told = await owner.get(`${at}/export/readings?${query}`);
  expect([told.status, (errorsOf(told) as Json[])[0]?.['path']]).toEqual([422, path]);
});
