// What cannot be meant, sent by a program to change what is there: each field of each PATCH and PUT, and nothing is changed.
import { beforeAll, describe, expect, test } from 'vitest';
import { everyPool } from '@/db/client';
import { readPreferences } from '@/db/queries/preferences';
import { OPERATIONS } from '@/lib/server/operations/all';
import { newHolding, personOf, type Asker, type Json } from './asker';
import { badBodies, fault } from './bad-values';
import { furnish, type Furnished } from './furnished';
import * as shown from './shown';

let owner: Asker;
let own: Furnished;
let ownerId = '';
beforeAll(async () => {
  const holding = await newHolding('larkmoor');
  owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  own = await furnish(holding, owner);
  const { rows } = await everyPool().query<{ id: string }>('select id from "user"');
  ownerId = rows[0]?.id ?? '';
  await owner.make(`${HOUSE}/points`, shown.lift);
  await owner.make(`${HOUSE}/nodes`, { key: 'MQ-1', kind: 'mqtt', reportEvery: 30, channels: 4, ...broker });
  const csv = Buffer.from('Time;Sensor;Value\n2026-11-26 22:00;Bench;3.5\n');
  const file = await owner.make(`${HOUSE}/imports`, { name: 'gate.csv', bytes: csv.length });
  own.ids['import'] = String(file['id']);
  await owner.ask('PUT', `${own.pathOf('/houses/{house}/imports/{import}')}/piece?from=0`, csv);
});

const HOUSE = '/houses/long-house';
/** No route tells them: the pages are made by them. */
const PREFERENCES = 'preferences';
const broker = {
  mqtt: { host: '127.0.0.1', port: 8883, tls: true, ca: null, user: 'middenward', password: 'sleet' },
};
const { key: _key, kind: _kind, ...boardSet } = shown.board;
const { source: _source, ...roundSet } = shown.round;
const protection = {
  ...{ contactor: true, fuseAmps: 6, cableMm2: 1.5, ip: 'IP65' },
  ...{ rcdMilliamps: 30, rcdTestedOn: '2026-11-01', rcdTestEveryMonths: 6 },
};
const band = { from: '22:00', to: '06:00', days: 'all', price: '0.21' };
const cost = { source: 'gate-heap', kind: 'haulage', on: '2026-10-04', text: 'By tractor.', years: 2 };
const material = { material: 'Straw', kilograms: 40, litres: 600 };

/** Operation, a body that it takes, where the change would be seen, and the thing itself where it is not the furnished one. */
const CHANGES: [string, Json, string, string?][] = [
  ['PATCH /houses/{house}', { ...shown.house, lastResort: { below: 1, provedOn: '2026-11-01' } }, HOUSE],
  ['PATCH /houses/{house}/nodes/{node}', { reportEvery: 20, channels: 9 }, `${HOUSE}/nodes`],
  [
    'PATCH /houses/{house}/nodes/{node}',
    {
      ...boardSet,
      modbus: { ...boardSet.modbus, watchdog: { address: 9, value: 1, within: 20 } },
    },
    `${HOUSE}/nodes`,
    `${HOUSE}/nodes/MB-1`,
  ],
  ['PATCH /houses/{house}/nodes/{node}', broker, `${HOUSE}/nodes`, `${HOUSE}/nodes/MQ-1`],
  ['PATCH /houses/{house}/points/{point}', { ...shown.bench, name: 'Bench' }, `${HOUSE}/points`],
  [
    'PATCH /houses/{house}/points/{point}',
    { derived: { of: 'difference', points: ['house-air', 'outdoors'], window: 600 } },
    `${HOUSE}/points`,
    `${HOUSE}/points/lift`,
  ],
  ['PATCH /houses/{house}/sources/{source}', shown.source, `${HOUSE}/sources`],
  [
    'PATCH /houses/{house}/channels/{channel}',
    { ...shown.fan, longestOn: 3600, highLimit: { point: 'bench-1', above: 60 }, protection },
    `${HOUSE}/channels`,
  ],
  ['PATCH /houses/{house}/loops/{loop}', shown.loop, `${HOUSE}/loops`],
  ['PATCH /houses/{house}/interlocks/{interlock}', shown.interlock, `${HOUSE}/interlocks`],
  ['PATCH /rules/{rule}', { name: 'Gate-heap fan' }, '/rules/{rule}'],
  ['PUT /rules/{rule}/draft', shown.rule.body, '/rules/{rule}'],
  ['PUT /houses/{house}/setup', { putOff: ['rule', 'proving'] }, `${HOUSE}/setup`],
  [
    'PATCH /houses/{house}/heap-entries/{entry}',
    {
      ...{ kind: 'fed', at: '2026-11-20T08:00:00Z', text: 'A barrow.', materials: [material] },
      ...{ litresOfWater: 20, volume: 4, smell: 'earthy', squeeze: 'drops' },
    },
    `${HOUSE}/heap-entries`,
  ],
  ['PATCH /houses/{house}/probe-sets/{round}', roundSet, `${HOUSE}/probe-sets`],
  [
    'PATCH /houses/{house}/heap-jobs/{job}',
    { title: 'Build anew', dueOn: '2027-09-16', checklist: [{ text: 'Straw', done: true }], done: false },
    `${HOUSE}/heap-jobs`,
  ],
  ['PATCH /materials/{material}', shown.material, '/materials'],
  [
    'PUT /money',
    {
      ...{ revision: 0, currency: 'EUR', tariffs: [{ from: '2026-01-01', price: '0.2875', bands: [band] }] },
      fuels: [{ fuel: 'propane', unit: 'kg', price: '2.35', kWh: 12.9, efficiency: 0.85 }],
    },
    '/money',
  ],
  ['PUT /houses/{house}/heap-costs/{cost}', { ...cost, amount: '95' }, `${HOUSE}/heap-costs`],
  [
    'PUT /houses/{house}/heap-costs/{cost}',
    { ...cost, kind: 'work', work: { hours: '3.5', rate: '18.1' } },
    `${HOUSE}/heap-costs`,
  ],
  [
    'PUT /houses/{house}/imports/{import}/layout',
    {
      ...{ encoding: 'utf-8', delimiter: ';', decimal: '.', headLines: 1, timeColumns: [0] },
      sensorColumn: 1,
      time: { order: 'ymd', zone: 'UTC+01:00', twice: 'first', skipped: 'leave-out' },
      columns: [{ column: 2, point: 'bench-1', unit: 'Cel', sensor: 'Bench' }],
    },
    `${HOUSE}/imports`,
  ],
  ['PATCH /people/{member}', { role: 'owner' }, '/people'],
  [
    'PUT /preferences',
    { temperature: 'F', clock: 12, flow: 'cfm', length: 'ft', theme: 'dark' },
    PREFERENCES,
  ],
];

const NO_BODY: [string, string][] = [
  ['a list', '[]'],
  ['a text', '"fan"'],
  ['a number', '5'],
  ['null', 'null'],
  ['half of one', '{"name":'],
  ['a field that there is not', '{"colour":"red"}'],
];

/** What a change of this would be seen by. */
async function seen(look: string): Promise<string> {
  if (look === PREFERENCES) return JSON.stringify(await readPreferences(ownerId));
  const told = await owner.get(own.pathOf(look));
  if (told.status !== 200) throw new Error(`${look} answered ${told.status}`);
  return told.text;
}

test('every route that changes something by a body is swept', () => {
  const withBody = OPERATIONS.filter(({ method, body }) => /PATCH|PUT/.test(method) && body !== undefined);
  const swept = new Set(CHANGES.map(([operation]) => operation));
  expect([...swept].sort()).toEqual(withBody.map(({ method, path }) => `${method} ${path}`).sort());
});

describe.each(CHANGES)('%s', (operation, body, look, thing) => {
  const [method = '', path = ''] = operation.split(' ');

  test('refuses what cannot be meant, by the name of its field, changes nothing, and takes the rest', async () => {
    const to = thing ?? own.pathOf(path);
    const before = await seen(look);
    const wrong: string[] = [];
    for (const { field, what, bad } of badBodies(body)) {
      const found = fault(await owner.ask(method, to, bad), field);
      if (found !== null) wrong.push(`${field} ${what}: ${found}`);
    }
    for (const [what, bad] of NO_BODY) {
      const told = await owner.ask(method, to, bad);
      if (told.status !== 422) wrong.push(`${what}: ${told.status} ${told.text.slice(0, 160)}`);
    }
    expect(wrong).toEqual([]);
    expect(await seen(look)).toBe(before);
    const taken = await owner.ask(method, to, body);
    expect(taken.status, taken.text).toBeLessThan(300);
  });

  if (method === 'PATCH')
    test('refuses it alone as it does among others', async () => {
      const to = thing ?? own.pathOf(path);
      const before = await seen(look);
      const wrong: string[] = [];
      for (const [name, part] of Object.entries(body))
        for (const { field, what, bad } of badBodies({ [name]: part })) {
          const found = fault(await owner.ask(method, to, bad), field);
          if (found !== null) wrong.push(`${field} ${what}: ${found}`);
        }
      expect(wrong).toEqual([]);
      expect(await seen(look)).toBe(before);
    });
});
