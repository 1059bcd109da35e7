// Whether a heap may be drawn on: what somebody says of it, and what building it anew takes away.
import { v7 } from 'uuid';
import { beforeAll, expect, test } from 'vitest';
import type { Holding } from '@/db/client';
import { listPersonCommands } from '@/db/queries/person-command';
import { type Asker, type Json, newHolding, personOf } from './asker';
import { AT, makeLongHouse } from './long-house';
import * as shown from './shown';

const HOUR_MS = 3_600_000;
let larkmoor: Holding;
let houseId: string;
let grower: Asker;
let installer: Asker;
let heapId: unknown;

beforeAll(async () => {
  larkmoor = await newHolding('larkmoor');
  const owner = await personOf(larkmoor, 'owner', 'owner@larkmoor.example');
  grower = await personOf(larkmoor, 'grower', 'grower@larkmoor.example');
  installer = await personOf(larkmoor, 'installer', 'installer@larkmoor.example');
  houseId = await makeLongHouse(owner);
  heapId = (await owner.get(`${AT}/sources/gate-heap`)).body['id'];
  await owner.make(`${AT}/sources`, { ...shown.source, name: 'Old heap', ready: null });
});

const orders = async () =>
  (await listPersonCommands(larkmoor, houseId, 0)).map(({ by, body }) => ({ by, ...(body as object) }));
const built = (more: Json) =>
  grower.ask('POST', `${AT}/heap-entries`, { source: 'gate-heap', kind: 'built', text: 'Anew.', ...more });

test('somebody’s word is ordered under their name', async () => {
  const told = await grower.ask('POST', `${AT}/sources/gate-heap/ready`);
  expect([told.status, told.body['until']]).toEqual([200, null]);
  expect((await orders()).at(-1)).toEqual({ by: 'grower@larkmoor.example', kind: 'ready', source: heapId });
});

test('is not an installer’s to give, nor for a heap that waits for nothing', async () => {
  const before = await orders();
  expect((await installer.ask('POST', `${AT}/sources/gate-heap/ready`)).status).toBe(403);
  expect((await grower.ask('POST', `${AT}/sources/old-heap/ready`)).status).toBe(409);
  expect((await grower.ask('POST', `${AT}/sources/nobody/ready`)).status).toBe(404);
  expect(await orders()).toEqual(before);
});

// ready.for is three days: what the core did since an older building has shown it already
test('a heap that is built anew has to show its core again, once for an entry', async () => {
  const id = v7();
  expect((await built({ id, at: new Date(Date.now() - HOUR_MS).toISOString() })).status).toBe(201);
  const after = await orders();
  expect(after.at(-1)).toEqual({ by: 'grower@larkmoor.example', kind: 'rebuilt', source: heapId });
  expect((await built({ id, at: new Date(Date.now() - HOUR_MS).toISOString() })).status).toBe(200);
  expect((await built({ at: new Date(Date.now() - 73 * HOUR_MS).toISOString() })).status).toBe(201);
  expect((await built({ source: 'old-heap' })).status).toBe(201);
  expect((await built({ kind: 'turned' })).status).toBe(201);
  expect(await orders()).toEqual(after);
});
