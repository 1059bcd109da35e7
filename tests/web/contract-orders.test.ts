/** Orders, drafts, lists and refusals of the interface, as described, by programs and people from outside. */
import { beforeAll, describe, expect, it } from 'vitest';
import { listOf, OutsideApi, type Body } from '../support/outside-api';
import { joinNode, makeHouse, pack, putIntoForce, type OutsideHouse } from '../support/outside-house';
import type { OutsideNode } from '../support/outside-node';
import { sharedApp } from '../support/shared-app';
import { until } from '../support/until';

const { url, password } = sharedApp();
let api: OutsideApi;
let house: OutsideHouse;
let at: string;
let node: OutsideNode;

const as = (who: string) => OutsideApi.signIn(url, `${who}@larkmoor.example`, password);
const BODY = { purpose: 'warm', point: 'bench-1', band: [{ from: '00:00', low: 4, high: 7.5 }] };

beforeAll(async () => {
  api = await as('owner');
  house = await makeHouse(api, {}, { staleAfter: 600 });
  at = `/houses/${house.slug}`;
  const more = { node: house.nodeKey, label: 'x', minOn: 0, minOff: 0 };
  const mat = { number: 3, relay: 3, key: 'mat', contact: 'NO', load: { kind: 'heater' } };
  await api.make(`${at}/channels`, { ...more, ...mat });
  const dead = { number: 4, relay: 4, key: 'dead', contact: 'NC', load: { kind: 'lamp' } };
  await api.make(`${at}/channels`, { ...more, ...dead });
  node = await joinNode(url, house);
  await node.readings(pack({ 'bench-1': 5, 'house-air': 5, core: 50 }));
});

const channel = async (number: number): Promise<Body> =>
  listOf((await api.get(`${at}/state`)).body, 'channels').find((one) => one['number'] === number) ?? {};
const status = async (method: string, path: string, body?: unknown, headers = {}) =>
  (await api.call(method, path, body, headers)).status;
const paths = async (method: string, path: string, body: unknown) => {
  const answer = await api.call(method, path, body);
  return [
    answer.status,
    ...(answer.status === 422 ? listOf(answer.body, 'errors').map((one) => one['path']) : []),
  ];
};

describe('Orders', () => {
  it('by hand last 1 s to 12 h, an hour for a heater on, and are given back with 204', async () => {
    const hand = (number: number, body: object) => status('POST', `${at}/channels/${number}/hand`, body);
    for (const seconds of [0, 43_201, 1.5]) expect(await hand(1, { state: 'on', seconds })).toBe(422);
    for (const seconds of [1, 43_200]) expect(await hand(1, { state: 'on', seconds })).toBe(200);
    expect(await hand(3, { state: 'on', seconds: 3601 })).toBe(422);
    expect(await hand(3, { state: 'on', seconds: 3600 })).toBe(200);
    expect(await hand(1, { state: 'off', seconds: 3601, holdInFrost: true })).toBe(200);
    await until('it is told', async () => (await channel(1))['mode'] === 'hand');
    for (const number of [1, 3]) expect(await status('DELETE', `${at}/channels/${number}/hand`)).toBe(204);
    await until('auto again', async () => (await channel(1))['mode'] === 'auto');
    const given = await api.make(`${at}/channels/fan-1/hand`, { state: 'on' });
    expect(Date.parse(String(given['until'])) - Date.parse(String(given['at']))).toBe(1_800_000);
    expect(String(given['until'])).toMatch(/(Z|[+-]\d\d:\d\d)$/);
  });

  it('everything off holds all channels for an hour', async () => {
    await node.coil(1, 'on');
    const off = await api.make(`${at}/all-off`, undefined);
    expect(Date.parse(String(off['until'])) - Date.parse(String(off['at']))).toBe(3_600_000);
    await node.coil(1, 'off');
    await node.coil(4, 'on');
    for (const number of [1, 2, 3, 4]) {
      expect(await channel(number)).toMatchObject({ mode: 'hand', because: { holdInFrost: true } });
      await status('DELETE', `${at}/channels/${number}/hand`);
    }
  });

  it('lock-outs act at once and are refused on an NC contact', async () => {
    await status('POST', `${at}/channels/1/hand`, { state: 'on', seconds: 100 });
    await node.coil(1, 'on');
    const lockout = await api.make(`${at}/lockouts`, { channel: 'fan-1', why: 'belt' });
    await node.coil(1, 'off', 1000);
    await until('it is told', async () => (await channel(1))['mode'] === 'locked');
    expect(await channel(1)).toMatchObject({ state: 'off', claim: 'lock-out', lockedOut: true });
    expect(await status('POST', `${at}/lockouts`, { channel: 'dead', why: 'x' })).toBe(409);
    expect(await status('DELETE', `${at}/lockouts/${String(lockout['id'])}`)).toBe(204);
    expect(await status('DELETE', `${at}/channels/1/hand`)).toBe(204);
  });
});

describe('Drafts', () => {
  it('never touch what is in force, and a stop that checking shows keeps them out', async () => {
    const rule = listOf((await api.get(`${at}/rules`)).body)[0];
    const path = `/rules/${String(rule?.['slug'])}`;
    expect(
      await status('PUT', `${path}/draft`, { ...BODY, band: [{ from: '00:00', low: 6, high: 8 }] }),
    ).toBe(200);
    expect((await api.get(path)).body).toMatchObject({
      inForce: { number: 1, body: BODY },
      draft: { number: 2 },
    });
    const never = [
      { fact: 'core', operator: 'greaterThan', value: 50 },
      { fact: 'core', operator: 'lessThan', value: 40 },
    ];
    await api.call('PUT', `${path}/draft`, { ...BODY, only: { all: never } });
    const refused = await api.call('POST', `${path}/force`, { why: 'x', acceptUnproved: true });
    expect([refused.status, refused.body]).toMatchObject([409, { errors: [{ path: 'only' }] }]);
    await api.call('PATCH', `${at}/channels/1`, { minOn: 100 });
    await api.call('PUT', `${path}/draft`, { ...BODY, rest: { longestDraw: 50, least: 50 } });
    expect(await status('POST', `${path}/force`, { why: 'x', acceptUnproved: true })).toBe(409);
    await api.call('PATCH', `${at}/channels/1`, { minOn: 0 });
    expect((await api.get(path)).body).toMatchObject({ inForce: { number: 1 } });
  });

  it('with a band turned over or an unknown name are refused at its dotted path', async () => {
    const rule = `/rules/${String(listOf((await api.get(`${at}/rules`)).body)[0]?.['id'])}/draft`;
    const rest = { longestDraw: 10, least: 10 };
    const until = { point: 'nobody', level: 4 };
    const leaf = { fact: 'nobody', operator: 'equal', value: 3 };
    const cases: [object, string][] = [
      [{ point: 'nobody' }, 'point'],
      [{ standIns: [{ point: 'nobody', offset: 0 }] }, 'standIns.0.point'],
      [{ rest: { ...rest, most: 20, until } }, 'rest.until.point'],
      [{ rest: { ...rest, until: { ...until, point: 'core' } } }, 'rest.most'],
      [{ only: { all: [leaf] } }, 'only.all.0.fact'],
      [{ only: { any: [{ not: { all: [leaf] } }] } }, 'only.any.0.not.all.0.fact'],
      [{ band: [{ from: '00:00', low: 7, high: 4 }] }, 'band.0.high'],
      [{ band: [{ from: '00:00', low: 4, high: 4.49 }] }, 'band.0.high'],
      [{ band: [{ from: '00:00', low: 'four', high: 8 }] }, 'band.0.low'],
      [{ colour: 'red' }, 'colour'],
      [{ rest: { ...rest, mood: 1 } }, 'rest.mood'],
    ];
    for (const [change, wanted] of cases)
      expect(await paths('PUT', rule, { ...BODY, ...change })).toEqual([422, wanted]);
    expect(await status('PUT', rule, { ...BODY, rest: { longestDraw: 1, least: 1 } })).toBe(200);
    expect(await status('PUT', rule, { ...BODY, band: [{ from: '00:00', low: 4.3, high: 4.8 }] })).toBe(200);
  });

  it('of a retired rule run nothing, and a removed channel goes off', async () => {
    const id = await putIntoForce(api, house.slug, 'fan-2', { band: [{ from: '00:00', low: 6, high: 8 }] });
    await node.coil(2, 'on');
    expect(await status('POST', `/rules/${id}/retire`, { why: 'done' })).toBe(200);
    await node.coil(2, 'off');
    await status('POST', `${at}/channels/3/hand`, { state: 'on', seconds: 600 });
    await node.coil(3, 'on');
    expect(await status('DELETE', `${at}/channels/3`)).toBe(204);
    await node.coil(3, 'off');
  });
});

describe('Looks', () => {
  it('go in order: session, holding, role, body', async () => {
    const bad = { nonsense: true };
    const stranger = new OutsideApi(url);
    const other = await OutsideApi.signIn(url, 'owner@stonebeck.example', password);
    const [grower, installer] = [await as('grower'), await as('installer')];
    const asked = async (who: OutsideApi, path: string) => (await who.call('POST', path, bad)).status;
    for (const path of [`${at}/rules`, `${at}/nodes`, `${at}/channels/1/hand`]) {
      expect(await asked(stranger, path)).toBe(401);
      expect(await asked(other, path)).toBe(404);
      expect(await asked(path.endsWith('nodes') ? grower : installer, path)).toBe(403);
      expect(await asked(api, path)).toBe(422);
    }
  });

  it('by a key of a program have its role, until the key is taken back', async () => {
    const { key, id } = await api.make('/api-keys', { name: `program ${process.pid}`, role: 'installer' });
    const program = new OutsideApi(url);
    const asked = async (method: string, path: string, body?: unknown) =>
      (await program.call(method, path, body, { 'x-api-key': String(key), origin: '' })).status;
    expect(await asked('GET', at)).toBe(200);
    expect(await asked('POST', `${at}/channels/1/hand`, { state: 'on' })).toBe(403);
    expect(await asked('PATCH', `${at}/points/core`, { name: 'Core' })).toBe(200);
    expect(await status('DELETE', `/api-keys/${String(id)}`)).toBe(204);
    expect(await asked('GET', at)).toBe(401);
  });

  it('at a stale thing answer 412; a key of idempotency answers once, and 422 with another body', async () => {
    const tag = (await api.get(at)).headers.get('etag') ?? '';
    expect(await status('PATCH', at, { altitude: 311 }, { 'if-match': tag })).toBe(200);
    expect(await status('PATCH', at, { altitude: 312 }, { 'if-match': tag })).toBe(412);
    const once = { 'idempotency-key': `once-${process.pid}-${house.slug}` };
    const body = { key: 'once', name: 'Once', role: 'other', unit: 'V' };
    const [first, second] = [await api.call('POST', `${at}/points`, body, once), await api.call('POST', `${at}/points`, body, once)]; // prettier-ignore
    expect([second.status, second.body]).toEqual([201, first.body]);
    expect(await status('POST', `${at}/points`, { ...body, key: 'twice' }, once)).toBe(422);
  });

  it('through a list go on by its cursor and come to every item once', async () => {
    const all = listOf((await api.get(`${at}/points?limit=500`)).body).map(({ id }) => id);
    const seen: unknown[] = [];
    let more = '';
    do {
      const page = (await api.get(`${at}/points?limit=2${more}`)).body;
      seen.push(...listOf(page).map(({ id }) => id));
      more = typeof page['next'] === 'string' ? `&cursor=${page['next']}` : '';
    } while (more !== '');
    expect(seen).toEqual(all);
    expect(await paths('GET', `${at}/points?limit=501`, undefined)).toEqual([422, 'limit']);
  });

  it('back and ahead in time: why of now has what follows, why of a time to come is refused', async () => {
    const why = await api.get(`${at}/channels/1/why`);
    expect(listOf(why.body, 'ladder')[0]).toEqual({ claim: 'lock-out', speaks: false });
    expect(listOf(why.body, 'ladder').at(-1)).toMatchObject({ claim: why.body['claim'], speaks: true });
    expect(Object.keys(why.body)).toEqual(expect.arrayContaining(['at', 'state', 'claim', 'next']));
    expect(await paths('GET', `${at}/channels/1/why?at=2190-01-01T00:00:00Z`, undefined)).toEqual([
      422,
      'at',
    ]);
  });
});
