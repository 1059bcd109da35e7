// The set-up over the interface: told from what there is, steps put off are remembered, and hostile input changes nothing.
import { beforeAll, expect, test } from 'vitest';
import { type Asker, errorsOf, type Json, newHolding, personOf } from './asker';
import * as shown from './shown';

const AT = '/houses/long-house';
let owner: Asker;
let installer: Asker;
let grower: Asker;

beforeAll(async () => {
  const larkmoor = await newHolding('larkmoor');
  owner = await personOf(larkmoor, 'owner', 'owner@larkmoor.example');
  installer = await personOf(larkmoor, 'installer', 'installer@larkmoor.example');
  grower = await personOf(larkmoor, 'grower', 'grower@larkmoor.example');
  await owner.make('/houses', shown.house);
});

const states = async (asker = owner) => {
  const told = await asker.get(`${AT}/setup`);
  expect(told.status).toBe(200);
  const steps = told.body['steps'] as { step: string; state: string }[];
  return Object.fromEntries(steps.map((one) => [one.step, one.state]));
};
const putOff = (steps: unknown, asker = owner) => asker.ask('PUT', `${AT}/setup`, { putOff: steps });

test('a bare house asks for a node first, whoever looks', async () => {
  for (const asker of [owner, installer, grower])
    expect(await states(asker)).toMatchObject({ house: 'done', node: 'open', point: 'waits', rule: 'waits' });
});

test('what is put off is remembered for everybody, and taken up again', async () => {
  expect((await putOff(['source', 'node', 'node'], installer)).status).toBe(200);
  expect(await states(grower)).toMatchObject({ node: 'put-off', source: 'put-off' });
  expect((await putOff(['source'])).status).toBe(200);
  expect(await states()).toMatchObject({ node: 'open', source: 'put-off' });
  expect((await putOff([])).status).toBe(200);
  expect(await states()).toMatchObject({ source: 'open' });
});

test('a grower may not put a step off', async () => {
  expect((await putOff(['node'], grower)).status).toBe(403);
});

test.each([
  ['a step that cannot wait', ['sheet']],
  ['no step', ['<script>']],
  ['no list', 'node'],
  ['numbers', [1]],
  ['nothing', undefined],
  ['a list without end', Array.from({ length: 10_000 }, () => 'node')],
])('%s is refused at its field', async (_, steps) => {
  const told = await putOff(steps);
  expect(told.status).toBe(422);
  expect(String((errorsOf(told) as Json[])[0]?.['path'])).toMatch(/^putOff/);
  expect(await states()).toMatchObject({ node: 'open' });
});

test('each thing that is made does its step', async () => {
  await installer.make(`${AT}/nodes`, shown.node);
  expect(await states()).toMatchObject({ node: 'done', point: 'open', channel: 'open', loop: 'waits' });
  for (const point of shown.otherPoints) await installer.make(`${AT}/points`, point);
  await installer.make(`${AT}/points`, shown.bench);
  await installer.make(`${AT}/sources`, shown.source);
  await installer.make(`${AT}/channels`, shown.fan);
  expect(await states()).toMatchObject({ point: 'done', source: 'done', channel: 'done', loop: 'open' });
  await installer.make(`${AT}/loops`, shown.loop);
  const rule = await grower.make(`${AT}/rules`, shown.rule);
  expect(await states()).toMatchObject({ loop: 'done', rule: 'open', proving: 'open', sheet: 'open' });
  const forced = await grower.ask('POST', `/rules/${String(rule['slug'])}/force`, {
    why: 'first rule',
    acceptUnproved: true,
  });
  expect(forced.status).toBe(200);
  expect(await states()).toMatchObject({ rule: 'done', proving: 'open' });
});

test('putting a step off touches neither the house’s revision nor its plan', async () => {
  const before = await owner.get(AT);
  await putOff(['proving']);
  expect((await owner.get(AT)).body).toEqual(before.body);
});
