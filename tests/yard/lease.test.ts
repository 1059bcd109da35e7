import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { FakeServer, pass, testNode, until, type Connection, type TestNode } from './support';

vi.setConfig({ testTimeout: 40_000 });

let server: FakeServer;
let it: TestNode;
let line: Connection;
const coil = (relay = 1): string | undefined => it.node.state().channels[String(relay)];
const ignored = (): unknown[] =>
  it.log.filter(({ event }) => event === 'command ignored').map(({ why }) => why);

beforeEach(async () => {
  server = await FakeServer.open();
  it = testNode(server);
  line = await server.welcomed(it.clock);
});
afterEach(() => {
  it.node.stop();
  server.close();
});

async function commanded(
  number: number,
  channels: Record<string, 'on' | 'off'>,
  changes = {},
): Promise<void> {
  line.command(number, channels, changes);
  await line.settled();
}

describe('a lease', () => {
  test('begins with every coil off', () => {
    expect(line.of('relays')[0]).toMatchObject({
      channels: { '1': 'off', '2': 'off', '3': 'off', '4': 'off' },
      number: 0,
      trips: 0,
    });
  });

  test('drops every coil 30 s after the frame that the last command answered, when commands stop', async () => {
    await commanded(7, { '1': 'on', '2': 'on' });
    await pass(it.clock, line, 29);
    expect([coil(1), coil(2)]).toEqual(['on', 'on']);
    await pass(it.clock, line, 1);
    expect([coil(1), coil(2)]).toEqual(['off', 'off']);
    expect(it.log.filter(({ event }) => event === 'trip')).toHaveLength(1);
    expect(line.of('relays').at(-1)).toMatchObject({ channels: { '1': 'off' }, number: 7, trips: 1 });
  });

  test('is not stretched by a command that was held up: it counts from the frame, not from the arrival', async () => {
    const seen = line.seen();
    await pass(it.clock, line, 20);
    await commanded(7, { '1': 'on' }, { seen });
    await pass(it.clock, line, 9);
    expect(coil()).toBe('on');
    await pass(it.clock, line, 1);
    expect(coil()).toBe('off');
  });

  test('that is over when the command comes leaves the coil off, and says why', async () => {
    const seen = line.seen();
    await pass(it.clock, line, 31);
    await commanded(7, { '1': 'on' }, { seen });
    expect(coil()).toBe('off');
    expect(ignored()).toEqual(['it came after its lease']);
  });

  test('is renewed by an equal number, without a new report', async () => {
    await commanded(7, { '1': 'on' });
    await pass(it.clock, line, 20);
    const reports = line.of('relays').length;
    await commanded(7, { '1': 'on' });
    expect(line.of('relays')).toHaveLength(reports);
    await pass(it.clock, line, 25);
    expect(coil()).toBe('on');
  });

  test('longer than 30 s is not granted, whatever a command says', async () => {
    await commanded(7, { '1': 'on' }, { lease: 3600 });
    await pass(it.clock, line, 30);
    expect(coil()).toBe('off');
  });

  test('that ends with no coil on is no trip', async () => {
    await commanded(7, { '1': 'off' });
    await pass(it.clock, line, 40);
    expect(it.node.state().trips).toBe(0);
  });

  test('tells of its trip in a log frame, and the next command drives again', async () => {
    await commanded(7, { '1': 'on' });
    await pass(it.clock, line, 30);
    expect(line.of('log')).toHaveLength(1);
    await commanded(8, { '1': 'on' });
    expect(coil()).toBe('on');
  });

  test('shrinks with the rate: at 10 times it is 3 s of real time', async () => {
    it.node.stop();
    it = testNode(server, { rate: 10 });
    line = await server.welcomed(it.clock, 1);
    await commanded(7, { '1': 'on' });
    it.clock.advance(2_900);
    expect(coil()).toBe('on');
    it.clock.advance(100);
    expect(coil()).toBe('off');
  });
});

describe('a command', () => {
  test('is answered by a report where it changes a coil', async () => {
    await commanded(7, { '1': 'on' });
    expect(line.of('relays').at(-1)).toMatchObject({ channels: { '1': 'on', '2': 'off' }, number: 7 });
  });

  test('with a lower number is refused', async () => {
    await commanded(7, { '1': 'on' });
    await commanded(6, { '1': 'off', '2': 'on' });
    expect([coil(1), coil(2)]).toEqual(['on', 'off']);
    expect(ignored()).toEqual(['a higher number was seen']);
  });

  test('beyond 32 bits is compared whole', async () => {
    await commanded(2 ** 33 + 5, { '1': 'on' });
    await commanded(2 ** 32 + 9, { '1': 'off' });
    expect(coil()).toBe('on');
  });

  test('for another boot is ignored', async () => {
    await commanded(7, { '1': 'on' }, { boot: 'another' });
    expect(coil()).toBe('off');
    expect(ignored()).toEqual(['it is for another boot']);
  });

  test('turns off every relay that it does not name', async () => {
    await commanded(7, { '1': 'on', '2': 'on' });
    await commanded(8, { '2': 'on' });
    expect([coil(1), coil(2)]).toEqual(['off', 'on']);
  });

  test('that answers a frame of a former connection is ignored', async () => {
    const former = line.seen();
    line.socket.terminate();
    await reconnected();
    await commanded(7, { '1': 'on' }, { seen: former });
    expect(coil()).toBe('off');
    expect(ignored()).toEqual(['it answers no relays frame of this connection']);
    await commanded(8, { '1': 'on' });
    expect(coil()).toBe('on');
  });

  test('keeps its coil over a short break of the line, until the lease ends', async () => {
    await commanded(7, { '1': 'on' });
    line.socket.terminate();
    await reconnected();
    expect(coil()).toBe('on');
    it.clock.advance(30_000);
    expect(coil()).toBe('off');
  });
});

async function reconnected(): Promise<void> {
  await until(() => it.log.some(({ event }) => event === 'line down'));
  it.clock.advance(2_000);
  line = await server.welcomed(it.clock, 1);
}

describe('a node that does not run', () => {
  test('is reset by its watchdog after 10 s: coils off, a new boot, driven again after its hello', async () => {
    await commanded(7, { '1': 'on' });
    const boot = it.node.state().boot;
    it.clock.freeze(60_000);
    expect(coil()).toBe('off');
    expect(it.node.state().boot).not.toBe(boot);
    expect(it.log.map(({ event }) => event)).toContain('watchdog');
    await reconnected();
    expect(line.boot()).toBe(it.node.state().boot);
    await commanded(1, { '1': 'on' });
    expect(coil()).toBe('on');
  });

  test('had its coils on for the 10 s of the watchdog and no longer', async () => {
    await commanded(7, { '1': 'on' });
    const fed = it.clock.monotonicMs();
    it.clock.freeze(60_000);
    expect(it.changes.at(-1)).toBe(fed + 10_000);
  });
});
