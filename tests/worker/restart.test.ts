import { randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { afterAll, describe, expect, it, onTestFinished } from 'vitest';
import { closePools } from '@/db/client';
import { readMemory } from '@/db/queries/running';
import type { Memory } from '@/lib/control/memory';
import { migrateMemory } from '@/lib/control/memory-versions';
import { CutLine } from '../support/cut-line';
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
import { until } from '../support/until';
import { WorkerProcess } from '../support/worker-process';

afterAll(closePools);

async function start(more: Record<string, string> = {}, waits = true): Promise<WorkerProcess> {
  const worker = await WorkerProcess.start(more);
  // by TERM, so that it gives its lead back and the next test need not wait for the lease to run out
  onTestFinished(() => worker.end('SIGTERM'));
  if (waits) await worker.untilItLeads();
  return worker;
}

async function join(worker: WorkerProcess, scene: Scene): Promise<OutsideNode> {
  const node = await OutsideNode.connect(worker.url, scene.token, 'N-1', 4);
  onTestFinished(() => node.terminate());
  return node;
}

async function memoryOf(scene: Scene): Promise<Memory> {
  return migrateMemory((await readMemory(scene.holding, scene.houseId))?.memory);
}

const slow: FanRule = { rest: { longestDraw: 600, least: 600 } };

/** A house at 5 °C whose worker is killed, and whose fan's rule is made to want 6 °C before another leads. */
async function warmerWhileAway(): Promise<Scene> {
  const scene = await makeScene();
  const first = await start();
  const node = await join(first, scene);
  await node.readings(pack({ 'bench-1': 5, 'house-air': 5 }));
  await first.end('SIGKILL');
  await force(scene, { band: [{ from: '00:00', low: 6, high: 8 }] });
  return scene;
}

describe('A worker that is killed', () => {
  it('in mid-draw drives on when it is back: latch, credit and number as they were or above', async () => {
    const scene = await makeScene(slow, { minOn: 120, minOff: 120 });
    const first = await start();
    const node = await join(first, scene);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    await until('the switching is stored', async () => (await switchings(scene)).length === 1);
    // between low and high: only the latch that was kept keeps it on
    await node.readings(pack({ 'bench-1': 6, 'house-air': 6 }));
    const before = await memoryOf(scene);
    const epoch = (await first.health())?.epoch ?? 0;
    await first.end('SIGKILL');

    const second = await start();
    expect((await second.health())?.epoch).toBe(epoch + 1);
    const again = await join(second, scene);
    await again.readings(pack({ 'bench-1': 6, 'house-air': 6 }));
    await again.coil(1, 'on');
    expect(again.number).toBeGreaterThan(node.number);
    const after = await memoryOf(scene);
    expect(after.rules[0]?.latch).toBe(true);
    expect(after.sources[0]?.credit).toBeLessThanOrEqual(before.sources[0]?.credit ?? 0);
    expect(after.sources[0]?.resting).toBe(false);
    // the same draw goes on: its least on time was not begun anew
    expect(after.channels[0]?.leastSince).toBe(before.channels[0]?.leastSince);
  });

  it('in a rest keeps resting till its end, and a hand till its own', async () => {
    const scene = await makeScene({ rest: { longestDraw: 1, least: 600 } });
    const first = await start();
    const node = await join(first, scene);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    await node.coil(1, 'off', 4000);
    const second = scene.channelIds.get('fan-2') ?? '';
    await give(scene, { kind: 'hand', channel: second, state: 'off', seconds: 900, holdInFrost: false });
    await until('the hand is taken', async () => (await memoryOf(scene)).taken === 1);
    const before = await memoryOf(scene);
    await first.end('SIGKILL');

    const again = await join(await start(), scene);
    await again.readings(pack({ 'bench-1': 2, 'house-air': 5 }));
    const after = await memoryOf(scene);
    expect(again.coils['1']).toBe('off');
    expect(after.sources[0]).toMatchObject({ resting: true, restSince: before.sources[0]?.restSince });
    expect(after.channels[1]?.hand).toEqual(before.channels[1]?.hand);
    expect((await switchings(scene)).map((one) => one.claim)).toEqual(['band', 'rest']);
  });

  it('takes what people ordered and changed meanwhile', async () => {
    const scene = await warmerWhileAway();
    await give(scene, {
      kind: 'hand',
      channel: scene.channelIds.get('fan-2') ?? '',
      state: 'on',
      seconds: 600,
      holdInFrost: false,
    });

    const again = await join(await start(), scene);
    await again.readings(pack({ 'bench-1': 5, 'house-air': 5 }));
    await again.coil(1, 'on');
    await again.coil(2, 'on');
  });

  it('starts nothing that was locked out meanwhile', async () => {
    const scene = await warmerWhileAway();
    await give(scene, { kind: 'lock-out', channel: scene.fan, lockout: randomUUID(), why: 'belt' });

    await start();
    await until('the lock-out is taken', async () => (await memoryOf(scene)).taken === 1);
    expect(await switchings(scene)).toEqual([]);
  });
});

describe('A worker that is asked to end', () => {
  it('switches nothing, and gives its lead to the next at once', async () => {
    const scene = await makeScene();
    const first = await start();
    const node = await join(first, scene);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    const commands = () => node.frames.filter(({ frame }) => frame.type === 'command');
    await first.end('SIGTERM');
    expect(first.exitCode).toBe(0);
    expect(commands().at(-1)?.frame['channels']).toMatchObject({ '1': 'on' });
    // another folder, so another instance: it need not wait for the lease to run out
    const second = await start({ DATA_DIR: `${process.env['DATA_DIR'] ?? ''}/other` });
    expect((await second.health())?.leader).toBe(true);
  });
});

describe('A stand-by', () => {
  it('answers no node while another leads', async () => {
    const scene = await makeScene();
    await start();
    const standby = await start({ DATA_DIR: `${process.env['DATA_DIR'] ?? ''}/standby` }, false);
    await until('it answers', async () => (await standby.health()) !== null);
    expect((await standby.health())?.leader).toBe(false);
    await expect(OutsideNode.connect(standby.url, scene.token, 'N-1')).rejects.toThrow('503');
  });
});

describe('A second worker', () => {
  it('takes over from one that was killed within a relay’s lease: nodes that find it keep their coils', async () => {
    const scene = await makeScene(slow);
    const first = await start();
    const second = await start({ DATA_DIR: `${process.env['DATA_DIR'] ?? ''}/second` }, false);
    const node = await join(first, scene);
    await node.readings(pack({ 'bench-1': 3, 'house-air': 5 }));
    await node.coil(1, 'on');
    await until('the switching is stored', async () => (await switchings(scene)).length === 1);
    const epoch = (await first.health())?.epoch ?? 0;
    const { boot, number } = node;
    await first.end('SIGKILL');

    let again: OutsideNode | undefined;
    await until(
      'the second takes the node in',
      async () => {
        again = await OutsideNode.connect(second.url, scene.token, 'N-1', 4, {
          ...{ boot, number, coils: { '1': 'on' as const } },
        }).catch(() => undefined);
        return again !== undefined;
      },
      25_000,
    );
    onTestFinished(() => again?.terminate());
    expect((await second.health())?.epoch).toBe(epoch + 1);
    expect(again?.number).toBeGreaterThan(number);
    // its lease of 30 s has not ended, and the first command that it got holds the coil
    expect(node.coils['1']).toBe('on');
    expect(again?.coils['1']).toBe('on');
    expect((await switchings(scene)).map(({ to }) => to)).toEqual(['on']);
  }, 60_000);
});

describe('While the database is away', () => {
  it('nothing is acknowledged, control goes on, and all is stored once when it is back', async () => {
    const scene = await makeScene();
    const line = await CutLine.to(process.env['DATABASE_URL'] ?? '');
    const worker = await start({ DATABASE_URL: line.url });
    const node = await join(worker, scene);
    await node.readings(pack({ 'bench-1': 5, 'house-air': 5 }));

    line.cut();
    const cold = pack({ 'bench-1': 3, 'house-air': 5 });
    const seq = node.sendReadings(cold);
    await node.coil(1, 'on', 2000);
    expect(node.frames.some(({ frame }) => frame.type === 'ack' && frame['seq'] === seq)).toBe(false);
    expect(await switchings(scene)).toEqual([]);

    line.mend();
    expect(await node.next((frame) => frame.type === 'ack' && frame['seq'] === seq, 8000)).toMatchObject({
      stored: 2,
      duplicate: 0,
    });
    expect(await node.readings(cold)).toMatchObject({ stored: 0, duplicate: 2 });
    await until('the switching is stored', async () => (await switchings(scene)).length === 1);
    const found = await rows(
      scene,
      sql`select r.at from reading r join point p on p.number = r.point where p.house_id = ${scene.houseId}`,
    );
    expect(found).toHaveLength(4);
    await worker.end('SIGTERM');
    line.close();
  });
});

describe('A wrong setting', () => {
  it('ends the start with 78 and a sentence that names it, never its value', async () => {
    const worker = await start({ CLOCK_RATE: 'fast-as-light' }, false);
    await until('it has ended', () => worker.exitCode !== null);
    expect(worker.exitCode).toBe(78);
    expect(worker.output).toContain('CLOCK_RATE');
    expect(worker.output).not.toContain('fast-as-light');
  });

  it('of another clock rate than the database runs at does so too', async () => {
    await (await start()).end('SIGTERM');
    const worker = await start({ CLOCK_RATE: '60' }, false);
    await until('it has ended', () => worker.exitCode !== null);
    expect(worker.exitCode).toBe(78);
    expect(worker.output).toContain('CLOCK_RATE');
  });
});
