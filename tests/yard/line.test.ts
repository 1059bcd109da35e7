import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { FakeServer, pass, testNode, until, type TestNode } from './support';

vi.setConfig({ testTimeout: 40_000 });

let server: FakeServer;
let it: TestNode;
const downs = (): Array<Record<string, unknown>> => it.log.filter(({ event }) => event === 'line down');

beforeEach(async () => {
  server = await FakeServer.open();
  it = testNode(server);
});
afterEach(() => {
  it.node.stop();
  server.close();
});

describe('the line', () => {
  test('is opened with the token in a header and a hello that tells boot, count and clock', async () => {
    const line = await server.connection();
    expect(server.tokens).toEqual(['Bearer mw-test']);
    expect(line.frames[0]).toEqual({
      type: 'hello',
      node: 'LH-1',
      firmware: 'yard 1',
      channels: 4,
      boot: it.node.state().boot,
      clock: it.clock.wallMs() / 1000,
      can: ['fallback'],
    });
  });

  test('carries the relays first after the welcome, and every 10 s', async () => {
    const line = await server.welcomed(it.clock);
    expect(line.frames[1]?.type).toBe('relays');
    const first = line.of('relays').length;
    await pass(it.clock, line, 30);
    expect(line.of('relays').length - first).toBe(3);
  });

  test('counts seq up over all frames, and on over a reconnect', async () => {
    const line = await server.welcomed(it.clock);
    await pass(it.clock, line, 31);
    line.socket.terminate();
    await until(() => downs().length === 1);
    it.clock.advance(2_000);
    const next = await server.welcomed(it.clock, 1);
    const seqs = [...line.frames, ...next.frames].flatMap((frame) => ('seq' in frame ? [frame.seq] : []));
    expect(seqs).toEqual(seqs.map((_seq, index) => index + 1));
  });

  test('that was taken over is not dialled again for 60 s', async () => {
    const line = await server.welcomed(it.clock);
    line.socket.close(4001, 'taken over');
    await until(() => downs().length === 1);
    expect(downs()[0]).toMatchObject({ code: 4001, againInMs: 60_000 });
    it.clock.advance(59_000);
    for (let turn = 0; turn < 50; turn += 1) await new Promise((resolve) => setImmediate(resolve));
    expect(server.connections).toHaveLength(1);
    it.clock.advance(1_000);
    await server.connection(1);
  });

  test('that fails again and again is dialled after 1 to 30 s, drawn at random', async () => {
    for (let index = 0; index < 8; index += 1) {
      (await server.connection(index)).socket.terminate();
      await until(() => downs().length === index + 1);
      it.clock.advance(Number(downs()[index]?.['againInMs']) + 1);
    }
    // Random is a half in these tests: half way between 1 s and a bound of 2, 4, 8, 16, 30, 30 s.
    expect(downs().map(({ againInMs }) => againInMs)).toEqual([
      1500, 2500, 4500, 8500, 15500, 15500, 15500, 15500,
    ]);
  });
});

describe('silence', () => {
  test('of 25 s ends the line, which is then dialled again', async () => {
    it.node.stop();
    server.close();
    server = await FakeServer.open(false);
    it = testNode(server);
    await server.welcomed(it.clock);
    it.clock.advance(24_000);
    expect(downs()).toHaveLength(0);
    it.clock.advance(1_000);
    await until(() => downs().length === 1);
    it.clock.advance(2_000);
    await server.connection(1);
  });

  test('is broken by pings: a quiet line stays up', async () => {
    const line = await server.welcomed(it.clock);
    await pass(it.clock, line, 120);
    expect(downs()).toHaveLength(0);
  });
});
