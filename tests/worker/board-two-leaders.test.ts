/**
 * Two workers and one board that keeps no command numbers: whoever does not lead any more must not write to it, and one that
 * only cannot ask goes on. SOURCE: reliability.md, promises 6 and 7, faults 2 and 8; docs/buses.md, "What such a board
 * cannot do".
 */
import { afterAll, afterEach, expect, it, onTestFinished } from 'vitest';
import { closePools } from '@/db/client';
import type { Register } from '@/lib/schema/bus';
import { modbusScene } from '../support/bus-scene';
import { CutLine } from '../support/cut-line';
import { force } from '../support/field-scene';
import { TestBoard } from '../support/test-board';
import { until } from '../support/until';
import { WorkerProcess } from '../support/worker-process';

let board: TestBoard;
afterEach(() => board.kill());
afterAll(closePools);

/** App time runs so many times as fast: a relay's lease ends before the lead does. */
const RATE = '4';

async function start(name: string, more: Record<string, string> = {}): Promise<WorkerProcess> {
  const folder = `${process.env['DATA_DIR'] ?? ''}/${name}`;
  const worker = await WorkerProcess.start({ DATA_DIR: folder, CLOCK_RATE: RATE, ...more });
  onTestFinished(async () => {
    worker.signal('SIGCONT');
    await worker.end('SIGTERM');
  });
  return worker;
}

const row = (point: string, address: number): Register => ({
  ...{ point, address, table: 'input', type: 's16', wordOrder: 'high-first' },
  ...{ scale: 0.1, offset: 0, unit: 'Cel' },
});
const bench = (celsius: number) => board.set(['input', 0, celsius * 10], ['input', 1, 80]);
const coil = async () => (await board.state()).coils[0] === true;
const untilCoil = (isOn: boolean) =>
  until(`the coil is ${isOn}`, async () => (await coil()) === isOn, 15_000);
const untilItKnows = (worker: WorkerProcess) =>
  until('it knows that it does not lead', async () => (await worker.health())?.leader === false, 10_000);
const leads = async (worker: WorkerProcess) => (await worker.health())?.leader === true;

async function house(watchdog: { register: number; withinMs: number } | null = null) {
  board = await TestBoard.start(watchdog);
  bench(3);
  const asked =
    watchdog === null ? null : { address: watchdog.register, value: 1, within: watchdog.withinMs / 1000 };
  return modbusScene({ port: board.port, watchdog: asked }, [row('bench-1', 0), row('house-air', 1)]);
}

it('a leader that stood still while another took over writes to the board no more', async () => {
  await house();
  const first = await start('first');
  await first.untilItLeads();
  await untilCoil(true);
  const second = await start('second');
  first.signal('SIGSTOP');
  await until('the second leads', () => leads(second), 30_000);
  await untilCoil(true);
  const { writes } = await board.state();

  first.signal('SIGCONT');
  await untilItKnows(first);
  expect(first.output).toContain('another worker leads now');
  expect((await board.state()).writes).toEqual(writes);
  // only one is left that switches it
  bench(9);
  await untilCoil(false);
  expect((await board.state()).writes).toEqual([...writes, [0, false]]);
}, 90_000);

it('nor one that stood still while the database left it without an answer', async () => {
  await house();
  const line = await CutLine.to(process.env['DATABASE_URL'] ?? '');
  onTestFinished(() => line.close());
  const first = await start('first', { DATABASE_URL: line.url });
  await first.untilItLeads();
  await untilCoil(true);
  const second = await start('second');
  line.fallSilent();
  // it has asked, and will find its question unanswered for far too long when it wakes
  await until('it waits for an answer', async () => ((await first.health())?.heartbeat ?? 0) > 2.5);
  first.signal('SIGSTOP');
  await until('the second leads', () => leads(second), 30_000);
  await untilCoil(true);
  const { writes } = await board.state();

  line.mend();
  first.signal('SIGCONT');
  await untilItKnows(first);
  expect((await board.state()).writes).toEqual(writes);
}, 90_000);

it('while its leader stands still a board’s watchdog drops the coils, and the next leader puts them on', async () => {
  await house({ register: 9, withinMs: 3000 });
  const first = await start('first');
  await first.untilItLeads();
  await untilCoil(true);
  const second = await start('second');
  first.signal('SIGSTOP');
  await untilCoil(false);
  expect(await leads(second)).toBe(false);
  await until('the second leads', () => leads(second), 30_000);
  await untilCoil(true);

  // the former feeds it no more either: it would hide that nobody drives
  first.signal('SIGCONT');
  await untilItKnows(first);
  const { feeds } = await board.state();
  await until('the second feeds it', async () => (await board.state()).feeds > feeds + 1);
  second.signal('SIGSTOP');
  onTestFinished(() => second.signal('SIGCONT'));
  await untilCoil(false);
}, 90_000);

it('a leader that is cut off drives on, and leaves the board to the next as soon as that moves a coil', async () => {
  const scene = await house();
  const line = await CutLine.to(process.env['DATABASE_URL'] ?? '');
  onTestFinished(() => line.close());
  const first = await start('first', { DATABASE_URL: line.url });
  await first.untilItLeads();
  await untilCoil(true);
  line.cut();
  bench(9);
  await untilCoil(false);
  bench(3);
  await untilCoil(true);

  const second = await start('second');
  await until('the second leads', () => leads(second), 30_000);
  // the second knows of it, the first cannot
  await force(scene, { band: [{ from: '00:00', low: 1.5, high: 2 }] });
  await untilCoil(false);
  await until('the first leaves it', () => first.output.includes('it is left to them'), 20_000);
  const { writes, reads } = await board.state();
  // under its own rule the first would have the fan on all this time
  await until('it is read on', async () => (await board.state()).reads > reads + 100, 20_000);
  expect((await board.state()).writes).toEqual(writes);
}, 90_000);

it('a lone leader whose database falls silent drives on without a gap', async () => {
  await house({ register: 9, withinMs: 3000 });
  const line = await CutLine.to(process.env['DATABASE_URL'] ?? '');
  onTestFinished(() => line.close());
  const only = await start('only', { DATABASE_URL: line.url });
  await only.untilItLeads();
  await untilCoil(true);
  const before = await board.state();
  line.fallSilent();
  const silentFor = (seconds: number) =>
    until(
      `nothing was heard for ${seconds} s`,
      async () => ((await only.health())?.heartbeat ?? 0) > seconds,
      40_000,
    );
  // past the lead's lease (15 s), and past that of the relay (30 s at four times the pace) and its watchdog
  await silentFor(25);
  expect((await board.state()).writes).toEqual(before.writes);
  expect((await board.state()).coils[0]).toBe(true);
  bench(9);
  await untilCoil(false);
  expect((await only.health())?.heartbeat).toBeGreaterThan(25);
  line.mend();
}, 90_000);
