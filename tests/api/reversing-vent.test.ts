// A reversing vent is two channels and the interlock between them, made whole or not at all.
import { beforeAll, expect, test } from 'vitest';
import { type Asker, errorsOf, itemsOf, type Json, newHolding, personOf } from './asker';
import { AT, makeLongHouse } from './long-house';
import * as shown from './shown';

const PATH = `${AT}/reversing-vents`;
const north = {
  node: 'LH-1',
  key: 'north-vent',
  label: 'North vent',
  open: { number: 3, relay: 3 },
  shut: { number: 4, relay: 4 },
  load: { watts: 60, volts: 24, supply: 'dc', contactAmps: 10 },
  longestOn: 200,
};

let owner: Asker;
let grower: Asker;
beforeAll(async () => {
  const larkmoor = await newHolding('larkmoor');
  owner = await personOf(larkmoor, 'owner', 'owner@larkmoor.example');
  grower = await personOf(larkmoor, 'grower', 'grower@larkmoor.example');
  await makeLongHouse(owner);
  await owner.make(`${AT}/channels`, shown.vent);
  await owner.make(`${AT}/channels`, { ...shown.vent, number: 9, relay: 8, key: 'east-vent-shut' });
});

const keysOf = async (list: string, key: string) =>
  itemsOf(await owner.get(`${AT}/${list}`)).map((one) => one[key]);

const refused: [string, Json, string[]][] = [
  ['a node that the house does not have', { node: 'no' }, ['node']],
  ['a relay that the node does not have', { shut: { number: 4, relay: 9 } }, ['shut.relay']],
  ['a relay that is taken', { open: { number: 3, relay: 2 } }, ['open.relay']],
  ['a relay that is taken, of the second way', { shut: { number: 4, relay: 8 } }, ['shut.relay']],
  ['a number that is taken', { shut: { number: 2, relay: 4 } }, ['shut.number']],
  ['a key that is taken by its second channel', { key: 'east-vent' }, ['key']],
  ['one relay for both ways', { shut: { number: 4, relay: 3 } }, ['shut.relay']],
  ['one number and relay for both ways', { shut: north.open }, ['shut.number', 'shut.relay']],
  ['no longest on', { longestOn: undefined }, ['longestOn']],
  ['no dead time', { deadTime: 0 }, ['deadTime']],
  ['a kind of load of its own', { load: { kind: 'heater' } }, ['load.kind']],
  ['a key too long for what is put behind it', { key: 'v'.repeat(59) }, ['key']],
  ['a name too long for what is put behind it', { label: 'v'.repeat(111) }, ['label']],
];
test.each(refused)('%s is refused at its field, and nothing is made', async (_what, change, paths) => {
  const before = [await keysOf('channels', 'key'), await keysOf('interlocks', 'id')];
  const told = await owner.ask('POST', PATH, { ...north, ...change });
  expect(told.status).toBe(422);
  expect((errorsOf(told) as Json[]).map((one) => one['path'])).toEqual(paths);
  expect([await keysOf('channels', 'key'), await keysOf('interlocks', 'id')]).toEqual(before);
});

test('who may not write the wiring makes no vent', async () => {
  expect(await grower.ask('POST', PATH, north)).toMatchObject({ status: 403 });
});

test('a vent is made whole: two channels that fall to off, with a longest on, never both on', async () => {
  const body = { ...north, deadTime: 3, startsPerHour: 12 };
  const made = await owner.ask('POST', PATH, body);
  const way = {
    ...{ node: 'LH-1', contact: 'NO', longestOn: 200, startsPerHour: 12, provedAt: null, protection: null },
    load: { ...north.load, kind: 'vent' },
  };
  const open = { ...way, number: 3, relay: 3, key: 'north-vent-open', label: 'North vent, opening' };
  const shut = { ...way, number: 4, relay: 4, key: 'north-vent-shut', label: 'North vent, shutting' };
  const interlock = {
    channel: open.key,
    kind: 'never-with',
    other: shut.key,
    delay: 3,
    frostMayBreak: false,
  };
  expect(made).toMatchObject({ status: 201, body: { open, shut, interlock } });
  expect((await owner.get(`${AT}/channels/north-vent-open`)).body).toEqual(made.body['open']);
  expect((await owner.get(`${AT}/channels/4`)).body).toEqual(made.body['shut']);
  expect(itemsOf(await owner.get(`${AT}/interlocks`))).toEqual([made.body['interlock']]);
});

test('the same vent a second time is refused', async () => {
  const again = await owner.ask('POST', PATH, north);
  expect(again).toMatchObject({ status: 422, body: { errors: [{ path: 'open.number' }] } });
});

test('the longest names still fit a channel, and a vent is told in the record by its key', async () => {
  const key = 'w'.repeat(58);
  const west = {
    ...{ ...north, key, label: 'w'.repeat(110) },
    open: { number: 5, relay: 5 },
    shut: { number: 6, relay: 6 },
  };
  const made = await owner.make(PATH, west);
  expect(made).toMatchObject({ shut: { key: `${key}-shut` }, interlock: { delay: 2 } });
  const told = itemsOf(await owner.get('/audit')).find((one) => one['action'] === 'reversing-vent.create');
  expect(told).toMatchObject({ subject: `long-house/${key}` });
});
