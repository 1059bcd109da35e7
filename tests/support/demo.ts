// A database with the demo holdings. Seeding takes seconds, so a seeded one is kept for half an hour and cloned.
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  cpSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import path from 'node:path';
import type pg from 'pg';
import { partsEnvironment } from '../../scripts/parts.mjs';
import { BUILD, ROOT } from '../../scripts/places.mjs';
import { asAdmin, cloneDatabase, copyDatabase, dropDatabases, inDatabase, type OwnDatabase } from './clone';
import type { Cluster } from './cluster';

export const DEMO_PASSWORD = 'only-for-tests-larkmoor';
export const TEST_SECRET = 'only-for-tests-only-for-tests-only-for-tests';

const KEPT = path.join(ROOT, '.data-test', 'demo');
/** An older history would end too long before now. */
const KEPT_FOR_MS = 30 * 60_000;
const LOCK_SEEDING = 727_277;

interface Wanted {
  nights: number;
  rate: number;
  /** The app's data folder: the yard's settings and state are put there. */
  dataDir: string;
}

export async function seededDatabase(cluster: Cluster, wanted: Wanted): Promise<OwnDatabase> {
  if (wanted.rate !== 1) {
    // a clock at another rate has run on since the seeding, by hours in a minute: it cannot be kept
    const database = await cloneDatabase(cluster);
    await seed(database.url, wanted, wanted.dataDir);
    return database;
  }
  const name = await keptDemo(cluster, wanted.nights);
  const database = await cloneDatabase({ ...cluster, template: name, prefix: cluster.template });
  cpSync(path.join(KEPT, name), wanted.dataDir, { recursive: true });
  moveYard(wanted.dataDir);
  return database;
}

async function keptDemo(cluster: Cluster, nights: number): Promise<string> {
  return asAdmin(cluster.adminUrl, async (admin) => {
    await admin.query('select pg_advisory_lock($1)', [LOCK_SEEDING]);
    await dropOld(admin);
    const name = `demo_${sourcesHash()}_${nights}`;
    const folder = path.join(KEPT, name);
    const { rowCount } = await admin.query('select 1 from pg_database where datname = $1', [name]);
    if (rowCount === 1 && existsSync(folder)) return name;
    await dropDatabases(cluster.adminUrl, [name]);
    await copyDatabase(cluster.adminUrl, cluster.template, name);
    rmSync(folder, { recursive: true, force: true });
    mkdirSync(folder, { recursive: true });
    try {
      await seed(inDatabase(cluster.url, name), { nights, rate: 1 }, folder);
    } catch (error) {
      rmSync(folder, { recursive: true, force: true });
      throw error;
    }
    return name;
  });
}

async function dropOld(admin: pg.Client) {
  const { rows } = await admin.query<{ datname: string }>(
    "select datname from pg_database where datname ~ '^demo_'",
  );
  for (const { datname } of rows) {
    const folder = path.join(KEPT, datname);
    if (existsSync(folder) && Date.now() - statSync(folder).ctimeMs < KEPT_FOR_MS) continue;
    await admin.query(`drop database if exists ${datname} with (force)`);
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Another schema or another seed makes another demo. */
function sourcesHash(): string {
  const migrations = path.join(ROOT, 'db', 'migrations');
  const files = readdirSync(migrations).filter((file) => file.endsWith('.sql'));
  const hash = createHash('sha256').update(readFileSync(path.join(BUILD, 'seed.mjs')));
  for (const file of files.sort()) hash.update(readFileSync(path.join(migrations, file)));
  return hash.digest('hex').slice(0, 12);
}

async function seed(
  databaseUrl: string,
  { nights, rate }: { nights: number; rate: number },
  dataDir: string,
) {
  const child = spawn(
    process.execPath,
    ['--enable-source-maps', path.join(BUILD, 'seed.mjs'), '--nights', String(nights)],
    {
      cwd: ROOT,
      stdio: ['ignore', 'pipe', 'pipe'],
      env: {
        PATH: process.env['PATH'],
        DEMO_PASSWORD,
        ...partsEnvironment({
          ...{ databaseUrl, dataDir, authSecret: TEST_SECRET, publicUrl: 'http://localhost:3000' },
          ...{ webPort: 3001, workerPort: 3002, mailPort: 3025, rate, yard: false },
        }),
      },
    },
  );
  let output = '';
  for (const stream of [child.stdout, child.stderr]) {
    stream.on('data', (chunk: Buffer) => {
      output += chunk.toString();
    });
  }
  const code = await new Promise((resolve) => child.once('close', resolve));
  if (code !== 0) throw new Error(`The seed ended with ${String(code)}.\n${output}`);
}

/** The yard's settings name the file of its state; a copy must write into its own. */
function moveYard(dataDir: string) {
  const file = path.join(dataDir, 'yard.json');
  const yard: unknown = JSON.parse(readFileSync(file, 'utf8'));
  if (typeof yard !== 'object' || yard === null) throw new Error(`${file} is not the yard’s settings`);
  writeFileSync(file, JSON.stringify({ ...yard, stateFile: path.join(dataDir, 'yard-state.json') }), {
    mode: 0o600,
  });
}
