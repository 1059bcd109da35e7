// Nodes behind a real broker, with TLS and credentials: the field protocol's promises hold there too.
import { createHash, createHmac } from 'node:crypto';
import { connect, type MqttClient } from 'mqtt';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools } from '@/db/client';
import { PASSWORD, TestBroker } from '../support/broker';
import { linkTrouble, mqttScene, reachBroker, readingsOf, wayTo } from '../support/bus-scene';
import { pack, switchings } from '../support/field-scene';
import { OutsideMqttNode } from '../support/outside-mqtt-node';
import { ownWorker, type OwnWorker } from '../support/own-worker';
import { until } from '../support/until';

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

async function stranger(): Promise<MqttClient> {
  const client = connect({
    ...{ host: 'localhost', port: broker.port, protocol: 'mqtts', ca: broker.ca },
    ...{ username: 'node', password: PASSWORD },
  });
  await until('a stranger is connected', () => client.connected);
  return client;
}

describe('By way of a broker', () => {
  it('takes readings in, acknowledges them once stored, and switches the relay', async () => {
    const scene = await mqttScene(broker);
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    expect(await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }))).toMatchObject({
      ...{ stored: 2, duplicate: 0, refused: [] },
    });
    expect(await readingsOf(scene, 'bench-1')).toHaveLength(1);
    await node.coil(1, 'on');
    expect((await switchings(scene)).map((one) => one.claim)).toEqual(['band']);
    await node.end();
  });

  it('does not listen to a frame that the node’s token has not signed', async () => {
    const scene = await mqttScene(broker);
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    const other = await stranger();
    const topic = `middenward/v1/${scene.nodeId}/up`;
    const frame = JSON.stringify({ type: 'readings', seq: 99, pack: pack({ 'bench-1': -9 }) });
    const wrong = createHmac('sha256', 'wrong').update(`${topic}\n\n${frame}`).digest('hex');
    await other.publishAsync(topic, frame, { qos: 1 });
    await other.publishAsync(topic, `${frame.slice(0, -1)},"mac":"${wrong}"}`, { qos: 1 });
    await node.readings(pack({ 'bench-1': 5 }));
    expect((await readingsOf(scene, 'bench-1')).map(({ value }) => value)).toEqual([5]);
    await Promise.all([node.end(), other.endAsync(true)]);
  });

  it('lets a node of another holding speak for nobody but itself', async () => {
    const [mine, theirs] = [await mqttScene(broker), await mqttScene(broker)];
    const own = await OutsideMqttNode.start(wayTo(broker, mine));
    const thief = await OutsideMqttNode.start({ ...wayTo(broker, theirs), id: mine.nodeId }, 4, false);
    await until('the thief has said hello', () => thief.client.connected);
    thief.hello();
    await own.readings(pack({ 'bench-1': 5 }));
    expect(thief.frames).toEqual([]);
    await Promise.all([own.end(), thief.end()]);
  });

  it('ignores what was recorded earlier and is played again', async () => {
    const scene = await mqttScene(broker);
    const ear = await stranger();
    const heard: string[] = [];
    await ear.subscribeAsync(`middenward/v1/${scene.nodeId}/up`, { qos: 1 });
    ear.on('message', (_topic, payload) => heard.push(payload.toString()));
    const first = await OutsideMqttNode.start(wayTo(broker, scene));
    await first.readings(pack({ 'bench-1': 3 }));
    await first.coil(1, 'on');
    await first.end();
    const second = await OutsideMqttNode.start(wayTo(broker, scene));
    await second.readings(pack({ 'bench-1': 9 }));
    await second.coil(1, 'off');
    const told = heard.find((text) => text.includes('"1":"on"'));
    expect(JSON.parse(told ?? '{}')).toMatchObject({ type: 'relays', channels: { '1': 'on' } });
    const before = worker.metrics.read('frames_unsigned_total');
    await ear.publishAsync(`middenward/v1/${scene.nodeId}/up`, told ?? '', { qos: 1 });
    await until('it was refused', () => worker.metrics.read('frames_unsigned_total') > before);
    await second.readings(pack({ 'bench-1': 9 }));
    expect(second.coils['1']).toBe('off');
    await Promise.all([second.end(), ear.endAsync(true)]);
  });

  it('ignores what a broker kept as retained, however well it is signed', async () => {
    const scene = await mqttScene(broker, { port: 1 });
    const other = await stranger();
    const { up, down } = {
      up: `middenward/v1/${scene.nodeId}/up`,
      down: `middenward/v1/${scene.nodeId}/down`,
    };
    const frame = JSON.stringify({
      type: 'hello',
      node: 'N-1',
      firmware: 'x',
      channels: 4,
      boot: 'old',
      clock: null,
    });
    const key = createHash('sha256').update(scene.token).digest('hex');
    const mac = createHmac('sha256', key).update(`${up}\n\n${frame}`).digest('hex');
    await other.publishAsync(up, `${frame.slice(0, -1)},"mac":"${mac}"}`, { qos: 1, retain: true });
    const answers: string[] = [];
    await other.subscribeAsync(down, { qos: 1 });
    other.on('message', (_topic, payload) => answers.push(payload.toString()));
    const before = worker.metrics.read('frames_retained_total');
    await reachBroker(scene, broker);
    await until('it has come', () => worker.metrics.read('frames_retained_total') > before);
    // the same said now is answered, and by nothing before it
    await other.publishAsync(up, `${frame.slice(0, -1)},"mac":"${mac}"}`, { qos: 1 });
    const welcomes = () => answers.filter((text) => text.includes('"welcome"'));
    await until('an answer', () => welcomes().length > 0);
    expect(welcomes()).toHaveLength(1);
    await other.publishAsync(up, '', { retain: true });
    await other.endAsync(true);
  });

  it('asks a node that it does not know for its hello', async () => {
    const scene = await mqttScene(broker);
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    const welcomes = () => node.frames.filter(({ type }) => type === 'welcome').length;
    const before = welcomes();
    await worker.stop();
    worker = await ownWorker(true, undefined, 1, 2);
    await until('a second welcome', () => welcomes() > before, 20_000);
    expect(await node.readings(pack({ 'bench-1': 5 }))).toMatchObject({ stored: 1 });
    await node.end();
  });
});

describe('When the broker is gone', () => {
  it('tells why, loses no acknowledged reading, and goes on when it is back', async () => {
    const scene = await mqttScene(broker);
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    const t = Date.now() / 1000;
    await node.readings(pack({ 'bench-1': 5 }, t - 3));
    await broker.kill();
    await until(
      'its absence is told',
      async () => (await linkTrouble(scene))?.includes('nothing listens') === true,
      20_000,
    );
    await broker.up();
    await until(
      'it is taken up',
      () => node.frames.filter(({ type }) => type === 'welcome').length > 1,
      20_000,
    );
    expect(await node.readings(pack({ 'bench-1': 4.5 }, t - 2))).toMatchObject({ stored: 1 });
    expect((await readingsOf(scene, 'bench-1')).map(({ value }) => value)).toEqual([5, 4.5]);
    await node.end();
  });

  it('leaves no coil on over its lease', async () => {
    const scene = await mqttScene(broker);
    const node = await OutsideMqttNode.start(wayTo(broker, scene));
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    await broker.kill();
    await node.coil(1, 'off', 32_000);
    expect(node.trips).toBe(1);
    await broker.up();
    await node.end();
  }, 60_000);
});

describe('What a broker refuses is told in words', () => {
  it.each([
    ['a wrong user', { user: 'nobody' }, 'user'],
    ['a certificate of an unknown authority', { ca: null }, 'authority'],
    ['a host that is not on the list', { host: 'elsewhere.example' }, 'BUS_HOSTS'],
  ] as const)('%s', async (_what, more, word) => {
    const scene = await mqttScene(broker, more);
    await until('it is told', async () => (await linkTrouble(scene))?.includes(word) === true, 20_000);
  });
});
