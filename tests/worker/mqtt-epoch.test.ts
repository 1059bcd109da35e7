// The rule of epochs by way of a broker: numbers begin above what a node has seen, and nobody is followed who led before.
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools, everyHolding } from '@/db/client';
import { TestBroker } from '../support/broker';
import { mqttScene, wayTo, type BusScene } from '../support/bus-scene';
import { pack, rows, switchings } from '../support/field-scene';
import { OutsideMqttNode } from '../support/outside-mqtt-node';
import { ownWorker, type OwnWorker } from '../support/own-worker';
import { until } from '../support/until';

const EPOCH = 2 ** 32;
const epochOf = (number: number) => Math.floor(number / EPOCH);

let broker: TestBroker;
let worker: OwnWorker;
beforeAll(async () => {
  broker = await TestBroker.start();
  worker = await ownWorker(true, undefined, 1, 2);
}, 60_000);
afterAll(async () => {
  await worker.stop();
  await broker.end();
  await closePools();
});

const ledIn = async () => (await worker.health()).epoch ?? 0;
const tooFar = (scene: BusScene) =>
  rows(scene, sql`select 1 from alarm where kind = 'epoch-too-far' and house_id = ${scene.houseId}`);

describe('By way of a broker, numbers of commands', () => {
  it('are of the epoch that the welcome tells', async () => {
    const scene = await mqttScene(broker);
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    const epoch = await ledIn();
    expect(node.frames.find(({ type }) => type === 'welcome')).toMatchObject({ epoch });
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    expect(epochOf(node.number)).toBe(epoch);
    await node.end();
  });

  it('begin above those that a node has seen of a later epoch, and the next welcome tells the new one', async () => {
    const scene = await mqttScene(broker);
    const before = await ledIn();
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    node.number = (before + 5) * EPOCH + 9;
    node.sendRelays();
    await until('a higher number', () => node.number > (before + 6) * EPOCH);
    expect(await ledIn()).toBe(before + 6);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    expect((await switchings(scene)).map(({ number }) => number)).toEqual([String(node.number)]);
    node.hello();
    await node.next((frame) => frame.type === 'welcome' && frame['epoch'] === before + 6);
    await node.end();
  });

  it('are not lifted above an epoch that nobody can have led in; an alarm tells of it', async () => {
    const scene = await mqttScene(broker);
    const before = await ledIn();
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    const seen = (before + 1001) * EPOCH;
    node.number = seen;
    node.sendRelays();
    await until('the alarm stands', async () => (await tooFar(scene)).length === 1);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    expect(await ledIn()).toBe(before);
    expect([node.number, node.coils['1']]).toEqual([seen, 'off']);
    await node.end();
  });

  it('are lifted above one that is a thousand further, the most that is believed', async () => {
    const scene = await mqttScene(broker);
    const before = await ledIn();
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    node.number = (before + 1000) * EPOCH;
    node.sendRelays();
    await until('a higher number', () => node.number > (before + 1001) * EPOCH);
    expect(await tooFar(scene)).toEqual([]);
    await node.end();
  });
});

describe('By way of a broker, after a backup was restored', () => {
  it('a node that has seen later epochs is driven again without being started anew', async () => {
    const scene = await mqttScene(broker);
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    const seen = epochOf(node.number);
    await worker.stop();
    await everyHolding().execute(sql`update leader set epoch = ${seen - 3}`);
    worker = await ownWorker(true, undefined, 1, 2);
    await until('a command above those before', () => epochOf(node.number) > seen, 20_000);
    expect(await ledIn()).toBe(seen + 1);
    await node.readings(pack({ 'bench-1': 9 }));
    await node.coil(1, 'off');
    await node.end();
  }, 60_000);
});
