// The whole program as built, on a database of its own: door, web, worker and, if asked for, the yard.
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { inject } from 'vitest';
import { build, PROGRAMS } from '../../scripts/build.mjs';
import { DOOR, doorArguments, partsEnvironment } from '../../scripts/parts.mjs';
import { ROOT } from '../../scripts/places.mjs';
import { severalFree } from '../../scripts/ports.mjs';
import { cloneDatabase } from './clone';
import type { Cluster } from './cluster';
import { DEMO_PASSWORD, seededDatabase, TEST_SECRET } from './demo';
import { until } from './until';

export interface AppOptions {
  /** The simulated yard with its nodes; default false. */
  yard?: boolean;
  rate?: number;
  /** The demo holdings, with so many nights of history; false for an empty database. Default three nights. */
  seed?: false | { nights: number };
  /** Loopback ports of stand-by workers, which the test itself starts. */
  standbyPorts?: number[];
  /** More environment for the parts, over the usual. */
  env?: Record<string, string>;
}

export type PartName = 'web' | 'worker' | 'yard';

export interface RunningApp {
  /** Origin of pages, interface, /field/v1 and /live. */
  url: string;
  /** Of every demo sign-in. */
  password: string;
  databaseUrl: string;
  ownerUrl: string;
  dataDir: string;
  doorPid: number;
  workerPort: number;
  /** Process id of a part as it runs now, or null while it is down. A part that was restarted has another. */
  pid: (part: PartName) => number | null;
  /** What the door has printed. */
  output: () => string;
  /** A part's log so far. */
  log: (part: PartName) => string;
  stop: () => Promise<void>;
}

const READY_LIMIT_MS = 180_000;

/** Starts the program and waits until it says that it is ready. The pages must have been built (`npm run build`). */
export async function startApp(
  options: AppOptions = {},
  cluster: Cluster = inject('cluster'),
): Promise<RunningApp> {
  if (!existsSync(path.join(ROOT, '.next', 'BUILD_ID'))) {
    throw new Error('The pages are not built: npm run build');
  }
  await build(Object.keys(PROGRAMS));
  const { yard = false, rate = 1, seed = { nights: 3 }, standbyPorts = [] } = options;
  const dataDir = mkdtempSync(path.join(tmpdir(), 'middenward-app-'));
  const database =
    seed === false
      ? await cloneDatabase(cluster)
      : await seededDatabase(cluster, { nights: seed.nights, rate, dataDir });
  const [port = 0, webPort = 0, workerPort = 0, mailPort = 0, trainingPort = 0] = await severalFree(5);
  const url = `http://localhost:${port}`;
  const parts = { webPort, workerPort, mailPort, trainingPort, yard, rate, dataDir, standbyPorts };

  const door = spawn(process.execPath, [DOOR, ...doorArguments({ ...parts, port, portFixed: true })], {
    cwd: ROOT,
    stdio: ['ignore', 'pipe', 'pipe'],
    env: {
      PATH: process.env['PATH'],
      HOME: process.env['HOME'],
      SIGN_IN_LIMIT: '1000', // tests sign in more often than people; the limit has tests of its own
      ...partsEnvironment({ ...parts, databaseUrl: database.url, authSecret: TEST_SECRET, publicUrl: url }),
      ...options.env,
      NODE_ENV: 'production',
    },
  });
  let output = '';
  for (const stream of [door.stdout, door.stderr]) {
    stream.on('data', (chunk: Buffer) => {
      output += chunk.toString();
    });
  }
  const ended = once(door, 'exit');
  const log = (part: PartName) => {
    const file = path.join(dataDir, 'logs', `${part}.log`);
    return existsSync(file) ? readFileSync(file, 'utf8') : '';
  };

  async function stop() {
    if (door.exitCode === null && door.signalCode === null) {
      door.kill('SIGTERM');
      await ended;
    }
    await database.drop();
    rmSync(dataDir, { recursive: true, force: true });
  }

  try {
    const gone = () => door.exitCode !== null || door.signalCode !== null;
    await until('ready', () => gone() || output.includes('Middenward is ready at '), READY_LIMIT_MS);
    if (gone()) throw new Error('The door ended before it was ready.');
  } catch (error) {
    const logs = (['web', 'worker', 'yard'] as const).map((part) => `— ${part}\n${log(part).slice(-2000)}`);
    await stop();
    throw new Error(`The program did not become ready.\n${output}\n${logs.join('\n')}`, { cause: error });
  }

  return {
    url,
    password: DEMO_PASSWORD,
    databaseUrl: database.url,
    ownerUrl: database.ownerUrl,
    dataDir,
    doorPid: door.pid ?? 0,
    workerPort,
    pid: (part) => childNamed(door.pid ?? 0, part),
    output: () => output,
    log,
    stop,
  };
}

const COMMANDS: Record<PartName, RegExp> = { web: /next/, worker: /worker\.mjs/, yard: /yard\.mjs/ };

function childNamed(parent: number, part: PartName): number | null {
  for (const pid of readdirSync('/proc').filter((name) => /^\d+$/.test(name))) {
    try {
      // the second field is the command in brackets, which may hold blanks; the parent's id is the fourth
      const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
      const parentPid = Number(stat.slice(stat.lastIndexOf(')') + 2).split(' ')[1]);
      if (parentPid !== parent) continue;
      if (COMMANDS[part].test(readFileSync(`/proc/${pid}/cmdline`, 'utf8'))) return Number(pid);
    } catch {
      continue; // it ended while we looked
    }
  }
  return null;
}
