// share: processor time of the worker and of PostgreSQL, over the time on the wall, at 10, 100 and 1000 houses whose nodes
// report each 5 s: 1 is one core. Each house is the demo's Long house with fourteen points and four relays, at a node of its own
// that keeps the field protocol. Storage is counted whole: a cluster of its own, as `npm start` makes it (a commit waits for
// the disk), with every process of it. The nodes are played by this process and not counted.
import { execFileSync } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { longHouse } from '@/db/seed/long-house';
import { runMigrations } from '../../scripts/migrate.mjs';
import { ensurePostgres, stopPostgres } from '../../scripts/pg.mjs';
import { anyFree } from '../../scripts/ports.mjs';
import { asAdmin } from '../support/clone';
import { OutsideNode } from '../support/outside-node';
import { round3 } from './support';

const REPORT_MS = 5000;
const WARM_MS = 15_000;
const MEASURED_MS = 60_000;
/** Of the kernel's times in /proc. */
const TICKS_S = Number(execFileSync('getconf', ['CLK_TCK'], { encoding: 'utf8' }));

export async function bench() {
  const dataDir = mkdtempSync(path.join(tmpdir(), 'middenward-scale-'));
  const { url, ownerUrl, adminUrl } = await ensurePostgres({
    dataDir,
    databaseUrl: '',
    port: await anyFree(),
  });
  await runMigrations(ownerUrl);
  // before anything that reads the environment is loaded
  process.env['DATABASE_URL'] = url;
  process.env['DATA_DIR'] = dataDir;
  process.env['AUTH_SECRET'] = 'only-for-benchmarks-only-for-benchmarks-only';
  const { WorkerProcess } = await import('../support/worker-process');
  const { closePools } = await import('@/db/client');
  const nodes: OutsideNode[] = [];
  const timers: NodeJS.Timeout[] = [];
  let clusterFolder = dataDir;
  const worker = await WorkerProcess.start({ LOG_LEVEL: 'warn' });
  try {
    await worker.untilItLeads();
    const { folder, postmaster } = await clusterOf(adminUrl);
    clusterFolder = folder;
    const figures: Record<string, unknown> = {};
    for (const houses of asked()) {
      for (const token of await makeHouses(houses - nodes.length)) {
        const node = await OutsideNode.connect(worker.url, token, 'LH-1');
        nodes.push(node);
        timers.push(reportFrom(node, nodes.length));
      }
      await pause(WARM_MS);
      figures[houses] = await measure(worker.url, worker.pid, postmaster);
    }
    return { share: figures, reportS: REPORT_MS / 1000, points: longHouse.points.length };
  } finally {
    for (const timer of timers) clearInterval(timer);
    for (const node of nodes) node.close();
    await worker.end('SIGTERM');
    await closePools();
    stopPostgres({ dataDir });
    for (const folder of [clusterFolder, dataDir]) rmSync(folder, { recursive: true, force: true });
  }
}

const asked = (): number[] => (process.env['SCALE_HOUSES'] ?? '10,100,1000').split(',').map(Number);

/** Houses of a holding each; the worker is told as by a route. @returns the tokens of their nodes */
async function makeHouses(count: number): Promise<string[]> {
  const { everyHolding } = await import('@/db/client');
  const { writeHouse } = await import('@/db/seed/write-house');
  const { organization } = await import('@/db/schema/auth');
  const { touchPlan } = await import('@/db/queries/plan');
  const tokens: string[] = [];
  for (let one = 0; one < count; one += 1) {
    const id = randomUUID();
    const seeded = await everyHolding().transaction(async (db) => {
      await db.insert(organization).values({ id, name: 'Scale', slug: id });
      const written = await writeHouse({ id, db }, longHouse, 'bench@example.org', new Date('2026-01-01'));
      await touchPlan({ id, db }, written.houseId);
      return written;
    });
    tokens.push(seeded.secrets[0]?.token ?? '');
  }
  return tokens;
}

/** A pack each 5 s, every node at an instant of its own within them. */
function reportFrom(node: OutsideNode, place: number): NodeJS.Timeout {
  const send = () => {
    const t = Date.now() / 1000;
    const swing = Math.sin(t / 900 + place);
    const pack = longHouse.points.map(({ key, unit }) => ({
      ...{ n: key, u: unit, t },
      v: Math.round((valueOf(key) + swing + 0.02 * Math.sin(t * place)) * 16) / 16,
    }));
    node.sendReadings(pack);
    // what it heard is nobody's business here
    node.frames.length = 0;
  };
  send();
  return setInterval(send, REPORT_MS);
}

function valueOf(key: string): number {
  if (key === 'gate-core') return 54;
  if (key === 'gate-base') return 43;
  if (key === 'humidity') return 80;
  if (key === 'light') return 200;
  if (key === 'fan-amps') return 1;
  return key === 'loop-return' ? 16 : 6;
}

async function measure(url: string, worker: number, postmaster: number) {
  const before = {
    at: performance.now(),
    worker: cpuS(worker),
    pg: clusterCpuS(postmaster),
    steps: await steps(url),
  };
  await pause(MEASURED_MS);
  const wallS = (performance.now() - before.at) / 1000;
  const [workerS, pgS] = [cpuS(worker) - before.worker, clusterCpuS(postmaster) - before.pg];
  return {
    all: round3((workerS + pgS) / wallS),
    worker: round3(workerS / wallS),
    postgres: round3(pgS / wallS),
    stepsPerS: round3(((await steps(url)) - before.steps) / wallS),
  };
}

async function steps(url: string): Promise<number> {
  const text = await (await fetch(`${url}/metrics`)).text();
  return Number(/^middenward_readings_stored_total (\d+)$/m.exec(text)?.[1]) / longHouse.points.length;
}

/** Where a cluster lies (a superuser's is not under its data folder), and who is the parent of its processes. */
function clusterOf(adminUrl: string): Promise<{ folder: string; postmaster: number }> {
  return asAdmin(adminUrl, async (admin) => {
    const { rows } = await admin.query<{ folder: string; pid: number }>(
      `select current_setting('data_directory') as folder, pg_backend_pid() as pid`,
    );
    const [row] = rows;
    if (row === undefined) throw new Error('The cluster does not answer.');
    return { folder: row.folder, postmaster: statOf(row.pid).parent };
  });
}

/** User and system time of a process, its ended children's included. */
function cpuS(pid: number): number {
  return statOf(pid).cpuS;
}

function statOf(pid: number): { parent: number; cpuS: number } {
  const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
  // the name before the last bracket may hold spaces
  const fields = stat
    .slice(stat.lastIndexOf(')') + 2)
    .split(' ')
    .map(Number);
  const ticks = fields.slice(11, 15).reduce((sum, one) => sum + one, 0);
  return { parent: fields[1] ?? 0, cpuS: ticks / TICKS_S };
}

/** The postmaster, whose children are all the rest of a cluster. */
function clusterCpuS(postmaster: number): number {
  let sum = cpuS(postmaster);
  for (const name of readdirSync('/proc')) {
    if (!/^\d+$/.test(name)) continue;
    try {
      const { parent, cpuS: own } = statOf(Number(name));
      if (parent === postmaster) sum += own;
    } catch {
      // it ended while we looked: its time is the postmaster's by now
    }
  }
  return sum;
}
