/** A node that nobody commands: what it does by itself, and how it tells of it. */
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { readFallbackText, type FallbackEntry } from '@/lib/field/fallback-log';
import { AppTime } from '@/worker/yard/clock';
import {
  FakeClock,
  FakeServer,
  flash,
  pass,
  testNode,
  until,
  type Connection,
  type TestNode,
} from './support';

vi.setConfig({ testTimeout: 40_000 });

const fallback = { '1': { point: 'bench-1', below: 2, above: 5, onFor: 600, offFor: 300 } };
let server: FakeServer;
let it: TestNode;
let line: Connection;
let bench: number | null;
const coil = (relay = 1) => it.node.state().channels[String(relay)];
const parts = () => ({
  sample: () => (bench === null ? [] : [{ n: 'bench-1', u: 'Cel', v: bench }]),
});
const told = (): string[] => tellings().map((one) => ('relay' in one ? `${one.what} ${one.why}` : one.what));
const tellings = (): FallbackEntry[] => line.of('log').flatMap(({ text }) => readFallbackText(text) ?? []);

beforeEach(async () => {
  server = await FakeServer.open();
  bench = 1;
  it = testNode(server, parts());
  line = await server.welcomed(it.clock);
});
afterEach(() => {
  it.node.stop();
  server.close();
});

async function commanded(number: number, coils: Record<string, 'on' | 'off'>, more: object = { fallback }) {
  line.command(number, coils, more);
  await line.settled();
}

async function lost(): Promise<void> {
  line.socket.terminate();
  await until(() => it.log.some(({ event }) => event === 'line down'));
}

/** Time goes by without a server that welcomes. */
function away(seconds: number): void {
  for (let passed = 0; passed < seconds; passed += 1) it.clock.advance(1000);
}

async function back(): Promise<void> {
  await until(() => {
    it.clock.advance(100);
    return (server.connections.at(-1)?.of('hello').length ?? 0) > 0 && server.connections.at(-1) !== line;
  });
  line = await server.welcomed(it.clock, server.connections.length - 1);
}

describe('A node that nobody commands', () => {
  test('lets every coil go at the end of its lease, then runs the fallback that the last command brought', async () => {
    await commanded(7, { '1': 'on', '2': 'on' });
    await pass(it.clock, line, 29);
    expect(told()).toEqual([]);
    await pass(it.clock, line, 1);
    expect([coil(1), coil(2)]).toEqual(['on', 'off']);
    expect(line.of('relays').map(({ channels }) => channels['1'])).toContain('off');
    expect(line.of('relays').at(-1)).toMatchObject({ channels: { '1': 'on', '2': 'off' }, trips: 1 });
    expect(told()).toEqual(['begun', 'on below']);
  });

  test('runs it also where no coil was on, and that is no trip', async () => {
    await commanded(7, { '1': 'off' });
    await pass(it.clock, line, 30);
    expect(coil()).toBe('on');
    expect(it.node.state().trips).toBe(0);
  });

  test('is ended by the next command, even a renewal, which decides about the coil', async () => {
    await commanded(7, { '1': 'off' });
    await pass(it.clock, line, 40);
    expect(coil()).toBe('on');
    await commanded(7, { '1': 'off' });
    expect(coil()).toBe('off');
    expect(line.of('relays').at(-1)).toMatchObject({ channels: { '1': 'off' } });
    expect(told()).toEqual(['begun', 'on below', 'off command', 'ended']);
    await pass(it.clock, line, 15);
    expect(coil()).toBe('off');
  });

  test('tells nothing of a coil that the command goes on with', async () => {
    await commanded(7, { '1': 'off' });
    await pass(it.clock, line, 40);
    await commanded(8, { '1': 'on' });
    expect(coil()).toBe('on');
    expect(told()).toEqual(['begun', 'on below', 'ended']);
  });

  test('without a fallback in its last command keeps every coil off', async () => {
    await commanded(7, { '1': 'on' });
    await commanded(8, { '1': 'on' }, {});
    await pass(it.clock, line, 120);
    expect(coil()).toBe('off');
    expect(told()).toEqual([]);
  });

  test('keeps what happened while it was away, and tells it with its own times until that is acknowledged', async () => {
    await commanded(7, { '1': 'off' });
    const from = it.clock.wallMs();
    await lost();
    away(60);
    bench = 6;
    away(30);
    await back();
    expect(told()).toEqual(['begun', 'on below', 'off above']);
    const [begun, on, off] = tellings().map(({ at }) => (at - from) / 1000);
    expect([begun, on]).toEqual([30, 30]);
    expect(off).toBeGreaterThanOrEqual(60);
    expect(off).toBeLessThanOrEqual(66);
    const first = line.of('log').map(({ text }) => text);
    await lost();
    await back();
    expect(line.of('log').map(({ text }) => text)).toEqual(first);
    for (const { seq } of line.of('log')) line.send({ type: 'ack', seq });
    await line.settled();
    await lost();
    await back();
    expect(line.of('log')).toEqual([]);
  });

  test('runs its kept fallback after a restart, once a first command could have come', async () => {
    const kept = flash();
    it.node.stop();
    it = testNode(server, { ...parts(), flash: kept });
    line = await server.welcomed(it.clock, 1);
    await commanded(7, { '1': 'off' });
    it.node.stop();
    const next = testNode(server, { ...parts(), flash: kept });
    it = next;
    await server.connection(2);
    away(29);
    expect(coil()).toBe('off');
    away(1);
    expect(coil()).toBe('on');
  });

  test('that is reset by its watchdog in a run rests first', async () => {
    await commanded(7, { '1': 'off' });
    await pass(it.clock, line, 40);
    expect(coil()).toBe('on');
    it.clock.freeze(60_000);
    expect(coil()).toBe('off');
    away(230);
    expect(coil()).toBe('off');
    away(31);
    expect(coil()).toBe('on');
  });

  test('and does not know the time has no reading to go by', () => {
    it.node.stop();
    const kept = flash();
    kept.write({ fallback: { settings: fallback, spent: [] }, logs: [] });
    const clock = new FakeClock();
    it = testNode(server, { ...parts(), flash: kept, rate: 10, clock, time: new AppTime(clock, 10) });
    for (let passed = 0; passed < 60; passed += 1) clock.advance(1000);
    expect(coil()).toBe('off');
  });
});
