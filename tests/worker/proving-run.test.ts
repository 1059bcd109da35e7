/** A proving run as the worker drives it: it ends by itself, whoever has gone meanwhile. */
import { afterAll, expect, it, onTestFinished } from 'vitest';
import { closePools } from '@/db/client';
import { give, makeScene, pack, switchings, type Scene } from '../support/field-scene';
import { OutsideNode, type Brings } from '../support/outside-node';
import { ownWorker } from '../support/own-worker';
import { until } from '../support/until';
import { WorkerProcess } from '../support/worker-process';

afterAll(closePools);

async function join(url: string, scene: Scene, brings: Brings = {}): Promise<OutsideNode> {
  const node = await OutsideNode.connect(url, scene.token, 'N-1', 4, brings);
  onTestFinished(() => node.terminate());
  return node;
}
const prove = (scene: Scene, seconds: number) => give(scene, { kind: 'prove', channel: scene.fan, seconds });
const warm = { 'bench-1': 9, 'house-air': 9 };

it('runs for as long as was ordered and ends, though nobody asks again', async () => {
  const scene = await makeScene();
  const worker = await ownWorker();
  onTestFinished(() => worker.stop());
  const node = await join(worker.url, scene);
  await node.readings(pack(warm));
  await prove(scene, 3);
  await node.coil(1, 'on');
  await node.coil(1, 'off', 6000);
  await until('both switchings are stored', async () => (await switchings(scene)).length === 2);
  expect((await switchings(scene)).map(({ to, claim }) => [to, claim])).toEqual([
    ['on', 'proving'],
    ['off', 'idle'],
  ]);
});

it('is ended at once by whoever says stop', async () => {
  const scene = await makeScene();
  const worker = await ownWorker();
  onTestFinished(() => worker.stop());
  const node = await join(worker.url, scene);
  await node.readings(pack(warm));
  await prove(scene, 60);
  await node.coil(1, 'on');
  await give(scene, { kind: 'prove-end', channel: scene.fan });
  await node.coil(1, 'off');
});

it('that was going on when the worker died is over when another leads', async () => {
  const scene = await makeScene();
  const first = await WorkerProcess.start();
  onTestFinished(() => first.end('SIGKILL'));
  await first.untilItLeads();
  const node = await join(first.url, scene);
  await node.readings(pack(warm));
  await prove(scene, 3);
  await node.coil(1, 'on');
  await until('it is stored', async () => (await switchings(scene)).length === 1);
  const { boot, number } = node;
  await first.end('SIGKILL');
  node.terminate();

  const second = await WorkerProcess.start();
  onTestFinished(() => second.end('SIGTERM'));
  // the lead of the one that died has to run out first
  await until('another leads', async () => (await second.health())?.leader === true, 40_000);
  const again = await join(second.url, scene, { boot, number, coils: { '1': 'on' } });
  await again.coil(1, 'off', 6000);
}, 90_000);
