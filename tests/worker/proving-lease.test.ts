/** What is stored of a lease that ended while a node was away: between which two instants the coil dropped. */
import { sql } from 'drizzle-orm';
import { afterAll, expect, it, onTestFinished } from 'vitest';
import { closePools } from '@/db/client';
import { give, makeScene, pack, rows, type Scene } from '../support/field-scene';
import { OutsideNode, type Brings } from '../support/outside-node';
import { ownWorker } from '../support/own-worker';
import { until } from '../support/until';

afterAll(closePools);

async function join(url: string, scene: Scene, brings: Brings = {}): Promise<OutsideNode> {
  const node = await OutsideNode.connect(url, scene.token, 'N-1', 4, brings);
  onTestFinished(() => node.terminate());
  return node;
}
const warm = { 'bench-1': 9, 'house-air': 9 };

it('a lease that ended is told with its last renewal and with when the node said so', async () => {
  const scene = await makeScene();
  // app time passes ten times as fast: a lease is 3 s
  const worker = await ownWorker(true, undefined, 10);
  onTestFinished(() => worker.stop());
  const node = await join(worker.url, scene);
  await node.readings(pack(warm, node.now()));
  await give(scene, { kind: 'hand', channel: scene.fan, state: 'on', seconds: 3600, holdInFrost: false });
  await node.coil(1, 'on');
  node.sendRelays();
  const { boot, number } = node;
  const left = performance.now();
  node.terminate();
  await until('its lease is over', () => performance.now() - left > 4000, 8000);
  await join(worker.url, scene, { boot, number, trips: 1 });
  const stored = () =>
    rows<{ lease: { renewedAt: number; toldAt: number } | null }>(
      scene,
      sql`select explanation->'ladder'->0->'because'->'lease' as lease from switching
          where channel_id = ${scene.fan} and trip is not null`,
    );
  await until('the trip is stored', async () => (await stored()).length === 1);
  const lease = (await stored())[0]?.lease;
  if (lease === null || lease === undefined) throw new Error('no lease was told');
  const awayS = (lease.toldAt - lease.renewedAt) / 1000;
  // 4 s of real time are 40 s away at the least
  expect(awayS).toBeGreaterThanOrEqual(40);
});
