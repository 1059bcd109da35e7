/** What goes into one commit, and how long it is waited for. On a clock of the test's own. */
import pino from 'pino';
import { beforeEach, describe, expect, it } from 'vitest';
import { GroupWriter } from '@/worker/group-writer';
import { Metrics } from '@/worker/metrics';

interface Item {
  name: string;
  waitMs: number;
  weight?: number;
}

let now = 0;
let timers: { at: number; work: () => void }[] = [];
let commits: { at: number; names: string }[] = [];
let writer: GroupWriter<Item, null>;

const clock = {
  ...{ rate: 1, appNow: () => now, appAt: (at: number) => at, realNow: () => now, monotonicMs: () => now },
  after(ms: number, work: () => void) {
    const timer = { at: now + ms, work };
    timers.push(timer);
    return () => void (timers = timers.filter((one) => one !== timer));
  },
  every: () => () => undefined,
};

/** All that is ready to go on does. */
const turn = () => new Promise<void>((resolve) => setImmediate(resolve));

async function pass(ms: number): Promise<void> {
  for (const end = now + ms; ;) {
    await turn();
    const next = timers.filter(({ at }) => at <= end).sort((a, b) => a.at - b.at)[0];
    if (next === undefined) return void (now = end);
    timers = timers.filter((one) => one !== next);
    now = next.at;
    next.work();
  }
}

beforeEach(async () => {
  now = 1000;
  [timers, commits] = [[], []];
  writer = new GroupWriter<Item, null>(
    { clock, log: pino({ level: 'silent' }), metrics: new Metrics() },
    {
      ...{ name: 'test', groupWeight: 100, heldWeight: 1000, weigh: ({ weight = 1 }: Item) => weight },
      gather: { fullWeight: 10, waitMs: ({ waitMs }) => waitMs },
      write: async (items) => {
        commits.push({ at: now, names: items.map(({ name }) => name).join(' ') });
        await Promise.resolve();
        return items.map(() => null);
      },
    },
  );
  void writer.put({ name: 'first', waitMs: 200 });
  await pass(10);
  expect(commits).toEqual([{ at: 1000, names: 'first' }]);
  commits = [];
});

describe('A commit', () => {
  it('is waited for until the wait since the one before is over, by all that came meanwhile', async () => {
    void writer.put({ name: 'a', waitMs: 200 });
    await pass(100);
    void writer.put({ name: 'b', waitMs: 200 });
    await pass(300);
    expect(commits).toEqual([{ at: 1200, names: 'a b' }]);
  });

  it('comes with the least wait of those in it, and takes the others along in their order', async () => {
    void writer.put({ name: 'a', waitMs: 200 });
    await pass(20);
    void writer.put({ name: 'b', waitMs: 50 });
    await pass(300);
    expect(commits).toEqual([{ at: 1050, names: 'a b' }]);
  });

  it('comes at once for what cannot wait', async () => {
    void writer.put({ name: 'a', waitMs: 200 });
    await pass(20);
    void writer.put({ name: 'b', waitMs: 0 });
    await pass(300);
    expect(commits).toEqual([{ at: 1030, names: 'a b' }]);
  });

  it('comes at once where what waits fills it', async () => {
    void writer.put({ name: 'a', waitMs: 200, weight: 9 });
    await pass(20);
    void writer.put({ name: 'b', waitMs: 200 });
    await pass(300);
    expect(commits).toEqual([{ at: 1030, names: 'a b' }]);
  });
});
