// A rule copied to another channel or house: points mapped, units kept, a draft and nothing more.
import { beforeAll, expect, test } from 'vitest';
import { type Asker, errorsOf, type Json, newHolding, personOf } from './asker';
import * as shown from './shown';

let owner: Asker;
let installer: Asker;
let stranger: Asker;
let rule: string;
beforeAll(async () => {
  const larkmoor = await newHolding('larkmoor');
  owner = await personOf(larkmoor, 'owner', 'owner@larkmoor.example');
  installer = await personOf(larkmoor, 'installer', 'installer@larkmoor.example');
  stranger = await personOf(await newHolding('stonebeck'), 'owner', 'owner@stonebeck.example');
  await wire(owner, 'Long house', 'long-house', [shown.bench, ...shown.otherPoints]);
  await owner.make('/houses/long-house/channels', shown.vent);
  rule = `/rules/${String((await owner.make('/houses/long-house/rules', shown.rule))['slug'])}`;
  await wire(owner, 'Prop house', 'prop-house', [
    ...[there('bed', 'bench'), there('air', 'house-air'), there('core', 'heap-core')],
    ...[there('base', 'heap-base'), there('in', 'loop-intake'), there('out', 'loop-return')],
    there('damp', 'humidity', '%RH'),
  ]);
  await wire(stranger, 'Beck house', 'beck-house', [there('bed', 'bench')]);
});

function there(key: string, role: string, unit = 'Cel'): Json {
  return { key, node: 'LH-1', name: key, role, unit };
}

async function wire(who: Asker, name: string, slug: string, points: Json[]): Promise<void> {
  await who.make('/houses', { ...shown.house, name });
  await who.make(`/houses/${slug}/nodes`, shown.node);
  for (const point of points) await who.make(`/houses/${slug}/points`, point);
  const { source: _source, runProof: _proof, fallback: _fallback, ...fan } = shown.fan;
  await who.make(`/houses/${slug}/channels`, { ...fan, frostHelp: false });
}

const mapped = (change: Record<string, string> = {}) =>
  Object.entries({
    'bench-1': 'bed',
    'house-air': 'air',
    'gate-base': 'base',
    'gate-core': 'core',
    'loop-intake': 'in',
    'loop-return': 'out',
    ...change,
  }).map(([from, to]) => ({ from, to }));
const toProp = (change: Json = {}) =>
  owner.ask('POST', `${rule}/copy`, {
    house: 'prop-house',
    channel: 'gate-heap-fan',
    points: mapped(),
    ...change,
  });

test('a copy in another house is a draft there, with every point put through the mapping', async () => {
  const told = await toProp({ name: 'Prop fan by the bed' });
  expect(told).toMatchObject({
    status: 201,
    body: {
      ...{ house: 'prop-house', slug: 'prop-fan-by-the-bed', inForce: null, draft: { number: 1 } },
      copiedFrom: { rule: 'gate-heap-fan-by-the-bench', house: 'long-house', version: 1 },
      body: {
        ...{ point: 'bed', standIns: [{ point: 'air', offset: -0.5 }] },
        only: { all: [{ fact: 'core', operator: 'greaterThanInclusive', value: 38 }] },
        rest: { until: { point: 'base' }, leastGain: { intake: 'in', return: 'out' } },
        band: shown.rule.body.band,
      },
    },
  });
  const { items } = (await owner.get('/houses/prop-house/rules')).body as { items: Json[] };
  expect(items).toHaveLength(1);
});

test('in its own house a point stays itself, unless it is mapped', async () => {
  const given = { channel: 'ridge-vent', points: [{ from: 'bench-1', to: 'house-air' }] };
  const told = await owner.ask('POST', `${rule}/copy`, given);
  expect(told).toMatchObject({
    status: 201,
    body: {
      ...{ house: 'long-house', channel: 'ridge-vent', name: shown.rule.name },
      ...{ slug: 'gate-heap-fan-by-the-bench-2' },
      body: { point: 'house-air', rest: { until: { point: 'gate-base' } } },
    },
  });
});

const wrong: [string, Json, string][] = [
  ['another unit', { points: mapped({ 'house-air': 'damp' }) }, 'points.1.to'],
  ['a point that is not there', { points: mapped({ 'gate-core': 'nowhere' }) }, 'points.3.to'],
  ['a point the rule does not name', { points: mapped({ outdoors: 'air' }) }, 'points.6.from'],
  ['a point given twice', { points: [...mapped(), { from: 'bench-1', to: 'air' }] }, 'points.6.from'],
  ['a point left out', { points: mapped().slice(1) }, 'points'],
  ['a channel that is not there', { channel: 'nowhere' }, 'channel'],
  ['a house that is not there', { house: 'nowhere' }, 'house'],
  ["another holding's house", { house: 'beck-house' }, 'house'],
  ['a version that never was', { version: 9 }, 'version'],
  ['a name of blanks', { name: ' ' }, 'name'],
  ['a field that is none', { force: true }, 'force'],
];
test.each(wrong)('%s is refused at its field, and makes no rule', async (_what, change, path) => {
  const before = (await owner.get('/houses/prop-house/rules')).text;
  const told = await toProp(change);
  expect(told.status).toBe(422);
  expect(errorsOf(told)).toMatchObject([{ path }]);
  expect((await owner.get('/houses/prop-house/rules')).text).toBe(before);
});

test('an installer may not copy, and another holding finds no such rule', async () => {
  const given = { house: 'prop-house', channel: 'gate-heap-fan', points: mapped() };
  expect(await installer.ask('POST', `${rule}/copy`, given)).toMatchObject({ status: 403 });
  expect(await stranger.ask('POST', `${rule}/copy`, given)).toMatchObject({ status: 404 });
});

test('an older version can be copied, and later changes of the first rule do not reach the copy', async () => {
  await owner.ask('POST', `${rule}/force`, { why: 'a test', acceptUnproved: true });
  const warmer = [{ from: '00:00', low: 6, high: 9 }];
  await owner.ask('PUT', `${rule}/draft`, { ...shown.rule.body, band: warmer });
  const old = await toProp({ version: 1, name: 'Of old' });
  expect(old.body).toMatchObject({ body: { band: shown.rule.body.band } });
  expect(await toProp({ name: 'Of now' })).toMatchObject({
    body: { body: { band: warmer }, copiedFrom: { version: 2 } },
  });
  await owner.ask('PUT', `${rule}/draft`, shown.rule.body);
  expect((await owner.get('/rules/of-now')).body).toMatchObject({ body: { band: warmer } });
});
