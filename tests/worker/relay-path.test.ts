import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools } from '@/db/client';
import {
  force,
  give,
  makeScene,
  pack,
  rows,
  switchings,
  type FanRule,
  type Scene,
} from '../support/field-scene';
import { OutsideNode } from '../support/outside-node';
import { ownWorker, type OwnWorker } from '../support/own-worker';
import { until } from '../support/until';

let worker: OwnWorker;
beforeAll(async () => {
  worker = await ownWorker();
});
afterAll(async () => {
  await worker.stop();
  await closePools();
});

async function begin(rule: FanRule = {}): Promise<{ scene: Scene; node: OutsideNode }> {
  const scene = await makeScene(rule);
  return { scene, node: await OutsideNode.connect(worker.url, scene.token, 'N-1', 4) };
}

/** A command answered after everything that was sent before: nothing more is on its way. */
async function settled(node: OutsideNode): Promise<void> {
  const seq = node.sendRelays();
  await node.next((frame) => frame.type === 'command' && frame['seen'] === seq);
}

describe('From a reading to a relay', () => {
  it('answers a first relays frame with every relay off, before any reading', async () => {
    const { node } = await begin();
    const command = await node.next((frame) => frame.type === 'command');
    expect(command['channels']).toEqual({ '1': 'off', '2': 'off', '3': 'off', '4': 'off' });
    expect(command['lease']).toBe(30);
    node.close();
  });

  it('commands the relay right after the reading that crosses low, and stores the switching once with its ladder', async () => {
    const { scene, node } = await begin();
    await node.readings(pack({ 'bench-1': 5, 'house-air': 5 }));
    await settled(node);
    expect(node.coils['1']).toBe('off');
    await node.readings(pack({ 'bench-1': 3.9 }));
    await node.coil(1, 'on', 1000);
    expect(node.coils['2']).toBe('off');
    const [first, ...more] = await switchings(scene);
    expect(first).toMatchObject({
      from: 'off',
      to: 'on',
      claim: 'band',
      number: String(node.number),
      trip: null,
    });
    expect(more).toEqual([]);
    const [{ ladder } = { ladder: [] }] = await rows<{ ladder: { claim: string; speaks: boolean }[] }>(
      scene,
      sql`select explanation -> 'ladder' as ladder from switching where channel_id = ${scene.fan}`,
    );
    expect(ladder.at(-1)).toMatchObject({ claim: 'band', speaks: true, wants: 'on' });
    node.close();
  });

  it('changes nothing at exactly low, at exactly high, or between them', async () => {
    const { scene, node } = await begin();
    const t = Date.now() / 1000;
    await node.readings(pack({ 'bench-1': 4, 'house-air': 5 }, t - 5));
    await settled(node);
    expect(node.coils['1']).toBe('off');
    await node.readings(pack({ 'bench-1': 3.99 }, t - 4));
    await node.coil(1, 'on');
    await node.readings(pack({ 'bench-1': 7.5 }, t - 3));
    await settled(node);
    expect(node.coils['1']).toBe('on');
    await node.readings(pack({ 'bench-1': 7.51 }, t - 2));
    await node.coil(1, 'off');
    await node.readings(pack({ 'bench-1': 5 }, t - 1));
    await settled(node);
    expect((await switchings(scene)).map((one) => one.to)).toEqual(['on', 'off']);
    node.close();
  });

  it('counts a repeated pack as duplicate, and moves nothing by it', async () => {
    const { scene, node } = await begin();
    const twice = pack({ 'bench-1': 3, 'house-air': 5 });
    expect(await node.readings(twice)).toMatchObject({ stored: 2, duplicate: 0, refused: [] });
    await node.coil(1, 'on');
    const number = node.number;
    expect(await node.readings(twice)).toMatchObject({ stored: 0, duplicate: 2, refused: [] });
    await settled(node);
    expect(node.number).toBe(number);
    expect(await switchings(scene)).toHaveLength(1);
    node.close();
  });

  it('stores an old reading at its own time, and does not move the relay by it', async () => {
    const { scene, node } = await begin();
    const t = Date.now() / 1000;
    await node.readings(pack({ 'bench-1': 5, 'house-air': 5 }, t));
    expect(await node.readings(pack({ 'bench-1': 1 }, t - 60))).toMatchObject({ stored: 1 });
    await settled(node);
    expect(node.coils['1']).toBe('off');
    expect(await switchings(scene)).toEqual([]);
    node.close();
  });

  it('keeps the good records of a pack and refuses unknown names, wrong units and far times one by one', async () => {
    const { node } = await begin();
    const t = Date.now() / 1000;
    const answer = await node.readings([
      { n: 'nobody', u: 'Cel', t, v: 1 },
      { n: 'bench-1', u: 'Cel', t, v: 5 },
      { n: 'house-air', u: '%RH', t, v: 50 },
      { n: 'core', u: 'Far', t, v: 131 },
      { n: 'humidity', u: 'furlong', t, v: 50 },
      { n: 'humidity', u: '%RH', t: t + 200, v: 50 },
    ]);
    expect(answer.stored).toBe(2);
    expect(answer.refused.map((one) => [one.index, one.name])).toEqual([
      [0, 'nobody'],
      [2, 'house-air'],
      [4, 'humidity'],
      [5, 'humidity'],
    ]);
    for (const { why } of answer.refused) expect(why).not.toBe('');
    node.close();
  });

  it('gives a load its safe state when its point falls silent', async () => {
    const { node } = await begin();
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    await node.coil(1, 'off', 9000);
    node.close();
  });

  it('obeys a hand that beats the band, and goes back to the band when the hand ends by itself', async () => {
    const { scene, node } = await begin();
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    await give(scene, { kind: 'hand', channel: scene.fan, state: 'off', seconds: 2, holdInFrost: false });
    await node.coil(1, 'off', 1500);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on', 4000);
    expect((await switchings(scene)).map((one) => one.claim)).toEqual(['band', 'hand', 'band']);
    node.close();
  });

  it('ends a hand off when frost begins', async () => {
    const { scene, node } = await begin();
    await node.readings(pack({ 'bench-1': 5, 'house-air': 5 }));
    await give(scene, { kind: 'hand', channel: scene.fan, state: 'off', seconds: 600, holdInFrost: false });
    await until('the command is taken', async () => (await taken(scene)) === 1);
    await node.readings(pack({ 'bench-1': 0.5 }));
    await node.coil(1, 'on');
    expect((await switchings(scene)).at(-1)?.claim).toBe('frost');
    node.close();
  });

  it('follows a rule put into force without a reading in between', async () => {
    const { scene, node } = await begin();
    await node.readings(pack({ 'bench-1': 5, 'house-air': 5 }));
    await force(scene, { band: [{ from: '00:00', low: 6, high: 8 }] });
    await node.coil(1, 'on', 2000);
    node.close();
  });

  it('rests after the longest draw, even if it is colder by then', async () => {
    const { scene, node } = await begin({ rest: { longestDraw: 4, least: 6 } });
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    await node.coil(1, 'off', 6000);
    expect((await switchings(scene)).at(-1)?.claim).toBe('rest');
    await node.readings(pack({ 'bench-1': 2, 'house-air': 5 }));
    await settled(node);
    expect(node.coils['1']).toBe('off');
    expect(await switchings(scene)).toHaveLength(2);
    node.close();
  });
});

async function taken(scene: Scene): Promise<number> {
  const [row] = await rows<{ taken: string }>(
    scene,
    sql`select taken from control_memory where house_id = ${scene.houseId}`,
  );
  return Number(row?.taken ?? 0);
}
