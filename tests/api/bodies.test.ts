// Every body that the interface's description shows is accepted, and given back as it was given.
import { beforeAll, expect, test } from 'vitest';
import { newHolding, personOf, type Asker, type Json } from './asker';
import * as shown from './shown';

let owner: Asker;
beforeAll(async () => {
  owner = await personOf(await newHolding('larkmoor'), 'owner', 'owner@larkmoor.example');
});

async function givenBack(path: string, body: Json): Promise<Json> {
  const made = await owner.make(path, body);
  expect(made).toMatchObject(body);
  return made;
}

test('each body of the description is accepted and given back as shown', async () => {
  await givenBack('/houses', shown.house);
  const at = '/houses/long-house';
  const node = await givenBack(`${at}/nodes`, shown.node);
  expect(node['token']).toMatch(/^[\w-]{43}$/);
  await givenBack(`${at}/points`, shown.bench);
  for (const point of shown.otherPoints) await givenBack(`${at}/points`, point);
  await givenBack(`${at}/points`, shown.lift);
  const source = await givenBack(`${at}/sources`, shown.source);
  expect(source['slug']).toBe('gate-heap');
  await givenBack(`${at}/channels`, shown.fan);
  await givenBack(`${at}/channels`, shown.vent);
  await givenBack(`${at}/loops`, shown.loop);
  await givenBack(`${at}/interlocks`, shown.interlock);
  const rule = await givenBack(`${at}/rules`, shown.rule);
  expect(await owner.get(`/rules/${String(rule['slug'])}`)).toMatchObject({ status: 200, body: shown.rule });
  const drafted = await owner.ask('PUT', `/rules/${String(rule['id'])}/draft`, shown.rule.body);
  expect(drafted).toMatchObject({ status: 200, body: { body: shown.rule.body, number: 1, status: 'draft' } });
  await givenBack(`${at}/lockouts`, { channel: 'gate-heap-fan', why: 'bearing' });
});

test('only what the description calls required is required', async () => {
  const house = { name: 'Bare house', zone: 'Europe/London', latitude: 54, longitude: -2 };
  await givenBack('/houses', house);
  const at = '/houses/bare-house';
  await givenBack(`${at}/nodes`, { key: 'B-1', kind: 'http' });
  await givenBack(`${at}/points`, { key: 'air', name: 'Air', role: 'house-air', unit: 'Cel' });
  await givenBack(`${at}/sources`, { name: 'Bare heap', kind: 'heap' });
  const { number, relay, key, label, contact, load, minOn, minOff } = shown.fan;
  await givenBack(`${at}/channels`, {
    ...{ number, relay, key, label, contact, load, minOn, minOff },
    node: 'B-1',
  });
  const body = { purpose: 'warm', point: 'air', band: [{ from: '00:00', low: 4, high: 7.5 }] };
  await givenBack(`${at}/rules`, { name: 'Bare rule', channel: 'gate-heap-fan', body });
});
