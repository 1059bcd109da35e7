import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { AppTime } from '@/worker/yard/clock';
import { Backlog, keptForS } from '@/worker/yard/backlog';
import { FakeClock, FakeServer, pass, testNode, until, type Connection, type TestNode } from './support';

interface Sent {
  n: string;
  v: number;
  t: number;
}
vi.setConfig({ testTimeout: 40_000 });

let server: FakeServer;
let it: TestNode;
const two = (appMs: number): Array<{ n: string; u: string; v: number }> => [
  { n: 'a', u: 'Cel', v: appMs % 9973 },
  { n: 'b', u: 'Cel', v: appMs % 7919 },
];
const packs = (line: Connection): Sent[][] => line.of('readings').map(({ pack }) => pack as Sent[]);
const stamps = (pack: Sent[]): string[] => pack.map(({ n, t }) => `${n}@${t}`);

beforeEach(async () => {
  server = await FakeServer.open();
  it = testNode(server, { sample: two });
});
afterEach(() => {
  it.node.stop();
  server.close();
});

async function down(line: Connection): Promise<void> {
  line.socket.terminate();
  await until(() => it.log.some(({ event }) => event === 'line down'));
}

describe('readings', () => {
  test('are taken at whole multiples of the interval that the welcome gives', async () => {
    const line = await server.welcomed(it.clock, 0, 10);
    await pass(it.clock, line, 35);
    // The first is taken at the welcome itself; some are sent twice, since nothing is acknowledged here.
    const first = packs(line)[0]?.[0]?.t ?? 0;
    const times = new Set(
      packs(line)
        .flat()
        .map(({ t }) => t),
    );
    times.delete(first);
    expect([...times].every((t) => t % 10 === 0)).toBe(true);
    expect(times.size).toBe(Math.floor((first + 35) / 10) - Math.floor(first / 10));
  });

  test('stay until acknowledged, and leave then', async () => {
    const line = await server.welcomed(it.clock);
    expect(it.node.state().unacknowledged).toBe(2);
    line.acknowledge(line.of('readings')[0]?.seq ?? -1);
    await line.settled();
    expect(it.node.state().unacknowledged).toBe(0);
  });

  test('that were not acknowledged are sent again after a reconnect, with the same stamps and values', async () => {
    const line = await server.welcomed(it.clock);
    await pass(it.clock, line, 40);
    const before = packs(line).flat();
    await down(line);
    it.clock.advance(2_000);
    const next = await server.welcomed(it.clock, 1);
    for (let turn = 0; turn < 3; turn += 1) {
      for (const { seq } of next.of('readings')) next.acknowledge(seq);
      await next.settled();
    }
    const after = packs(next).flat();
    for (const record of before) expect(after).toContainEqual(record);
    expect(it.node.state().unacknowledged).toBe(0);
  });

  test('that were not answered are sent again, even while the line stands', async () => {
    const line = await server.welcomed(it.clock);
    const first = packs(line)[0] ?? [];
    await pass(it.clock, line, 21);
    expect(packs(line).slice(1)).toContainEqual(first);
  });

  test('of a night without a line: the newest of each point first, then the oldest first, 100 a pack', async () => {
    const line = await server.welcomed(it.clock);
    line.acknowledge(line.of('readings')[0]?.seq ?? -1);
    await line.settled();
    await down(line);
    server.connections.length = 0;
    // Six hours of 30 s, two points: 1440 records. The server answers no dial in all that time.
    for (let minute = 0; minute < 360; minute += 1) it.clock.advance(60_000);
    await until(() => server.connections.length > 0);
    const next = await latest();
    const [newest = [], oldest = []] = packs(next);
    expect(newest).toHaveLength(2);
    expect(oldest).toHaveLength(100);
    expect(Math.min(...newest.map(({ t }) => t))).toBeGreaterThan(Math.max(...oldest.map(({ t }) => t)));
    expect(stamps(oldest)).toEqual([...stamps(oldest)].sort((x, y) => timeOf(x) - timeOf(y)));

    const seen = new Set<string>();
    for (let turn = 0; turn < 40 && it.node.state().unacknowledged > 0; turn += 1) {
      for (const { seq, pack } of next.of('readings')) {
        expect(pack.length).toBeLessThanOrEqual(100);
        stamps(pack as Sent[]).forEach((stamp) => seen.add(stamp));
        next.acknowledge(seq);
      }
      await next.settled();
    }
    expect(it.node.state().unacknowledged).toBe(0);
    expect(seen.size).toBe(1440);
  });
});

const timeOf = (stamp: string): number => Number(stamp.split('@')[1]);

/** The connection that is open now, welcomed. */
async function latest(): Promise<Connection> {
  await until(() =>
    server.connections.some(({ socket, frames }) => socket.readyState === socket.OPEN && frames.length > 0),
  );
  const index = server.connections.findIndex(({ socket }) => socket.readyState === socket.OPEN);
  return server.welcomed(it.clock, index);
}

describe('what is kept', () => {
  test('is a day and more of readings, and not without end', () => {
    const backlog = new Backlog();
    const everyS = 30;
    for (let t = 0; t <= keptForS + 3600; t += everyS) backlog.add([{ n: 'a', u: 'Cel', v: 1, t }]);
    expect(backlog.size * everyS).toBeGreaterThanOrEqual(24 * 3600);
    expect(backlog.size * everyS).toBeLessThan(27 * 3600);
  });
});

describe('a node without a clock', () => {
  test('says so, takes its time from the welcome and stamps by it', async () => {
    await server.connection(0);
    it.node.stop();
    const clock = new FakeClock();
    it = testNode(server, { clock, time: new AppTime(clock, 60), rate: 60, sample: two });
    const line = await server.connection(1);
    expect(line.frames[0]).toMatchObject({ type: 'hello', clock: null });
    const now = 1_900_000_020;
    line.send({ type: 'welcome', now, rate: 60, lease: 30, report: 30 });
    await line.settled();
    expect(packs(line)[0]?.[0]?.t).toBe(now);
    clock.advance(1_000);
    await line.settled();
    expect(packs(line).flat().at(-1)?.t).toBe(now + 60);
  });
});
