import { afterAll, beforeAll, expect, it } from 'vitest';
import { eq } from 'drizzle-orm';
import { closePools } from '@/db/client';
import { node as nodes } from '@/db/schema/node';
import { makeScene, pack, type Scene } from '../support/field-scene';
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

async function status(scene: Scene): Promise<Record<string, unknown>> {
  const found = await scene.holding.db.select().from(nodes).where(eq(nodes.houseId, scene.houseId));
  return found[0]?.status ?? {};
}
const refusedIs = (scene: Scene, count: number) =>
  // notes of nodes are kept every ten seconds
  until(`${count} are kept as refused`, async () => (await status(scene))['refused'] === count, 25_000);

it.concurrent(
  'what a node sent in vain is counted in its row, with its reasons, the newest first',
  async () => {
    const scene = await makeScene();
    const node = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4);
    await refusedIs(scene, 0);
    await node.readings(pack({ 'bench-1': 5, nobody: 1 }));
    await node.readings(pack({ nobody: 2, humidity: 5 }));
    await refusedIs(scene, 3);
    expect((await status(scene))['refusals']).toMatchObject([
      { name: 'humidity', why: expect.stringMatching(/^the unit "Cel" is a temperature/) },
      { name: 'nobody', why: 'this node has no point of that name' },
    ]);
    node.close();
  },
  60_000,
);

it.concurrent(
  'the count goes on over a lost line and begins anew with a boot',
  async () => {
    const scene = await makeScene();
    const node = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4);
    await node.readings(pack({ nobody: 1 }));
    await refusedIs(scene, 1);
    const { boot } = node;
    node.close();
    const again = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4, { boot });
    await again.readings(pack({ nobody: 1 }));
    await refusedIs(scene, 2);
    again.close();
    const rebooted = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4);
    await refusedIs(scene, 0);
    rebooted.close();
  },
  60_000,
);

it.concurrent(
  'text that no database keeps does not stop the notes of nodes',
  async () => {
    const scene = await makeScene();
    const node = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4);
    await node.readings(pack({ 'x\0y': 1 }));
    await refusedIs(scene, 1);
    expect((await status(scene))['refusals']).toMatchObject([{ name: 'x\ufffdy' }]);
    node.close();
  },
  60_000,
);

it.concurrent(
  'a node that only posts is counted too',
  async () => {
    const scene = await makeScene();
    const answer = await fetch(`${worker.url}/field/v1/readings`, {
      method: 'POST',
      headers: { 'content-type': 'application/senml+json', authorization: `Bearer ${scene.token}` },
      body: JSON.stringify(pack({ nobody: 1 })),
    });
    expect(answer.status).toBe(200);
    await refusedIs(scene, 1);
  },
  60_000,
);
