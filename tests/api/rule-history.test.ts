// Retired and brought back: who, when, why, and never into force by itself.
import { beforeAll, expect, test } from 'vitest';
import { type Asker, errorsOf, type Json, newHolding, personOf } from './asker';
import { makeLongHouse } from './long-house';
import * as shown from './shown';

let owner: Asker;
let grower: Asker;
let installer: Asker;
let stranger: Asker;
let made = 0;
beforeAll(async () => {
  const larkmoor = await newHolding('larkmoor');
  owner = await personOf(larkmoor, 'owner', 'owner@larkmoor.example');
  grower = await personOf(larkmoor, 'grower', 'grower@larkmoor.example');
  installer = await personOf(larkmoor, 'installer', 'installer@larkmoor.example');
  stranger = await personOf(await newHolding('stonebeck'), 'owner', 'owner@stonebeck.example');
  await makeLongHouse(owner);
  await owner.make('/houses/long-house/channels', shown.fan);
});

async function freshRule(): Promise<string> {
  made += 1;
  const rule = await owner.make('/houses/long-house/rules', { ...shown.rule, name: `Rule ${made}` });
  return `/rules/${String(rule['slug'])}`;
}
const force = (rule: string) => owner.ask('POST', `${rule}/force`, { why: 'a test', acceptUnproved: true });
const band = (low: number, high: number) => ({
  ...shown.rule.body,
  band: [{ from: '00:00', low, high }],
});

test('a retired rule says who retired it, when, and why', async () => {
  const rule = await freshRule();
  await force(rule);
  const told = await grower.ask('POST', `${rule}/retire`, { why: 'The heap was turned into beds.' });
  const retired = { by: 'grower@larkmoor.example', why: 'The heap was turned into beds.' };
  expect(told).toMatchObject({ status: 200, body: { retired, inForce: null } });
  expect(told.body['retiredAt']).toBe((told.body['retired'] as Json)['at']);
  expect(await grower.ask('POST', `${rule}/retire`, { why: 'again' })).toMatchObject({ status: 409 });
  expect(await freshRule().then((other) => owner.ask('POST', `${other}/retire`, {}))).toMatchObject({
    status: 422,
  });
});

test('it comes back as a draft of what was last in force; nothing is in force by that', async () => {
  const rule = await freshRule();
  await force(rule);
  await owner.ask('PUT', `${rule}/draft`, band(1, 2));
  await owner.ask('POST', `${rule}/retire`, { why: 'spring' });
  const told = await grower.ask('POST', `${rule}/restore`, {});
  expect(told).toMatchObject({
    status: 200,
    body: {
      ...{ retired: null, retiredAt: null, inForce: null },
      draft: { number: 3, by: 'grower@larkmoor.example', body: { band: shown.rule.body.band } },
    },
  });
  const versions = told.body['versions'] as Json[];
  expect(versions.map((one) => [one['number'], one['status'], one['endedWhy']])).toEqual([
    [3, 'draft', null],
    [2, 'retired', 'spring'],
    [1, 'retired', 'spring'],
  ]);
  expect(await force(rule)).toMatchObject({ status: 200, body: { number: 3 } });
});

test('a version that only gave way to the next is ended without a why of its own', async () => {
  const rule = await freshRule();
  await force(rule);
  await owner.ask('PUT', `${rule}/draft`, band(5, 8));
  await force(rule);
  const versions = (await owner.get(rule)).body['versions'] as Json[];
  expect(versions[1]).toMatchObject({ number: 1, endedBy: 'owner@larkmoor.example', endedWhy: null });
});

test('a version can be named that is to come back', async () => {
  const rule = await freshRule();
  await force(rule);
  await owner.ask('PUT', `${rule}/draft`, band(5, 8));
  await force(rule);
  await owner.ask('POST', `${rule}/retire`, { why: 'spring' });
  const none = await owner.ask('POST', `${rule}/restore`, { version: 9 });
  expect(none.status).toBe(422);
  expect(errorsOf(none)).toMatchObject([{ path: 'version' }]);
  expect(await owner.ask('POST', `${rule}/restore`, { version: 1 })).toMatchObject({
    body: { draft: { number: 3, body: { band: shown.rule.body.band } } },
  });
});

test('what is not retired is not restored, nor by an installer, nor found by another holding', async () => {
  const rule = await freshRule();
  expect(await owner.ask('POST', `${rule}/restore`, {})).toMatchObject({ status: 409 });
  await owner.ask('POST', `${rule}/retire`, { why: 'spring' });
  expect(await installer.ask('POST', `${rule}/restore`, {})).toMatchObject({ status: 403 });
  expect(await stranger.ask('POST', `${rule}/restore`, {})).toMatchObject({ status: 404 });
});

test('a rule whose channel is gone stays retired, and says to copy it', async () => {
  const vent = { ...shown.vent, key: 'side-vent', number: 7, relay: 7 };
  await owner.make('/houses/long-house/channels', vent);
  const given = { ...shown.rule, name: 'Side vent', channel: 'side-vent' };
  await owner.make('/houses/long-house/rules', given);
  await owner.ask('POST', '/rules/side-vent/retire', { why: 'the vent is gone' });
  await owner.ask('DELETE', '/houses/long-house/channels/7');
  const told = await owner.ask('POST', '/rules/side-vent/restore', {});
  expect(told.status).toBe(409);
  expect(told.body['detail']).toContain('Copy the rule to another channel');
});

test('conditions beyond a hundred, or twelve groups deep, are refused at their path', async () => {
  const rule = await freshRule();
  const leaf = { fact: 'gate-core', operator: 'greaterThan', value: 38 };
  const draft = (only: object) => owner.ask('PUT', `${rule}/draft`, { ...shown.rule.body, only });
  const groups = (many: number): object => (many === 1 ? { all: [leaf] } : { any: [groups(many - 1), leaf] });
  expect(await draft(groups(12))).toMatchObject({ status: 200 });
  for (const only of [
    groups(13),
    { all: [...Array(3)].map(() => ({ any: [...Array(34)].map(() => leaf) })) },
  ]) {
    const told = await draft(only);
    expect(told.status).toBe(422);
    expect(errorsOf(told)).toMatchObject([{ path: 'only', message: expect.stringMatching(/at most/) }]);
  }
  expect(
    await draft({ all: [...Array(2)].map(() => ({ any: [...Array(50)].map(() => leaf) })) }),
  ).toMatchObject({
    status: 200,
  });
});

test('a thermostat of last resort that somebody saw work answers what the check asks for', async () => {
  const rule = await freshRule();
  const fan = '/houses/long-house/channels/1';
  await owner.ask('PATCH', fan, { fallback: null });
  const kinds = async () => {
    const { findings } = (await owner.ask('POST', `${rule}/check`, {})).body as { findings: Json[] };
    return findings.map((one) => one['kind']);
  };
  const house = (lastResort: object | null) => owner.ask('PATCH', '/houses/long-house', { lastResort });
  expect(await kinds()).toContain('no-last-resort');
  expect(await house({ below: 1 })).toMatchObject({ body: { lastResort: { below: 1, provedOn: null } } });
  expect(await kinds()).toContain('no-last-resort');
  await house({ below: 1, provedOn: '2026-10-01' });
  expect(await kinds()).not.toContain('no-last-resort');
  await house({ below: 5, provedOn: '2026-10-01' });
  expect(await kinds()).toContain('last-resort-over-band');
  const wrong = await house({ below: 1, provedOn: 'last autumn' });
  expect(errorsOf(wrong)).toMatchObject([{ path: 'lastResort.provedOn' }]);
  const unseen = await house({ below: 1, provedOn: '2199-01-01' });
  expect(unseen.status).toBe(422);
  expect(errorsOf(unseen)).toMatchObject([{ path: 'lastResort.provedOn' }]);
});

test('a derived point is not amended into a ring', async () => {
  const at = '/houses/long-house/points';
  const mean = (key: string, points: string[]) => ({
    ...{ key, name: key, role: 'other', unit: 'Cel' },
    derived: { of: 'mean', points },
  });
  await owner.make(at, mean('one', ['house-air']));
  await owner.make(at, mean('two', ['one']));
  const told = await owner.ask('PATCH', `${at}/one`, { derived: { of: 'mean', points: ['two'] } });
  expect(told.status).toBe(422);
  expect(errorsOf(told)).toMatchObject([{ path: 'derived.points' }]);
});
