// The worker itself, in this process, on the test file's database and a port of its own.
import type { AddressInfo } from 'node:net';
import { randomUUID } from 'node:crypto';
import { everyHolding, everyPool } from '@/db/client';
import { log } from '@/lib/server/log';
import { startClock, type Clock } from '@/worker/clock';
import { Metrics } from '@/worker/metrics';
import { startWorker } from '@/worker/worker';
import { until } from './until';

interface Health {
  leader: boolean;
  epoch: number | null;
  database: boolean;
  field: { nodes: number };
}

export interface OwnWorker {
  url: string;
  health: () => Promise<Health>;
  metrics: Metrics;
  stop: () => Promise<void>;
}

/**
 * @param waits for it to lead; a stand-by does not
 * @param rate app seconds a real second
 * @param hurry spans and timers of the worker pass so many times as fast: what is promised in real time need not be waited for
 */
export async function ownWorker(
  waits = true,
  instance: string = randomUUID(),
  rate = 1,
  hurry = 1,
): Promise<OwnWorker> {
  const metrics = new Metrics();
  const base = {
    clock: hurried(await startClock({ rate }), hurry),
    log: log(),
    db: everyHolding(),
    pool: everyPool(),
    metrics,
  };
  const worker = await startWorker(base, instance, 0);
  const { port } = worker.server.address() as AddressInfo;
  const url = `http://127.0.0.1:${port}`;
  const health = async () => (await (await fetch(`${url}/health`)).json()) as Health;
  if (waits) await until('the worker leads', async () => (await health()).leader);
  return { url, health, metrics, stop: worker.stop };
}

function hurried(clock: Clock, by: number): Clock {
  return {
    ...clock,
    monotonicMs: () => clock.monotonicMs() * by,
    after: (ms, work) => clock.after(ms / by, work),
    every: (ms, work) => clock.every(ms / by, work),
  };
}
