/** Every body that the interface's description shows, sent as it stands there and got back unchanged. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApp, type RunningApp } from '../support/app';
import { listOf, OutsideApi, type Body } from '../support/outside-api';

const HOUSE = {
  ...{ name: 'Long house', zone: 'Europe/London', latitude: 54.2, longitude: -2.3, altitude: 310 },
  ...{ frostLimit: 3.0, frostAlarm: 2.0 },
};
const NODE = { key: 'LH-1', kind: 'socket', reportEvery: 30, channels: 8 };
const POINT = {
  ...{ key: 'bench-1', node: 'LH-1', name: 'Bench probe 1', role: 'bench', unit: 'Cel', min: -40, max: 85 },
  ...{ staleAfter: 90, maxRate: 0.5, frozenAfter: 14400, offset: 0, gain: 1, sensor: 'one-wire' },
};
const LIFT = {
  ...{ key: 'lift', name: 'Lift over outdoors', role: 'other', unit: 'K' },
  derived: { of: 'difference', points: ['house-air', 'outdoors'] },
};
const SOURCE = {
  ...{ name: 'Gate heap', kind: 'heap', corePoint: 'gate-core', basePoint: 'gate-base', coreFloor: 38 },
  ...{ dailyLimit: 28800, ready: { level: 50, for: 259200 } },
};
const CHANNEL = {
  ...{ number: 1, node: 'LH-1', relay: 1, key: 'gate-heap-fan', label: 'Gate-heap fan', frostHelp: true },
  ...{ contact: 'NO', load: { kind: 'motor', watts: 12, volts: 24, supply: 'dc', contactAmps: 5 } },
  ...{ minOn: 120, minOff: 120, startsPerHour: 6, longestOn: null, highLimit: null },
  runProof: { point: 'fan-amps', above: 0.2 },
  fallback: { point: 'bench-1', below: 2, above: 5, onFor: 1200, offFor: 2400 },
  flow: { litresPerSecond: 42.5, from: 'measured', sd: 4 },
};
const RULE_BODY = {
  ...{ purpose: 'warm', point: 'bench-1', standIns: [{ point: 'house-air', offset: -0.5 }] },
  band: [{ from: '00:00', low: 4.0, high: 7.5 }],
  rest: {
    ...{ longestDraw: 2400, least: 1800, most: 5400, until: { point: 'gate-base', level: 43 } },
    leastGain: { kelvin: 3, after: 900, intake: 'loop-intake', return: 'loop-return' },
    frostMayBreak: true,
  },
  only: { all: [{ fact: 'gate-core', operator: 'greaterThanInclusive', value: 38 }] },
  season: { from: '10-01', to: '04-30' },
  hours: { from: 'sunset-01:00', to: 'sunrise+01:00' },
};
const MORE_POINTS: [string, string, string][] = [
  ['house-air', 'house-air', 'Cel'],
  ['outdoors', 'outdoors', 'Cel'],
  ['gate-core', 'heap-core', 'Cel'],
  ['gate-base', 'heap-base', 'Cel'],
  ['loop-intake', 'loop-intake', 'Cel'],
  ['loop-return', 'loop-return', 'Cel'],
  ['fan-amps', 'current', 'A'],
];

// a program of its own: a second house of the shown name would stand in the way of other files' looks for it
let app: RunningApp;
let api: OutsideApi;
let at: string;
let slug: string;
const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/;

beforeAll(async () => {
  app = await startApp({ yard: false, seed: { nights: 0 } });
  api = await OutsideApi.signIn(app.url, 'owner@stonebeck.example', app.password);
}, 120_000);
afterAll(() => app.stop());

/** Sends a body; it comes back whole, with 201, an id and an ETag, and can be got again under each of its names. */
async function kept(path: string, body: Body, name: string): Promise<Body> {
  const answer = await api.call('POST', path, body);
  expect([answer.status, answer.body], JSON.stringify(answer.body)).toMatchObject([201, body]);
  expect(answer.body['id']).toMatch(UUID);
  expect(answer.headers.get('etag')).toMatch(/^(W\/)?"[^"]+"$/);
  for (const reference of [answer.body['id'], answer.body[name]]) {
    const again = await api.get(`${path}/${String(reference)}`);
    expect([again.status, again.body]).toMatchObject([200, body]);
    expect(again.headers.get('etag')).toBe(answer.headers.get('etag'));
  }
  return answer.body;
}

describe('Bodies as described', () => {
  it('keeps a house, whose slug comes from its name', async () => {
    const house = await kept('/houses', HOUSE, 'slug');
    slug = String(house['slug']);
    expect(slug).toMatch(/^long-house(-\d+)?$/);
    at = `/houses/${slug}`;
  });

  it('keeps a node and shows its token once', async () => {
    const node = await kept(`${at}/nodes`, NODE, 'key');
    expect(String(node['token']).length).toBeGreaterThan(20);
    expect((await api.get(`${at}/nodes/LH-1`)).body).not.toHaveProperty('token');
  });

  it('keeps points, measured and derived', async () => {
    await kept(`${at}/points`, POINT, 'key');
    for (const [key, role, unit] of MORE_POINTS)
      await kept(`${at}/points`, { key, node: 'LH-1', name: key, role, unit }, 'key');
    await kept(`${at}/points`, LIFT, 'key');
  });

  it('keeps a source, a channel and a loop', async () => {
    const source = String((await kept(`${at}/sources`, SOURCE, 'slug'))['slug']);
    expect(source).toMatch(/^gate-heap(-\d+)?$/);
    await kept(`${at}/channels`, { ...CHANNEL, source }, 'number');
    expect((await api.get(`${at}/channels/gate-heap-fan`)).body).toMatchObject({ ...CHANNEL, source });
    const loop = { name: 'Gate loop', source, channel: 'gate-heap-fan' };
    await kept(`${at}/loops`, { ...loop, intake: 'loop-intake', return: 'loop-return' }, 'slug');
  });

  it('keeps an interlock', async () => {
    const vent = { number: 2, node: 'LH-1', relay: 2, key: 'ridge-vent', label: 'Ridge vent', contact: 'NO' };
    await kept(`${at}/channels`, { ...vent, load: { kind: 'vent' }, minOn: 0, minOff: 0 }, 'key');
    const interlock = { channel: 'ridge-vent', kind: 'never-with', other: 'gate-heap-fan' };
    await kept(`${at}/interlocks`, { ...interlock, delay: 5, frostMayBreak: false }, 'id');
  });

  it('keeps a rule with its draft, and a draft put by itself', async () => {
    const body = { name: 'Gate-heap fan by the bench', channel: 'gate-heap-fan', body: RULE_BODY };
    const made = await api.call('POST', `${at}/rules`, body);
    expect([made.status, made.body]).toMatchObject([201, body]);
    const rule = `/rules/${String(made.body['id'])}`;
    expect((await api.get(rule)).body).toMatchObject({ ...body, draft: { body: RULE_BODY }, inForce: null });
    const put = await api.call('PUT', `${rule}/draft`, { ...RULE_BODY, purpose: 'cool' });
    expect(put.status).toBe(200);
    expect((await api.get(rule)).body).toMatchObject({ draft: { body: { purpose: 'cool' } } });
    await api.call('PUT', `${rule}/draft`, RULE_BODY);
    const check = await api.call('POST', `${rule}/check`, {});
    expect(check.status).toBe(200);
    for (const finding of listOf(check.body, 'findings')) {
      expect(finding).toMatchObject({
        level: expect.stringMatching(/^(stop|look)$/) as string,
        kind: expect.any(String) as string,
        text: expect.any(String) as string,
        paths: expect.any(Array) as unknown[],
      });
    }
    expect((await api.call('POST', `${rule}/force`, { why: 'as described' })).status).toBe(409);
    const forced = await api.call('POST', `${rule}/force`, { why: 'as described', acceptUnproved: true });
    expect([forced.status, forced.body]).toMatchObject([200, { number: 1, body: RULE_BODY }]);
    expect((await api.call('POST', `${rule}/force`, { why: 'no draft' })).status).toBe(409);
  });

  it('takes a house with nothing but what is required', async () => {
    const bare = await api.call('POST', '/houses', { name: 'Bare', zone: 'UTC', latitude: 0, longitude: 0 });
    expect(bare.status).toBe(201);
    const path = `/houses/${String(bare.body['slug'])}`;
    await api.make(`${path}/nodes`, { key: 'N', kind: 'http' });
    await api.make(`${path}/points`, { key: 'p', name: 'P', role: 'bench', unit: 'Cel' });
    await api.make(`${path}/sources`, { name: 'S', kind: 'other' });
    const channel = { number: 7, node: 'N', relay: 1, key: 'c', label: 'C', contact: 'NC' };
    await api.make(`${path}/channels`, { ...channel, load: { kind: 'lamp' }, minOn: 0, minOff: 0 });
    const body = { purpose: 'cool', point: 'p', band: [{ from: 'sunrise+00:30', low: 1, high: 1.5 }] };
    await api.make(`${path}/rules`, { name: 'R', channel: 'c', body });
  });

  it('gives a second thing of one name the slug with -2, and so on', async () => {
    const name = `Twin ${process.pid}`;
    const slugs: unknown[] = [];
    for (let n = 0; n < 3; n++) slugs.push((await api.make('/houses', { ...HOUSE, name }))['slug']);
    const base = `twin-${process.pid}`;
    expect(slugs).toEqual([base, `${base}-2`, `${base}-3`]);
    const heaps: unknown[] = [];
    for (const house of [base, `${base}-2`])
      heaps.push((await api.make(`/houses/${house}/sources`, { name, kind: 'heap' }))['slug']);
    expect(new Set(heaps).size).toBe(2);
  });
});
