// What the wiring refuses, and what a change of it does.
import { beforeAll, expect, test } from 'vitest';
import { sql } from 'drizzle-orm';
import { everyHolding } from '@/db/client';
import { findNodeByToken } from '@/db/queries/plan';
import { hashToken } from '@/lib/server/tokens';
import { type Asker, errorsOf, type Json, newHolding, personOf } from './asker';
import { AT, makeLongHouse } from './long-house';
import * as shown from './shown';

let owner: Asker;
beforeAll(async () => {
  owner = await personOf(await newHolding('larkmoor'), 'owner', 'owner@larkmoor.example');
  await makeLongHouse(owner);
  for (const number of [1, 2, 3]) {
    await owner.make(`${AT}/channels`, { ...shown.fan, number, relay: number, key: `c${number}` });
  }
});

const unknown: [string, Json, string][] = [
  ['sources', { ...shown.source, corePoint: 'no' }, 'corePoint'],
  ['channels', { ...shown.fan, number: 9, relay: 8, node: 'no' }, 'node'],
  ['channels', { ...shown.fan, number: 9, relay: 8, source: 'no' }, 'source'],
  ['channels', { ...shown.fan, number: 9, relay: 9 }, 'relay'],
  ['channels', { ...shown.fan, number: 9, relay: 8, runProof: { point: 'no', above: 1 } }, 'runProof.point'],
  ['loops', { ...shown.loop, channel: 'c1', intake: 'no' }, 'intake'],
  ['points', { ...shown.bench, key: 'new', node: 'no' }, 'node'],
  ['points', { ...shown.lift, derived: { of: 'mean', points: ['house-air', 'no'] } }, 'derived.points.1'],
  ['interlocks', { ...shown.interlock, channel: 'c1', other: 'no' }, 'other'],
  ['interlocks', { ...shown.interlock, channel: 'c1', other: 'c1' }, 'other'],
  ['lockouts', { channel: 'no', why: 'a test' }, 'channel'],
];
test.each([
  [{ above: -3, point: 'fan-amps' }, 'runProof.above'],
  [{ above: 1, point: 'bench-1' }, 'runProof.point'],
])('a run is not proved by what a standing fan shows as well: %o', async (runProof, path) => {
  const body = { ...shown.fan, number: 9, relay: 8, key: 'c9', runProof };
  const told = await owner.ask('POST', `${AT}/channels`, body);
  expect(told.status).toBe(422);
  expect(errorsOf(told)).toMatchObject([{ path }]);
});

test.each([
  ['difference', ['outdoors']],
  ['lift', ['house-air', 'outdoors', 'bench-1']],
  ['trend', ['house-air', 'outdoors']],
  ['dew-point', ['house-air']],
])('a %s of %o is refused: it has another number of points', async (of, points) => {
  const told = await owner.ask('POST', `${AT}/points`, {
    ...shown.lift,
    key: 'other-lift',
    derived: { of, points },
  });
  expect(told.status).toBe(422);
  expect(errorsOf(told)).toMatchObject([{ path: 'derived.points' }]);
});

test.each(unknown)(
  'in %s, a name that the house does not have is refused at its path: %#',
  async (list, body, path) => {
    const told = await owner.ask('POST', `${AT}/${list}`, body);
    expect(told.status).toBe(422);
    expect(errorsOf(told)).toMatchObject([{ path }]);
  },
);

test('a number, key or relay that is taken is a conflict', async () => {
  const taken = { ...shown.fan, number: 9, relay: 8, key: 'c9' };
  for (const change of [{ number: 1 }, { key: 'c1' }, { relay: 1 }]) {
    expect(await owner.ask('POST', `${AT}/channels`, { ...taken, ...change })).toMatchObject({ status: 409 });
  }
});

test('a ring of needs, a contradiction and a doubled interlock are refused', async () => {
  const needs = (channel: string, other: string) =>
    owner.ask('POST', `${AT}/interlocks`, { channel, kind: 'needs', other });
  expect(await needs('c1', 'c2')).toMatchObject({ status: 201 });
  expect(await needs('c2', 'c3')).toMatchObject({ status: 201 });
  expect(await needs('c3', 'c1')).toMatchObject({
    status: 409,
    body: { detail: expect.stringMatching(/c3 needs c1 needs c2 needs c3/) },
  });
  expect(await needs('c1', 'c2')).toMatchObject({ status: 409 });
  const never = { channel: 'c2', kind: 'never-with', other: 'c1' };
  expect(await owner.ask('POST', `${AT}/interlocks`, never)).toMatchObject({ status: 409 });
});

test('another relay clears the proof, another label does not', async () => {
  const proved = async () => (await owner.get(`${AT}/channels/c3`)).body['provedAt'];
  await everyHolding().execute(sql`update channel set proved_at = now() where key = 'c3'`);
  await owner.ask('PATCH', `${AT}/channels/c3`, { label: 'Third fan' });
  expect(await proved()).not.toBeNull();
  await owner.ask('PATCH', `${AT}/channels/c3`, { relay: 7 });
  expect(await proved()).toBeNull();
});

test('a change is checked as the whole that it makes', async () => {
  const told = await owner.ask('PATCH', `${AT}/points/bench-1`, { min: 90 });
  expect(told).toMatchObject({ status: 422, body: { errors: [{ path: 'max' }] } });
  const floorless = await owner.ask('PATCH', `${AT}/sources/gate-heap`, { corePoint: null });
  expect(floorless).toMatchObject({ status: 422, body: { errors: [{ path: 'coreFloor' }] } });
});

test('what is still in use is not taken out of use', async () => {
  for (const path of ['nodes/LH-1', 'points/gate-core', 'sources/gate-heap', 'channels/c1']) {
    const told = await owner.ask('DELETE', `${AT}/${path}`);
    expect([path, told.status]).toEqual([path, 409]);
  }
});

test('a rotated token leaves the one before good for a day, a revoked one ends both', async () => {
  const made = await owner.make(`${AT}/nodes`, { key: 'LH-9', kind: 'http' });
  const opens = async (token: unknown) =>
    (await findNodeByToken(everyHolding(), hashToken(String(token)))) !== null;
  const rotated = (await owner.ask('POST', `${AT}/nodes/LH-9/token`)).body;
  expect([await opens(made['token']), await opens(rotated['token'])]).toEqual([true, true]);
  expect(await owner.ask('DELETE', `${AT}/nodes/LH-9/token`)).toMatchObject({ status: 200 });
  expect([await opens(made['token']), await opens(rotated['token'])]).toEqual([false, false]);
});

test('every change that control reads raises the plan of its house', async () => {
  const revision = async () => {
    const { rows } = await everyHolding().execute<{ r: string }>(sql`select plan_revision as r from house`);
    return Number(rows[0]?.r);
  };
  for (const [path, body] of [
    ['', { frostLimit: 2 }],
    ['/points/bench-1', { offset: 0.5 }],
    ['/sources/gate-heap', { coreFloor: 37 }],
    ['/channels/c1', { minOn: 60 }],
    ['/nodes/LH-1', { reportEvery: 20 }],
  ] as const) {
    const before = await revision();
    await owner.ask('PATCH', `${AT}${path}`, body);
    expect(await revision()).toBeGreaterThan(before);
  }
});

test('a heap entry is kept, amended with who and when, and emptied by null', async () => {
  const entry = { source: 'gate-heap', kind: 'fed', text: 'straw', litresOfWater: 40 };
  const made = await owner.make(`${AT}/heap-entries`, {
    ...entry,
    materials: [{ material: 'straw', kilograms: 12 }],
  });
  const path = `${AT}/heap-entries/${String(made['id'])}`;
  const amended = await owner.ask('PATCH', path, { litresOfWater: null, text: 'straw and water' });
  expect(amended.body).toMatchObject({
    ...{ text: 'straw and water', litresOfWater: null, kind: 'fed', amendedBy: 'owner@larkmoor.example' },
    materials: [{ material: 'straw', kilograms: 12 }],
  });
});
