// Boards on Modbus TCP, each a process of its own.
import { sql } from 'drizzle-orm';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { closePools } from '@/db/client';
import { touchPlan } from '@/db/queries/plan';
import { askTestRead, findTestRead } from '@/db/queries/test-read';
import type { Register } from '@/lib/schema/bus';
import { linkTrouble, modbusScene, readingsOf, type BusScene } from '../support/bus-scene';
import { rows, switchings } from '../support/field-scene';
import { ownWorker, type OwnWorker } from '../support/own-worker';
import { TestBoard } from '../support/test-board';
import { until } from '../support/until';

let worker: OwnWorker;
let boards: TestBoard[] = [];
beforeAll(async () => {
  worker = await ownWorker(true, undefined, 1, 2);
});
afterEach(async () => {
  await Promise.all(boards.map((board) => board.kill()));
  boards = [];
});
afterAll(async () => {
  await worker.stop();
  await closePools();
});

async function newBoard(watchdog: { register: number; withinMs: number } | null = null): Promise<TestBoard> {
  const board = await TestBoard.start(watchdog);
  boards.push(board);
  return board;
}

const row = (point: string, address: number, more: Partial<Register> = {}): Register => ({
  ...{ point, address, table: 'input', type: 's16', wordOrder: 'high-first' },
  ...{ scale: 0.1, offset: 0, unit: 'Cel' },
  ...more,
});
const HOUSE = [row('bench-1', 0), row('house-air', 1)];

/** The bench's register at this temperature, the air's far from frost. */
function bench(board: TestBoard, celsius: number): void {
  board.set(['input', 0, Math.round(celsius * 10) & 0xffff], ['input', 1, 80]);
}

const coilOf = async (board: TestBoard, address: number) => (await board.state()).coils[address];
const untilCoil = (board: TestBoard, address: number, isOn: boolean, limitMs = 8000) =>
  until(`coil ${address} is ${isOn}`, async () => (await coilOf(board, address)) === isOn, limitMs);

async function reportedOf(scene: BusScene): Promise<string | null> {
  const [found] = await rows<{ reported: string | null }>(
    scene,
    sql`select state -> 'channels' -> 0 ->> 'reported' as reported from control_memory where house_id = ${scene.houseId}`,
  );
  return found?.reported ?? null;
}

async function heard(scene: BusScene): Promise<boolean> {
  const found = await rows(
    scene,
    sql`select 1 from node where id = ${scene.nodeId} and last_heard_at is not null`,
  );
  return found.length > 0;
}

describe('A board', () => {
  it('is read, and its relay follows the band', async () => {
    const board = await newBoard();
    bench(board, -1.5);
    board.set(['input', 1, 50]);
    const scene = await modbusScene({ port: board.port }, HOUSE);
    await until('the bench is read', async () => (await readingsOf(scene, 'bench-1')).length > 0);
    expect((await readingsOf(scene, 'bench-1'))[0]?.value).toBe(-1.5);
    await untilCoil(board, 0, true);
    await until('it is reported', async () => (await reportedOf(scene)) === 'on');
    bench(board, 9);
    await untilCoil(board, 0, false);
    const claims = (await switchings(scene)).map((one) => one.claim);
    expect(claims).toEqual(['frost', 'idle']);
  });

  it('has relays that no channel is wired to switched off, and those of others left alone', async () => {
    const board = await newBoard();
    bench(board, 5);
    board.set(['coils', 12, true], ['coils', 14, true]);
    await modbusScene({ port: board.port, firstCoil: 10 }, HOUSE);
    await untilCoil(board, 12, false);
    expect(await coilOf(board, 14)).toBe(true);
  });

  it('tells one address that is not there in words, and reads the others', async () => {
    const board = await newBoard();
    bench(board, 5);
    const scene = await modbusScene({ port: board.port }, [
      ...HOUSE,
      row('core', 2),
      row('humidity', 500, { unit: '%RH' }),
    ]);
    await until('it is told', async () => {
      const [status] = await rows<{ text: string }>(
        scene,
        sql`select status ->> 'refusals' as text from node where id = ${scene.nodeId}`,
      );
      return /input register 500: it has nothing at this address \(exception 2\)/.test(status?.text ?? '');
    });
    expect((await readingsOf(scene, 'core')).length).toBeGreaterThan(0);
  });

  it('that refuses a relay is tried three times, and never taken as on', async () => {
    const board = await newBoard();
    bench(board, 3);
    board.set(['refuses', 0, [0]]);
    const scene = await modbusScene({ port: board.port }, HOUSE);
    await until('it is told', async () => {
      const [status] = await rows<{ text: string }>(
        scene,
        sql`select status ->> 'refusals' as text from node where id = ${scene.nodeId}`,
      );
      return /it failed at this \(exception 4\)/.test(status?.text ?? '');
    });
    await until('it is reported', async () => (await reportedOf(scene)) === 'off');
  });

  it('is not asked for anything once its token is revoked', async () => {
    const board = await newBoard();
    bench(board, 3);
    const scene = await modbusScene({ port: board.port }, HOUSE);
    await untilCoil(board, 0, true);
    await scene.holding.db.transaction(async (db) => {
      await db.execute(sql`update node set revoked_at = now() where id = ${scene.nodeId}`);
      await touchPlan({ id: scene.holding.id, db }, scene.houseId);
    });
    // nobody else would drop the coils of a board without watchdog
    await untilCoil(board, 0, false);
  });
});

describe('Somebody at the panel', () => {
  it('sees one register as it is now, or why not', async () => {
    const board = await newBoard();
    board.set(['input', 7, 234]);
    const scene = await modbusScene({ port: board.port }, []);
    const ask = async (address: number) => {
      const place = { table: 'input', type: 's16', wordOrder: 'high-first', scale: 0.1, offset: 0 } as const;
      const asked = { node: 'N-1', address, unit: 'Cel', ...place };
      const { id } = await scene.holding.db.transaction((db) =>
        askTestRead({ id: scene.holding.id, db }, scene.houseId, asked),
      );
      const found = () => findTestRead(scene.holding, scene.houseId, id);
      await until('an answer', async () => (await found())?.state !== 'asked');
      return found();
    };
    await until(
      'the board is reached',
      async () => (await linkTrouble(scene)) === null && (await heard(scene)),
      15_000,
    );
    expect(await ask(7)).toMatchObject({ state: 'answered', raw: 234, value: 23.4 });
    expect(await ask(500)).toMatchObject({
      state: 'failed',
      why: 'it has nothing at this address (exception 2)',
    });
    expect(await readingsOf(scene, 'bench-1')).toEqual([]);
    await board.kill();
    await until(
      'it is gone',
      async () => (await ask(7))?.why?.startsWith('There is no link to the board') === true,
    );
  });
});

describe('When the link is lost', () => {
  it('says that the relay is unknown, and commands by what it sees when it is back', async () => {
    const board = await newBoard();
    bench(board, 3);
    const scene = await modbusScene({ port: board.port }, HOUSE);
    await untilCoil(board, 0, true);
    await until('it is reported', async () => (await reportedOf(scene)) === 'on');
    await board.kill();
    await until('it is unknown', async () => (await reportedOf(scene)) === null);
    await until('why is told', async () => (await linkTrouble(scene)) !== null, 15_000);
    await board.up();
    bench(board, 3);
    await untilCoil(board, 0, true, 20_000);
    await until('no trouble is told', async () => (await linkTrouble(scene)) === null, 15_000);
    const trips = (await switchings(scene)).filter(({ trip }) => trip !== null);
    expect(trips).toHaveLength(1);
  });

  it('that only hangs is noticed, and comes back without a switching where it kept its state', async () => {
    const board = await newBoard();
    bench(board, 3);
    const scene = await modbusScene({ port: board.port }, HOUSE);
    await untilCoil(board, 0, true);
    await until('it is reported', async () => (await reportedOf(scene)) === 'on');
    const before = (await board.state()).writes.length;
    board.hang(true);
    await until(
      'why is told',
      async () => /does not answer within 1 s/.test((await linkTrouble(scene)) ?? ''),
      15_000,
    );
    board.hang(false);
    await until('it is reported', async () => (await reportedOf(scene)) === 'on', 20_000);
    expect((await board.state()).writes).toHaveLength(before);
  });

  it('a watchdog drops the coils by itself, since nobody feeds it', async () => {
    const board = await newBoard({ register: 9, withinMs: 3000 });
    bench(board, 3);
    const watchdog = { address: 9, value: 1, within: 3 };
    const scene = await modbusScene({ port: board.port, watchdog }, HOUSE);
    await untilCoil(board, 0, true);
    const { feeds } = await board.state();
    await until('it is fed', async () => (await board.state()).feeds >= feeds + 3);
    expect(await coilOf(board, 0)).toBe(true);
    await scene.holding.db.transaction(async (db) => {
      // it is looked for where nothing is
      await db.execute(
        sql`update node set modbus = modbus || '{"port": 1}'::jsonb where id = ${scene.nodeId}`,
      );
      await touchPlan({ id: scene.holding.id, db }, scene.houseId);
    });
    await untilCoil(board, 0, false);
  });
});

describe('A worker', () => {
  it('that stops drops the coils of a board that would keep them, and a stand-by takes it up', async () => {
    await worker.stop();
    const board = await newBoard();
    bench(board, 3);
    const scene = await modbusScene({ port: board.port }, HOUSE);
    const first = await ownWorker();
    await untilCoil(board, 0, true);
    const standBy = await ownWorker(false);
    await first.stop();
    expect(await coilOf(board, 0)).toBe(false);
    await until('the stand-by leads', async () => (await standBy.health()).leader);
    await untilCoil(board, 0, true);
    await until('it is reported', async () => (await reportedOf(scene)) === 'on');
    await standBy.stop();
    worker = await ownWorker(true, undefined, 1, 2);
  }, 40_000);
});
