/** What a dead worker or a dead web server does to a running draw, seen by a node from outside. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startApp, type RunningApp } from '../support/app';
import { listOf, OutsideApi, type Body } from '../support/outside-api';
import { joinNode, makeHouse, pack, type OutsideHouse } from '../support/outside-house';
import { until } from '../support/until';

let app: RunningApp;
let api: OutsideApi;

// Ten times as fast: a lease of 30 s lasts 3 s.
const RATE = 10;
/** Readings stay in use through a restart. */
const STEADY = { staleAfter: 3600 };

beforeAll(async () => {
  app = await startApp({ yard: false, rate: RATE, seed: { nights: 0 } });
  api = await OutsideApi.signIn(app.url, 'owner@larkmoor.example', app.password);
}, 120_000);
afterAll(() => app.stop());

/** App time, s, as the program tells it. */
const appNowS = async () => Date.parse(String((await api.get('/health')).body['now'])) / 1000;

const sourceState = async (house: OutsideHouse): Promise<Body> => {
  const [source] = listOf((await api.get(`/houses/${house.slug}/state`)).body, 'sources');
  if (source === undefined) throw new Error('the house has no source in its state');
  return source;
};

const killed = async (part: 'worker' | 'web') => {
  const pid = app.pid(part);
  if (pid === null) throw new Error(`${part} does not run`);
  process.kill(pid, 'SIGKILL');
  await until(`${part} is dead`, () => app.pid(part) !== pid);
};

describe('A worker killed in mid-draw', () => {
  it('leaves the coil to its lease, and comes back to rest, credit and latch as they stood', async () => {
    const house = await makeHouse(api, { rest: { longestDraw: 600, least: 900 } }, STEADY);
    const node = await joinNode(app.url, house);
    // 5 °C lies inside the band: only a latch that was kept runs the fan there
    await node.readings(pack({ 'bench-1': 3, 'house-air': 6 }, await appNowS()));
    await node.coil(1, 'on');
    await node.readings(pack({ 'bench-1': 5, 'house-air': 6 }, await appNowS()));
    await until('some credit is spent', async () => Number((await sourceState(house))['credit']) < 0.9);
    const before = Number((await sourceState(house))['credit']);
    await killed('worker');
    await until('the line is cut', () => node.closed !== undefined);
    await node.coil(1, 'off', 6000);
    node.terminate();

    const again = await joinNode(app.url, house);
    await again.readings(pack({ 'bench-1': 5, 'house-air': 6 }, await appNowS()));
    await again.coil(1, 'on');
    const after = Number((await sourceState(house))['credit']);
    // a gap counts as drawn until the lease's latest end, and as undrawn from then: never more than was there
    expect(after).toBeLessThan(before + 0.12);
    expect(after).toBeGreaterThan(0);
    expect(again.number).toBeGreaterThan(node.number);
    again.close();
  }, 60_000);

  it('does not cut a rest short', async () => {
    const house = await makeHouse(api, { rest: { longestDraw: 20, least: 400 } }, STEADY);
    const node = await joinNode(app.url, house);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 6 }, await appNowS()));
    await node.coil(1, 'on');
    await node.coil(1, 'off', 6000);
    const restUntil = String((await sourceState(house))['restUntil']);
    await killed('worker');
    await until('the line is cut', () => node.closed !== undefined);
    node.terminate();
    const again = await joinNode(app.url, house);
    await again.readings(pack({ 'bench-1': 3, 'house-air': 6 }, await appNowS()));
    const source = await sourceState(house);
    expect(Math.abs(Date.parse(String(source['restUntil'])) - Date.parse(restUntil))).toBeLessThanOrEqual(
      1000,
    );
    expect(again.coils['1']).toBe('off');
    again.close();
  }, 60_000);
});

describe('A web server killed', () => {
  it('is noticed by no node', async () => {
    const house = await makeHouse(api, {}, STEADY);
    const node = await joinNode(app.url, house);
    await node.readings(pack({ 'bench-1': 6, 'house-air': 6 }, await appNowS()));
    const t = await appNowS();
    await killed('web');
    const ack = await node.readings(pack({ 'bench-1': 3, 'house-air': 6 }, t + 1));
    expect(ack.stored).toBe(2);
    expect(await node.coil(1, 'on')).toBeLessThan(1000);
    expect(node.closed).toBeUndefined();
    await until(
      'the pages are back',
      async () => (await api.get('/health').catch(() => null))?.status === 200,
      30_000,
    );
    node.close();
  }, 60_000);
});
