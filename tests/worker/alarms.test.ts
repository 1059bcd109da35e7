import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePools } from '@/db/client';
import type { HouseRecord } from '@/db/queries/plan';
import { loadHouse } from '@/db/queries/plan';
import { compile } from '@/lib/control/compile';
import { emptyMemory } from '@/lib/control/memory';
import { step } from '@/lib/control/step';
import { wantedAlarms } from '@/worker/alarms/wanted';
import type { NodeStanding } from '@/worker/control/state';
import { makeScene, pack, rows, type Scene } from '../support/field-scene';
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

function alarmsOf(scene: Scene) {
  return rows<{ kind: string; about: Record<string, string>; isStanding: boolean }>(
    scene,
    sql`select kind, about, cleared_at is null as "isStanding" from alarm where house_id = ${scene.houseId} order by raised_at`,
  );
}

describe('Alarms', () => {
  it('of frost stand while a house point is under the frost alarm, and are cleared when it is warm again', async () => {
    const scene = await makeScene();
    const node = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4);
    await node.readings(pack({ 'bench-1': 0.5, 'house-air': 5, core: 50 }));
    expect((await alarmsOf(scene)).map((one) => one.kind)).not.toContain('frost');
    await node.readings(pack({ 'bench-1': -0.5 }));
    const frost = async () => (await alarmsOf(scene)).find((one) => one.kind === 'frost');
    await until('frost is told', async () => (await frost())?.isStanding === true);
    await node.readings(pack({ 'bench-1': 5 }));
    await until('it is over', async () => (await frost())?.isStanding === false);
    const events = await rows<{ kind: string }>(
      scene,
      sql`select e.kind from alarm_event e join alarm a on a.id = e.alarm_id where a.house_id = ${scene.houseId} and a.kind = 'frost' order by e.at, e.id`,
    );
    expect(events.map((one) => one.kind)).toEqual(['raised', 'cleared']);
    node.close();
  });

  it('of a silent point name it while its node still speaks', async () => {
    const scene = await makeScene();
    const node = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4);
    await node.readings(pack({ 'bench-1': 5, 'house-air': 5, core: 50 }));
    await until('silence is told', async () =>
      (await alarmsOf(scene)).some((one) => one.kind === 'point-silent' && one.isStanding),
    );
    expect((await alarmsOf(scene)).find((one) => one.kind === 'point-silent')?.about).toEqual({
      point: 'bench-1',
    });
    node.close();
  });
});

describe('A node that says nothing more', () => {
  const t0 = Date.UTC(2026, 0, 10);
  const S = 1000;

  async function record(): Promise<HouseRecord> {
    const scene = await makeScene();
    const loaded = await loadHouse(scene.holding, scene.houseId);
    if (loaded === null) throw new Error('the scene is not there');
    return loaded;
  }

  function kindsAt(house: HouseRecord, standing: NodeStanding, startedAt: number, now: number) {
    const points = Object.fromEntries(house.points.map((point) => [point.id, { value: 5, at: t0 }]));
    const observed = { workerStartedAt: startedAt, points, relays: {}, commands: [] };
    const plan = compile(house.config);
    const { memory } = step(plan, emptyMemory(), observed, t0);
    const result = step(plan, memory, observed, now);
    const nodes = new Map(house.nodes.map((node) => [node.id, standing]));
    const { alarms, undecided } = wantedAlarms(house, result, nodes, startedAt, now);
    return { kinds: alarms.map((one) => one.kind), undecided };
  }

  const away = { online: false, lastHeardAt: t0, isCloned: false, isEpochTooFar: false };

  it('is lost a minute after three reporting intervals, and its silent points add nothing', async () => {
    const house = await record();
    expect(kindsAt(house, away, t0 - S, t0 + 149 * S).kinds).toEqual([]);
    expect(kindsAt(house, away, t0 - S, t0 + 150 * S).kinds).toEqual(['node-lost']);
  });

  it('is neither lost nor found for a while after the worker began, for the silence before it was ours', async () => {
    const house = await record();
    const { kinds, undecided } = kindsAt(house, away, t0 + 3600 * S, t0 + 3700 * S);
    expect(kinds).not.toContain('node-lost');
    expect(undecided === 'others' ? [] : [...undecided]).toEqual([
      `node-lost:${house.id}:${house.nodes[0]?.id}`,
    ]);
    expect(kindsAt(house, away, t0 + 3600 * S, t0 + 3750 * S).kinds).toContain('node-lost');
  });
});
