/** Faults for training, from the order to what the real worker makes of what comes over the wire. */
import { spawn, type ChildProcess } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { once } from 'node:events';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { closePools, everyHolding, type Holding } from '@/db/client';
import { findHouse } from '@/db/queries/house';
import { addPersonCommand } from '@/db/queries/person-command';
import { readMemory } from '@/db/queries/running';
import { organization } from '@/db/schema/auth';
import { longHouse } from '@/db/seed/long-house';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import type { TrainingOrder } from '@/lib/schema/training';
import { Problem } from '@/lib/server/errors';
import type * as Training from '@/lib/server/training';
import { ownWorker, type OwnWorker } from '../support/own-worker';
import { makeScene } from '../support/field-scene';
import { until } from '../support/until';

// fifteen times as fast: a report each 2 s, a lease of 2 s
const RATE = 15;
const LIMIT_MS = 90_000;
vi.setConfig({ testTimeout: 2 * LIMIT_MS });

let worker: OwnWorker;
let yard: ChildProcess;
let folder: string;
let seeded: SeededHouse;
let holding: Holding;
let training: typeof Training;

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  server.close();
  await once(server, 'close');
  return port;
}

beforeAll(async () => {
  const port = await freePort();
  process.env['TRAINING_PORT'] = String(port);
  training = await import('@/lib/server/training');
  worker = await ownWorker(true, randomUUID(), RATE);
  holding = { id: randomUUID(), db: everyHolding() };
  await holding.db.insert(organization).values({ id: holding.id, name: 'Trained', slug: holding.id });
  // a heap that may be drawn on at once, and a fan that wants to all the time
  const [gateHeap, ...others] = longHouse.sources;
  const fan = longHouse.rules[0];
  if (gateHeap === undefined || fan === undefined) throw new Error('the long house has a heap and a rule');
  const body = { ...fan.body, band: [{ from: '00:00', low: 25, high: 30 }] };
  const rest = { longestDraw: 3600, least: 60, leastGain: leastGain() };
  seeded = await writeHouse(
    holding,
    {
      ...longHouse,
      sources: [{ ...gateHeap, ready: null, dailyLimit: null }, ...others],
      rules: [{ ...fan, body: { ...body, rest, standIns: [] } }],
    },
    'test@example.org',
    new Date('2026-01-01T00:00:00Z'),
  );
  folder = mkdtempSync(path.join(tmpdir(), 'training '));
  const config = path.join(folder, 'yard.json');
  const nodes = [{ key: 'LH-1', token: seeded.secrets[0]?.token, house: 'long-house' }];
  writeFileSync(config, JSON.stringify({ seed: 7, stateFile: path.join(folder, 'world.json'), nodes }));
  yard = spawn(
    process.execPath,
    [
      ...['--import', 'tsx', 'worker/yard/main.ts', '--config', config, '--rate', String(RATE)],
      ...['--server', worker.url.replace('http', 'ws'), '--training', String(port)],
    ],
    { stdio: 'ignore' },
  );
  await until('the yard drives the house', async () => (await shown()).available, LIMIT_MS);
  await until('the fan runs', async () => (await coil()) === 'on', LIMIT_MS);
}, 2 * LIMIT_MS);

afterAll(async () => {
  yard.kill('SIGKILL');
  await worker.stop();
  await closePools();
  rmSync(folder, { recursive: true, force: true });
});

const leastGain = () => ({ kelvin: 3, after: 60, intake: 'loop-intake', return: 'loop-return' });

async function house() {
  const found = await findHouse(holding, seeded.houseId);
  if (found === null) throw new Error('the house is there');
  return found;
}
const shown = async () => training.readTraining(holding, await house());
const order = async (about: Partial<TrainingOrder> & Pick<TrainingOrder, 'fault'>) =>
  training.orderTraining(holding, await house(), { on: true, seconds: 3600, ...about });

async function rows<Row>(query: ReturnType<typeof sql>): Promise<Row[]> {
  return (await holding.db.execute(query)).rows as Row[];
}
async function stands(kind: string): Promise<boolean> {
  const found = await rows(
    sql`select 1 from alarm where house_id = ${seeded.houseId} and kind = ${kind} and cleared_at is null`,
  );
  return found.length > 0;
}
async function latest(key: string): Promise<number> {
  const [row] = await rows<{ value: number }>(sql`
    select r.value from reading r join point p on p.number = r.point
    where p.house_id = ${seeded.houseId} and p.key = ${key} order by r.at desc limit 1`);
  return row?.value ?? NaN;
}
async function coil(): Promise<string | undefined> {
  const kept = await readMemory(holding, seeded.houseId);
  return kept?.state?.channels.find(({ key }) => key === 'gate-heap-fan')?.reported ?? undefined;
}
async function status(): Promise<Record<string, unknown>> {
  const [row] = await rows<{ status: Record<string, unknown> }>(
    sql`select status from node where house_id = ${seeded.houseId}`,
  );
  return row?.status ?? {};
}
const hand = async (state: 'on' | 'off' | null) => {
  const channel = seeded.channelIds.get('gate-heap-fan') ?? '';
  const body =
    state === null
      ? ({ kind: 'auto', channel } as const)
      : ({ kind: 'hand', channel, state, seconds: 36_000, holdInFrost: true } as const);
  await holding.db.transaction((db) =>
    addPersonCommand({ id: holding.id, db }, seeded.houseId, {
      at: new Date(),
      by: 'test@example.org',
      body,
    }),
  );
};

/** The fault is put, what should be seen is seen, the fault is ended, and it is seen no more. */
async function practised(
  about: Partial<TrainingOrder> & Pick<TrainingOrder, 'fault'>,
  seen: () => Promise<boolean>,
): Promise<void> {
  await order(about);
  await until(`${about.fault} is seen`, seen, LIMIT_MS);
  expect((await shown()).faults.map(({ fault }) => fault)).toEqual([about.fault]);
  await order({ ...about, on: false });
  expect((await shown()).faults).toEqual([]);
  await until(`${about.fault} is over`, async () => !(await seen()), LIMIT_MS);
}

describe('a fault for training is seen as a real one would be', () => {
  it('a dead sensor: its point is silent', () =>
    practised({ fault: 'dead-sensor', point: 'bench-2' }, () => stands('point-silent')));

  it('a probe that says 85.0: its point is not trusted', () =>
    practised({ fault: 'lying-85', point: 'bench-2' }, () => stands('point-not-trusted')));

  it('two swapped probes: each shows what the other measures', () =>
    practised({ fault: 'swapped-probes', point: 'bench-2', other: 'gate-core' }, async () => {
      return (await latest('bench-2')) > 30 && (await latest('gate-core')) < 30;
    }));

  it('a leak in the loop: the draw brings nothing', () =>
    practised({ fault: 'loop-leak' }, () => stands('no-gain')));

  it('a dead fan: it is ordered on and stands', async () => {
    await hand('on');
    await until('the fan runs by hand', async () => (await coil()) === 'on', LIMIT_MS);
    await practised({ fault: 'dead-fan', channel: 1 }, () => stands('fan-standing'));
  });

  it('a welded contact: it runs though its coil is off', async () => {
    await order({ fault: 'welded-relay', channel: 1 });
    await hand('off');
    await until('the coil is off', async () => (await coil()) === 'off', LIMIT_MS);
    await practised({ fault: 'welded-relay', channel: 1 }, () => stands('runs-though-off'));
    await hand('on');
  });

  it('a lost line: the node is lost, and found again without a start', async () => {
    const before = (await status())['boot'];
    await practised({ fault: 'lost-link' }, () => stands('node-lost'));
    expect((await status())['boot']).toBe(before);
  });

  it('a power cut: the node is lost, and starts anew with its coils off', async () => {
    const { boot, restarts } = await status();
    await practised({ fault: 'power-cut' }, () => stands('node-lost'));
    await until('another boot is kept', async () => (await status())['boot'] !== boot, LIMIT_MS);
    expect((await status())['restarts']).toBe(Number(restarts ?? 0) + 1);
  });
});

describe('where there is nothing to practise on', () => {
  it('a house with a node that is not the yard’s refuses, though it bears the same key', async () => {
    const other = await makeScene();
    const foreign = await findHouse(other.holding, other.houseId);
    if (foreign === null) throw new Error('the other house is there');
    expect(await training.readTraining(other.holding, foreign)).toMatchObject({ available: false });
    const refused = training.orderTraining(other.holding, foreign, {
      fault: 'lost-link',
      on: true,
      seconds: 60,
    });
    await expect(refused).rejects.toThrow(Problem);
    await expect(refused).rejects.toMatchObject({ code: 'conflict' });
  });

  it('a point or a channel that the node does not have is named', async () => {
    await expect(order({ fault: 'dead-sensor', point: 'attic' })).rejects.toMatchObject({
      code: 'not-valid',
    });
    await expect(order({ fault: 'dead-fan', channel: 40 })).rejects.toMatchObject({ code: 'not-valid' });
    expect((await shown()).faults).toEqual([]);
  });
});
