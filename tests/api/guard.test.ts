// What the guard promises for every route, shown on some of them.
import { beforeAll, expect, test } from 'vitest';
import { type Asker, errorsOf, itemsOf, type Json, newHolding, NOBODY, personOf } from './asker';
import * as shown from './shown';

let owner: Asker;
let grower: Asker;
beforeAll(async () => {
  const larkmoor = await newHolding('larkmoor');
  owner = await personOf(larkmoor, 'owner', 'owner@larkmoor.example');
  grower = await personOf(larkmoor, 'grower', 'grower@larkmoor.example');
  await owner.make('/houses', shown.house);
  await owner.make('/houses/long-house/nodes', shown.node);
});
const points = '/houses/long-house/points';
const newPoint = (key: string) => ({ key, node: 'LH-1', name: key, role: 'other', unit: 'Cel' });
const keyed = (key: string) => ({ 'idempotency-key': key });

test('each entity carries an ETag, and a change made with an old one is refused', async () => {
  const first = await owner.get('/houses/long-house');
  const tag = first.headers.get('etag') ?? '';
  expect(tag).toMatch(/^"\d+"$/);
  const change = { altitude: 311 };
  const changed = await owner.ask('PATCH', '/houses/long-house', change, { 'if-match': tag });
  expect(changed.status).toBe(200);
  expect(changed.headers.get('etag')).not.toBe(tag);
  expect(await owner.ask('PATCH', '/houses/long-house', change, { 'if-match': tag })).toMatchObject({
    status: 412,
  });
  expect(await owner.ask('PATCH', '/houses/long-house', change, { 'if-match': '*' })).toMatchObject({
    status: 200,
  });
});

test('of two changes with the same ETag at the same moment one is refused', async () => {
  const tag = (await owner.get('/houses/long-house')).headers.get('etag') ?? '';
  const change = (altitude: number) =>
    owner.ask('PATCH', '/houses/long-house', { altitude }, { 'if-match': tag });
  const told = await Promise.all([change(1), change(2), change(3)]);
  expect(told.map((one) => one.status).sort()).toEqual([200, 412, 412]);
});

test('a request repeated with its key acts once and is answered the same', async () => {
  const first = await owner.ask('POST', points, newPoint('once'), keyed('a1'));
  const again = await owner.ask('POST', points, newPoint('once'), keyed('a1'));
  expect([first.status, again.status]).toEqual([201, 201]);
  expect(again.text).toBe(first.text);
});

test('two requests with one key at the same moment make one thing', async () => {
  const make = () => owner.ask('POST', '/houses', { ...shown.house, name: 'Twice' }, keyed('a2'));
  const told = await Promise.all([make(), make(), make()]);
  expect(new Set(told.map((one) => one.body['id'])).size).toBe(1);
  const houses = itemsOf(await owner.get('/houses'));
  expect(houses.filter((one) => one['name'] === 'Twice')).toHaveLength(1);
});

test('the same key with another body is refused; another person may use it', async () => {
  await owner.ask('POST', '/houses', { ...shown.house, name: 'Keyed' }, keyed('a3'));
  const other = await owner.ask('POST', '/houses', { ...shown.house, name: 'Other' }, keyed('a3'));
  expect(other).toMatchObject({ status: 422, body: { errors: [{ path: 'Idempotency-Key' }] } });
  expect(await grower.ask('POST', '/houses', shown.house, keyed('a3'))).toMatchObject({ status: 403 });
});

test('a token that is shown once is answered again to its key, and lies nowhere in the clear', async () => {
  const make = () =>
    owner.ask('POST', '/houses/long-house/nodes', { key: 'LH-2', kind: 'http' }, keyed('a4'));
  const first = await make();
  expect((await make()).body['token']).toBe(first.body['token']);
  const told = JSON.stringify([await owner.get('/audit'), await owner.get('/houses/long-house/nodes')]);
  expect(told).not.toContain(String(first.body['token']));
});

test('a body that is no JSON, empty, a list or nested without end is refused as a whole', async () => {
  for (const body of ['{', '', '[]', 'null', '"text"', `${'['.repeat(5000)}${']'.repeat(5000)}`]) {
    const told = await owner.ask('POST', points, body);
    expect(told.status).toBe(422);
    expect(errorsOf(told)).toMatchObject([{ path: '' }]);
  }
});

test('a body over 1 MiB is refused without being read to its end', async () => {
  const told = await owner.ask('POST', points, { ...newPoint('big'), name: 'x'.repeat(1_100_000) });
  expect(told).toMatchObject({ status: 413, body: { code: 'too-large' } });
});

test('text that no database keeps is refused, in bodies, paths and queries', async () => {
  expect(await owner.ask('POST', points, { ...newPoint('nul'), name: 'a\0b' })).toMatchObject({
    status: 422,
  });
  expect(await owner.ask('POST', points, '{"name":"\\ud800"}')).toMatchObject({ status: 422 });
  expect(await owner.get('/houses/%00')).toMatchObject({ status: 404 });
  expect(await owner.get('/houses/long-house/channels/99999999999999999999')).toMatchObject({ status: 404 });
  expect(await owner.get('/houses/long-house/readings?points=%00')).toMatchObject({ status: 422 });
  expect(await owner.get('/houses/long-house/rules?cursor=%00')).toMatchObject({ status: 422 });
});

test('each wrong field is named at its path, unknown ones one by one', async () => {
  const told = await owner.ask('POST', points, { key: 'a b', node: 'LH-1', name: '', colour: 1, shape: 2 });
  const paths = (errorsOf(told) as Json[]).map((one) => one['path']);
  expect(paths.sort()).toEqual(['colour', 'key', 'name', 'role', 'shape', 'unit']);
});

test('hostile text is kept as text', async () => {
  const name = `<script>alert(1)</script>'"; drop table house;-- ${'𝔤'.repeat(10)}`;
  const made = await owner.make('/houses', { ...shown.house, name });
  expect(made).toMatchObject({ name });
  expect(String(made['slug'])).toMatch(/^[a-z0-9-]+$/);
});

test('the same name twice gives the second its own slug', async () => {
  await owner.make('/houses', { ...shown.house, name: 'Prop house' });
  expect(await owner.make('/houses', { ...shown.house, name: 'Prop house' })).toMatchObject({
    slug: 'prop-house-2',
  });
});

test('a house named like a page gets an address that the page does not have', async () => {
  expect(await owner.make('/houses', { ...shown.house, name: 'People' })).toMatchObject({ slug: 'people-2' });
});

test('a list goes on where it was left, and every item comes once', async () => {
  const seen: unknown[] = [];
  let next: string | null = '';
  while (next !== null) {
    const told = await owner.get(`/houses?limit=2${next === '' ? '' : `&cursor=${next}`}`);
    seen.push(...itemsOf(told).map((one) => one['id']));
    next = told.body['next'] as string | null;
  }
  expect(seen).toEqual(itemsOf(await owner.get('/houses?limit=500')).map((one) => one['id']));
  expect(await owner.get('/houses?limit=501')).toMatchObject({ status: 422 });
});

test("a change that another site's page sends with the cookie is not carried out", async () => {
  const headers = { origin: 'https://elsewhere.example' };
  const told = await owner.ask('POST', '/houses', shown.house, headers);
  expect(told).toMatchObject({ status: 403, body: { code: 'wrong-origin' } });
});

test('every refusal has one form, and tells no cause', async () => {
  const told = await NOBODY.get('/houses');
  expect(told.headers.get('content-type')).toBe('application/problem+json');
  expect(told.body).toEqual({
    type: 'about:blank',
    title: 'Not signed in',
    status: 401,
    code: 'not-signed-in',
    detail: expect.any(String),
  });
});

test('changes and refusals are written down with who and what, nothing secret among it', async () => {
  await grower.ask('POST', '/houses', shown.house);
  const rows = itemsOf(await owner.get('/audit?limit=500'));
  expect(rows).toContainEqual(
    expect.objectContaining({ by: 'grower@larkmoor.example', action: 'refused', subject: 'house.create' }),
  );
  expect(rows).toContainEqual(
    expect.objectContaining({
      by: 'owner@larkmoor.example',
      action: 'node.create',
      subject: 'long-house/LH-2',
    }),
  );
  expect(rows).toContainEqual(expect.objectContaining({ action: 'sign-in' }));
});
