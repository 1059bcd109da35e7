// Prices, costs of heaps and reports by mail, by their interface.
import { beforeAll, expect, it } from 'vitest';
import type { Asker } from './asker';
import { errorsOf, itemsOf, type Json, newHolding, personOf } from './asker';
import { furnish } from './furnished';

let owner: Asker;
let grower: Asker;
const at = '/houses/long-house';
const prices = {
  revision: 0,
  currency: 'EUR',
  tariffs: [
    {
      from: '2026-01-01',
      price: '0.2875',
      bands: [{ from: '22:00', to: '06:00', days: 'all', price: '0.21' }],
    },
  ],
  fuels: [{ fuel: 'propane', unit: 'kg', price: '2.35', kWh: null, efficiency: 0.85 }],
};
beforeAll(async () => {
  const holding = await newHolding('larkmoor');
  owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  grower = await personOf(holding, 'grower', 'grower@larkmoor.example');
  await furnish(holding, owner);
});

it('prices are none at first, and come back to the last place as they were entered', async () => {
  expect((await owner.get('/money')).body).toEqual({ revision: 0, currency: null, tariffs: [], fuels: [] });
  expect((await owner.ask('PUT', '/money', prices)).body).toEqual({ ...prices, revision: 1 });
  expect((await grower.get('/money')).body).toEqual({ ...prices, revision: 1 });
});

it('prices that somebody wrote meanwhile are not written over', async () => {
  expect((await owner.ask('PUT', '/money', { ...prices, currency: 'USD' })).status).toBe(412);
  expect((await owner.get('/money')).body['currency']).toBe('EUR');
});

it('a grower may not write prices or costs, but may have reports sent', async () => {
  expect((await grower.ask('PUT', '/money', { ...prices, revision: 1 })).status).toBe(403);
  const cost = { source: 'gate-heap', kind: 'fan', on: '2026-10-03', amount: '40' };
  expect((await grower.ask('POST', `${at}/heap-costs`, cost)).status).toBe(403);
  const schedule = { span: 'month', to: ['grower@larkmoor.example'] };
  expect((await grower.ask('POST', `${at}/report-schedules`, schedule)).status).toBe(201);
});

it.each([
  ['a price below nothing', { tariffs: [{ from: '2026-01-01', price: '-1', bands: [] }] }, 'tariffs.0.price'],
  ['a currency that there is not', { currency: 'QQQ' }, 'currency'],
  [
    'two tariffs from one day',
    { tariffs: [1, 2].map(() => ({ from: '2026-01-01', price: '1', bands: [] })) },
    'tariffs',
  ],
  [
    'wood by the gallon',
    { fuels: [{ fuel: 'wood', unit: 'US gal', price: '1', kWh: null, efficiency: 0.7 }] },
    'fuels.0.unit',
  ],
])('%s is refused at its field', async (_what, change, path) => {
  const told = await owner.ask('PUT', '/money', { ...prices, revision: 1, ...change });
  expect([told.status, (errorsOf(told) as Json[])[0]?.['path']]).toEqual([422, path]);
});

it('hours at a rate are an amount, to the last place, and a cost is an amount or hours but not both', async () => {
  const cost = { source: 'gate-heap', kind: 'work', on: '2026-10-03', text: 'Built it.' };
  const made = await owner.make(`${at}/heap-costs`, { ...cost, work: { hours: '3.25', rate: '18.1' } });
  expect(made).toMatchObject({ amount: '58.825', years: 1, source: 'gate-heap' });
  const both = await owner.ask('POST', `${at}/heap-costs`, {
    ...{ ...cost, amount: '1', work: { hours: '1', rate: '1' } },
  });
  expect(both.status).toBe(422);
  expect((await owner.ask('DELETE', `${at}/heap-costs/${String(made['id'])}`)).status).toBe(204);
  const left = itemsOf(await owner.get(`${at}/heap-costs?source=gate-heap`));
  expect(left.map((one) => one['kind'])).toEqual(['pipe']);
});

it('a cost that was entered wrong is written anew, under the same name', async () => {
  const pipe = itemsOf(await owner.get(`${at}/heap-costs`)).find((one) => one['kind'] === 'pipe') ?? {};
  const path = `${at}/heap-costs/${String(pipe['id'])}`;
  const anew = { source: 'gate-heap', kind: 'haulage', on: '2026-10-04', text: 'Not the pipe.', years: 2 };
  expect((await grower.ask('PUT', path, { ...anew, amount: '95' })).status).toBe(403);
  expect((await owner.ask('PUT', path, anew)).status).toBe(422);
  const told = await owner.ask('PUT', path, { ...anew, amount: '95' });
  expect([told.status, told.body]).toEqual([
    200,
    expect.objectContaining({ ...anew, id: pipe['id'], amount: '95' }),
  ]);
  expect(itemsOf(await owner.get(`${at}/heap-costs`))).toEqual([told.body]);
});

it('a report is sent to people of the holding only', async () => {
  const told = await owner.ask('POST', `${at}/report-schedules`, {
    span: 'week',
    to: ['x@elsewhere.example'],
  });
  expect([told.status, (errorsOf(told) as Json[])[0]?.['path']]).toEqual([422, 'to.0']);
});
