/** A load that drops while no worker is there: what is told of it, and that its least off time counts all the same. */
import { afterAll, expect, it, onTestFinished } from 'vitest';
import { closePools } from '@/db/client';
import { readMemory } from '@/db/queries/running';
import { migrateMemory } from '@/lib/control/memory-versions';
import { makeScene, pack, switchings, type Scene } from '../support/field-scene';
import { OutsideNode, type Brings } from '../support/outside-node';
import { until } from '../support/until';
import { WorkerProcess } from '../support/worker-process';

afterAll(closePools);

async function start(): Promise<WorkerProcess> {
  const worker = await WorkerProcess.start();
  onTestFinished(() => worker.end('SIGTERM'));
  await worker.untilItLeads();
  return worker;
}

async function join(worker: WorkerProcess, scene: Scene, brings: Brings = {}): Promise<OutsideNode> {
  const node = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4, brings);
  onTestFinished(() => node.terminate());
  return node;
}

const fanMemory = async (scene: Scene) =>
  migrateMemory((await readMemory(scene.holding, scene.houseId))?.memory).channels.find(
    (one) => one.id === scene.fan,
  );

it('a lease trip is told by the worker that comes after, and its least off time counts', async () => {
  const scene = await makeScene({}, { minOff: 120 });
  const first = await start();
  const node = await join(first, scene);
  await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
  await node.coil(1, 'on');
  // what the node says of it is no event of control's, and is kept within a moment all the same
  await until('its report is kept', async () => (await fanMemory(scene))?.relay?.reported === 'on', 3000);
  const { boot, number } = node;
  await first.end('SIGKILL');
  node.terminate();

  const again = await join(await start(), scene, { boot, number, trips: 1 });
  await until('the trip is told', async () => (await switchings(scene)).length === 2);
  await again.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
  expect(again.coils['1']).toBe('off');
  expect((await switchings(scene)).map(({ to, claim, trip }) => [to, claim, trip])).toEqual([
    ['on', 'band', null],
    ['off', 'fail-safe', `${boot}/1`],
  ]);
  const fan = await fanMemory(scene);
  expect(fan).toMatchObject({ wanted: 'off', counted: 'off', claim: 'short-cycle' });
});

it('of a relay that was ordered on and not heard of since, too', async () => {
  const scene = await makeScene({}, { minOff: 120 });
  const first = await start();
  const node = await join(first, scene);
  await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
  await until('the switching is stored', async () => (await switchings(scene)).length === 1);
  await first.end('SIGKILL');
  const { boot, number } = node;
  node.terminate();

  await join(await start(), scene, { boot, number, trips: 1 });
  await until('the trip is told', async () => (await switchings(scene)).length === 2);
  expect((await switchings(scene)).at(-1)).toMatchObject({
    to: 'off',
    claim: 'fail-safe',
    trip: `${boot}/1`,
  });
});
