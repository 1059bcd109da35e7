// ofCopy: readings a second through the field socket to committed and acknowledged ÷ raw COPY of as many rows in commit
// batches of the same size. Four nodes, packs of 100 records, a few packs under way at once, as after an outage.
import { once } from 'node:events';
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { WebSocket } from 'ws';
import { cloneDatabase } from '../support/clone';
import { makeTemplate, releaseTemplate } from '../support/cluster';
import { rawText } from '@/worker/raw-text';
import { ratio, round3 } from './support';

const NODES = 4;
const PACKS = 60;
const UNDER_WAY = 8;
const RECORDS = 100;
const ROWS = NODES * PACKS * RECORDS;
const POINTS = ['bench-1', 'house-air', 'core'];
/** Rows of one point lie a second apart; each round goes on where the last one ended. */
const STEP_S = 1;

export async function bench() {
  const cluster = await makeTemplate();
  const database = await cloneDatabase(cluster);
  // before anything that reads the environment is loaded
  process.env['DATABASE_URL'] = database.url;
  process.env['DATA_DIR'] = mkdtempSync(path.join(tmpdir(), 'middenward-bench-'));
  process.env['AUTH_SECRET'] = 'only-for-benchmarks-only-for-benchmarks-only';
  const { WorkerProcess } = await import('../support/worker-process');
  const { makeScene } = await import('../support/field-scene');
  const { everyPool, closePools } = await import('@/db/client');
  const { storeReadings } = await import('@/db/queries/reading-write');

  const worker = await WorkerProcess.start({ LOG_LEVEL: 'warn' });
  try {
    await worker.untilItLeads();
    const nodes: Sender[] = [];
    for (let count = 0; count < NODES; count += 1) {
      nodes.push(await Sender.join(worker.url, (await makeScene()).token));
    }
    const commits = async () => {
      const text = await (await fetch(`${worker.url}/metrics`)).text();
      return Number(/^middenward_readings_commits_total (\d+)$/m.exec(text)?.[1]);
    };
    let at = Math.floor(Date.now() / 1000) - 20 * 86_400;
    let batches = 1;
    let copied = 0;
    const { raw, ...ofCopy } = await ratio(
      // the baseline first, so that the ratio of times is the ratio of rates
      async () => {
        const rows = Math.ceil(ROWS / batches);
        for (let batch = 0; batch < batches; batch += 1) {
          const first = copied;
          copied += rows;
          await storeReadings(
            everyPool(),
            Array.from({ length: rows }, (_, row) => ({
              point: 1_000_000 + (row % 12),
              at: (at - 5_000_000 + first + row) * 1000,
              value: row % 40,
              quality: 0 as const,
            })),
          );
        }
      },
      async () => {
        const before = await commits();
        await Promise.all(nodes.map((node) => node.sendAll(at)));
        at += Math.ceil((PACKS * RECORDS) / POINTS.length) * STEP_S + 10;
        batches = (await commits()) - before;
      },
    );
    const perS = (ms: number[]) => ms.map((one) => Math.round(ROWS / (one / 1000)));
    return {
      ofCopy,
      readingsPerS: perS(raw.baseline),
      copyPerS: perS(raw.subject),
      rowsACommit: round3(ROWS / batches),
      rows: ROWS,
    };
  } finally {
    await worker.end('SIGTERM');
    await closePools();
    await database.drop();
    await releaseTemplate();
  }
}

/** A node that only sends: a pack more for each acknowledged one. */
class Sender {
  private seq = 0;
  private acknowledged: () => void = () => undefined;

  private constructor(private readonly socket: WebSocket) {
    socket.on('message', (data) => {
      const frame: unknown = JSON.parse(rawText(data));
      if (typeof frame === 'object' && frame !== null && 'type' in frame && frame.type === 'ack')
        this.acknowledged();
    });
  }

  static async join(url: string, token: string): Promise<Sender> {
    const socket = new WebSocket(`${url.replace('http', 'ws')}/field/v1`, {
      headers: { authorization: `Bearer ${token}` },
    });
    await once(socket, 'open');
    const hello = { type: 'hello', node: 'N-1', firmware: 'bench', channels: 4, boot: 'bench', clock: null };
    socket.send(JSON.stringify(hello));
    return new Sender(socket);
  }

  async sendAll(fromS: number): Promise<void> {
    let sent = 0;
    let done = 0;
    await new Promise<void>((resolve) => {
      const next = () => {
        if (sent < PACKS) this.sendPack(fromS, sent++);
      };
      this.acknowledged = () => {
        done += 1;
        if (done === PACKS) resolve();
        next();
      };
      for (let count = 0; count < UNDER_WAY; count += 1) next();
    });
  }

  private sendPack(fromS: number, index: number): void {
    const pack = Array.from({ length: RECORDS }, (_, record) => {
      const row = index * RECORDS + record;
      const t = fromS + Math.floor(row / POINTS.length) * STEP_S;
      return { n: POINTS[row % POINTS.length], u: 'Cel', t, v: 5 + (row % 7) / 10 };
    });
    this.socket.send(JSON.stringify({ type: 'readings', seq: ++this.seq, pack }));
  }
}
