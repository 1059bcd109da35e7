import { WebSocket } from 'ws';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools } from '@/db/client';
import { renewTokens } from '@/db/seed/write-house';
import { rawText } from '@/worker/raw-text';
import { makeScene, pack, rows, type Scene } from '../support/field-scene';
import { OutsideNode } from '../support/outside-node';
import { ownWorker, type OwnWorker } from '../support/own-worker';
import { until } from '../support/until';
import { sql } from 'drizzle-orm';

let worker: OwnWorker;
beforeAll(async () => {
  worker = await ownWorker();
});
afterAll(async () => {
  await worker.stop();
  await closePools();
});

const join = (scene: Scene) => OutsideNode.connect(worker.url, scene.token, 'N-1', 4);

async function post(token: string | null, body: string, type = 'application/senml+json') {
  const headers = { 'content-type': type, ...(token === null ? {} : { authorization: `Bearer ${token}` }) };
  const response = await fetch(`${worker.url}/field/v1/readings`, { method: 'POST', headers, body });
  return { status: response.status, type: response.headers.get('content-type'), body: await response.json() };
}

describe('The door of the field', () => {
  it('opens to a right token only', async () => {
    const scene = await makeScene();
    await expect(OutsideNode.connect(worker.url, 'wrong', 'N-1')).rejects.toThrow('401');
    await expect(OutsideNode.connect(worker.url, `${scene.token}x`, 'N-1')).rejects.toThrow('401');
    (await join(scene)).close();
  });

  it('keeps no token, only its hash', async () => {
    const scene = await makeScene();
    const found = await rows(scene, sql`select 1 from node where token_hash like ${`%${scene.token}%`}`);
    expect(found).toEqual([]);
  });

  it('closes the line of a token that was replaced, and lets it in no more', async () => {
    const scene = await makeScene();
    const node = await join(scene);
    await renewTokens([scene.holding.id]);
    await scene.holding.db.execute(
      sql`update house set plan_revision = plan_revision + 1 where id = ${scene.houseId}`,
    );
    await scene.holding.db.execute(sql`select pg_notify('plan', ${scene.houseId})`);
    await until('the old line is closed', () => node.closed !== undefined);
    expect(node.closed?.code).toBe(1008);
    await expect(join(scene)).rejects.toThrow('401');
  });

  it('closes the first connection with 4001 when a second one with its token takes over', async () => {
    const scene = await makeScene();
    const first = await join(scene);
    const second = await join(scene);
    await until('the first is closed', () => first.closed !== undefined);
    expect(first.closed?.code).toBe(4001);
    await second.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await second.coil(1, 'on');
    second.close();
  });

  it('raises an alarm at the third take-over within ten minutes', async () => {
    const scene = await makeScene();
    const alarms = () =>
      rows(scene, sql`select 1 from alarm where kind = 'cloned-token' and house_id = ${scene.houseId}`);
    const nodes = [await join(scene), await join(scene), await join(scene)];
    expect(await alarms()).toEqual([]);
    nodes.push(await join(scene));
    await until('the alarm stands', async () => (await alarms()).length === 1);
    for (const node of nodes) node.close();
  });
});

describe('A malformed frame', () => {
  it('is answered with its reason and its seq, and the line stays open', async () => {
    const node = await join(await makeScene());
    node.sendText('{"type":"readings","seq":77}');
    expect(await node.next((frame) => frame.type === 'error' && frame['seq'] === 77)).toHaveProperty('why');
    expect(await node.readings(pack({ 'bench-1': 5 }))).toMatchObject({ stored: 1 });
    node.close();
  });

  it('closes the socket with 1008 at the tenth in a minute', async () => {
    const node = await join(await makeScene());
    for (let count = 0; count < 9; count += 1) node.sendText('nonsense');
    await until('nine errors', () => node.frames.filter(({ frame }) => frame.type === 'error').length === 9);
    expect(node.closed).toBeUndefined();
    node.sendText('nonsense');
    await until('the line is closed', () => node.closed !== undefined);
    expect(node.closed?.code).toBe(1008);
  });

  it('over 64 KiB closes the socket with 1009', async () => {
    const node = await join(await makeScene());
    node.sendText(JSON.stringify({ type: 'log', seq: 5, level: 'info', text: 'x'.repeat(64 * 1024) }));
    await until('the line is closed', () => node.closed !== undefined);
    expect(node.closed?.code).toBe(1009);
  });

  it('is a hello that does not come first', async () => {
    const scene = await makeScene();
    const socket = new WebSocket(`${worker.url.replace('http', 'ws')}/field/v1`, {
      headers: { authorization: `Bearer ${scene.token}` },
    });
    const said: string[] = [];
    socket.on('message', (data) => said.push(rawText(data)));
    await new Promise((resolve) => socket.once('open', resolve));
    socket.send(JSON.stringify({ type: 'log', seq: 1, level: 'info', text: 'early' }));
    await until('an answer', () => said.length > 0);
    expect(JSON.parse(said[0] ?? '')).toMatchObject({ type: 'error', seq: 1 });
    socket.terminate();
  });
});

describe('Numbers of commands', () => {
  it('grow with each change, and stay with each renewal', async () => {
    const scene = await makeScene();
    const node = await join(scene);
    const first = node.number;
    const seq = node.sendRelays();
    expect(await node.next((frame) => frame.type === 'command' && frame['seen'] === seq)).toMatchObject({
      number: first,
    });
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    expect(node.number).toBeGreaterThan(first);
    expect(Math.floor(node.number / 2 ** 32)).toBe((await worker.health()).epoch);
    node.close();
  });

  it('begin above those that a node has seen of a later epoch', async () => {
    const scene = await makeScene();
    const before = (await worker.health()).epoch ?? 0;
    const node = await join(scene);
    node.number = (before + 5) * 2 ** 32 + 9;
    node.sendRelays();
    await until('a higher number', () => node.number > (before + 6) * 2 ** 32);
    expect((await worker.health()).epoch).toBe(before + 6);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    node.close();
  });

  it('are not lifted above an epoch that nobody can have led in; an alarm tells of it', async () => {
    const scene = await makeScene();
    const before = (await worker.health()).epoch ?? 0;
    const node = await join(scene);
    node.number = (before + 1001) * 2 ** 32;
    node.sendRelays();
    const alarms = () =>
      rows(scene, sql`select 1 from alarm where kind = 'epoch-too-far' and house_id = ${scene.houseId}`);
    await until('the alarm stands', async () => (await alarms()).length === 1);
    expect((await worker.health()).epoch).toBe(before);
    node.close();
  });

  it('are new after a lease trip, which is a switching of its own, stored once', async () => {
    const scene = await makeScene();
    const node = await join(scene);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    const before = node.number;
    node.trips = 1;
    node.coils = { '1': 'off', '2': 'off', '3': 'off', '4': 'off' };
    node.sendRelays();
    node.sendRelays();
    await node.coil(1, 'on');
    expect(node.number).toBeGreaterThan(before);
    const told = await rows(
      scene,
      sql`select "from", "to", claim, number from switching where channel_id = ${scene.fan} order by at, id`,
    );
    expect(told).toMatchObject([
      { from: 'off', to: 'on', claim: 'band' },
      { from: 'on', to: 'off', claim: 'fail-safe', number: null },
      { from: 'off', to: 'on', claim: 'band', number: String(node.number) },
    ]);
    node.close();
  });
});

describe('Readings by HTTP', () => {
  it('are stored and counted, with the refused ones named', async () => {
    const { token } = await makeScene();
    const body = JSON.stringify([...pack({ 'bench-1': 5, nobody: 1 })]);
    expect(await post(token, body)).toMatchObject({
      status: 200,
      body: { stored: 1, duplicate: 0, refused: [{ index: 1, name: 'nobody' }] },
    });
    expect((await post(token, body)).body).toMatchObject({ stored: 0, duplicate: 1 });
  });

  it.each([
    ['without a token', null, '[]', 'application/senml+json', 401],
    ['as another type', 'own', '[]', 'text/plain', 415],
    ['that are no list', 'own', '{}', 'application/senml+json', 400],
    ['that are no JSON', 'own', '[', 'application/senml+json', 400],
    ['over 64 KiB', 'own', `[${'0,'.repeat(40_000)}0]`, 'application/senml+json', 413],
  ])('%s are a problem by RFC 9457', async (_name, token, body, type, status) => {
    const scene = await makeScene();
    const answer = await post(token === null ? null : scene.token, body, type);
    expect(answer).toMatchObject({ status, type: 'application/problem+json', body: { status } });
  });
});
