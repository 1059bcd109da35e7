// Drafts, checks and what is in force.
import { beforeAll, expect, test } from 'vitest';
import { type Asker, errorsOf, itemsOf, type Json, newHolding, personOf } from './asker';
import { makeLongHouse } from './long-house';
import * as shown from './shown';

let owner: Asker;
let rule: string;
beforeAll(async () => {
  owner = await personOf(await newHolding('larkmoor'), 'owner', 'owner@larkmoor.example');
  await makeLongHouse(owner);
  await owner.make('/houses/long-house/channels', shown.fan);
  rule = `/rules/${String((await owner.make('/houses/long-house/rules', shown.rule))['id'])}`;
});

const body = shown.rule.body;
const draft = (change: Json) => owner.ask('PUT', `${rule}/draft`, { ...body, ...change });
const force = (given: Json = {}) => owner.ask('POST', `${rule}/force`, { why: 'a test', ...given });
const accepting = { acceptUnproved: true };

test('an unproved channel keeps a draft out of force until that is accepted', async () => {
  expect(await force()).toMatchObject({ status: 409 });
  const forced = await force(accepting);
  expect(forced).toMatchObject({ status: 200, body: { number: 1, status: 'in-force', why: 'a test' } });
});

test('without a draft nothing is put into force', async () => {
  expect(await force(accepting)).toMatchObject({ status: 409 });
});

test('an amended draft never touches the version in force', async () => {
  const lower = [{ from: '00:00', low: 5, high: 8 }];
  expect(await draft({ band: lower })).toMatchObject({ status: 200, body: { number: 2, status: 'draft' } });
  const told = await owner.get(rule);
  expect(told.body).toMatchObject({
    inForce: { number: 1, body: { band: body.band } },
    draft: { number: 2 },
  });
});

test('the version that takes its place says so, and the one before is kept as retired', async () => {
  expect(await force(accepting)).toMatchObject({ status: 200, body: { number: 2 } });
  const versions = (await owner.get(rule)).body['versions'] as Json[];
  expect(versions.map((one) => [one['number'], one['status']])).toEqual([
    [2, 'in-force'],
    [1, 'retired'],
  ]);
});

test('an older version becomes the draft again', async () => {
  const back = await owner.ask('POST', `${rule}/go-back`, { version: 1 });
  expect(back).toMatchObject({ status: 200, body: { number: 3, body: { band: body.band } } });
  expect(await owner.ask('POST', `${rule}/go-back`, { version: 9 })).toMatchObject({ status: 422 });
});

test('a longest draw under the least on time is a stop, and refuses force', async () => {
  await draft({ rest: { longestDraw: 60, least: 1800 } });
  const { findings } = (await owner.ask('POST', `${rule}/check`, {})).body as { findings: Json[] };
  expect(findings.filter((one) => one['level'] === 'stop')).toHaveLength(1);
  expect(await force(accepting)).toMatchObject({ status: 409 });
});

test('a check of what is being typed changes nothing', async () => {
  const before = (await owner.get(rule)).text;
  const told = await owner.ask('POST', `${rule}/check`, { body: { ...body, only: undefined } });
  expect(told.status).toBe(200);
  expect((await owner.get(rule)).text).toBe(before);
});

const twisted: [string, Json, string][] = [
  ['an unknown point', { point: 'nowhere' }, 'point'],
  ['an unknown stand-in', { standIns: [{ point: 'nowhere' }] }, 'standIns.0.point'],
  [
    'an unknown recovery point',
    { rest: { ...body.rest, until: { point: 'no', level: 43 } } },
    'rest.until.point',
  ],
  ['an unknown fact', { only: { all: [{ fact: 'no', operator: 'equal', value: 1 }] } }, 'only.all.0.fact'],
  [
    'an unknown operator deep inside',
    { only: { all: [{ any: [{ fact: 'gate-core', operator: 'like', value: 1 }] }] } },
    'only.all.0.any.0.operator',
  ],
  ['a band turned over', { band: [{ from: '00:00', low: 8, high: 4 }] }, 'band.0.high'],
  ['a band under half a kelvin', { band: [{ from: '00:00', low: 4, high: 4.4 }] }, 'band.0.high'],
  ['a band in words', { band: [{ from: '00:00', low: 'cold', high: 4.4 }] }, 'band.0.low'],
  ['no band', { band: [] }, 'band'],
  [
    'a rest without its longest time',
    { rest: { longestDraw: 9, least: 9, until: { point: 'gate-base', level: 4 } } },
    'rest.most',
  ],
  ['a stand-in for itself', { standIns: [{ point: 'bench-1' }] }, 'standIns'],
  ['a stand-in twice', { standIns: [{ point: 'house-air' }, { point: 'house-air' }] }, 'standIns'],
  ['a group of two kinds', { only: { all: [], any: [] } }, 'only'],
  [
    'a condition on words',
    { only: { all: [{ fact: 'gate-core', operator: 'lessThan', value: 'hot' }] } },
    'only.all.0.value',
  ],
  ['a key that is none', { bandd: [] }, 'bandd'],
  ['29 February is a day, 31 April is none', { season: { from: '02-29', to: '04-31' } }, 'season.to'],
];

test.each(twisted)('%s is refused at its path, in words', async (_what, change, path) => {
  const told = await draft(change);
  expect(told.status).toBe(422);
  expect(errorsOf(told)).toEqual([{ path, message: expect.stringMatching(/^[A-ZÀ-Ž].*[.]$/) }]);
});

test('a new rule names its points one deeper', async () => {
  const given = { name: 'Another', channel: 'gate-heap-fan', body: { ...body, point: 'nowhere' } };
  const told = await owner.ask('POST', '/houses/long-house/rules', given);
  expect(errorsOf(told)).toMatchObject([{ path: 'body.point' }]);
});

test('a point that gets another key is named by it in the rules', async () => {
  await draft({});
  const told = await owner.ask('PATCH', '/houses/long-house/points/bench-1', { key: 'bench-north' });
  expect(told).toMatchObject({ status: 200, body: { key: 'bench-north', revision: 2 } });
  expect((await owner.get(rule)).body).toMatchObject({ draft: { body: { point: 'bench-north' } } });
  expect(await owner.ask('DELETE', '/houses/long-house/points/bench-north')).toMatchObject({ status: 409 });
});

test('a retired rule is no longer listed but with the retired ones, and its channel can go', async () => {
  expect(await owner.ask('DELETE', '/houses/long-house/channels/1')).toMatchObject({ status: 409 });
  expect(await owner.ask('POST', `${rule}/retire`, { why: 'a test' })).toMatchObject({ status: 200 });
  expect(itemsOf(await owner.get('/houses/long-house/rules'))).toEqual([]);
  expect(itemsOf(await owner.get('/houses/long-house/rules?retired=true'))).toHaveLength(1);
  expect(await owner.ask('DELETE', '/houses/long-house/channels/1')).toMatchObject({ status: 204 });
});
