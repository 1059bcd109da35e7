// One PostgreSQL for all tests, in a data folder of its own, with one migrated database to clone.
import path from 'node:path';
import type { TestProject } from 'vitest/node';
import { runMigrations } from '../../scripts/migrate.mjs';
import { ensurePostgres, OWNER } from '../../scripts/pg.mjs';
import { ROOT } from '../../scripts/places.mjs';
import { asAdmin, dropDatabases, inDatabase } from './clone';

declare module 'vitest' {
  export interface ProvidedContext {
    /** addresses of the test cluster, and the name of the migrated database that is cloned for each file */
    cluster: Cluster;
  }
}

export interface Cluster {
  url: string;
  ownerUrl: string;
  /** as superuser: makes and drops databases */
  adminUrl: string;
  template: string;
}

export const TEST_DATA = path.join(ROOT, '.data-test');
const TEST_PORT = 54_330;

// Each vitest project calls its set-up in the same process; the cluster and its template are made once for all.
let made: Promise<Cluster> | undefined;
let users = 0;

export default async function setup(project: TestProject) {
  users += 1;
  project.provide('cluster', await makeTemplate());
  return async () => {
    users -= 1;
    if (users === 0) await releaseTemplate();
  };
}

/** Drops what this process made in the cluster. */
export async function releaseTemplate(): Promise<void> {
  if (made !== undefined) {
    const { adminUrl } = await made;
    await dropDatabases(adminUrl, await databases(adminUrl, `^t${process.pid}_`));
  }
  made = undefined;
}

/** The cluster with its migrated template: made at the first call in this process, the same afterwards. */
export function makeTemplate(): Promise<Cluster> {
  made ??= newTemplate();
  return made;
}

async function newTemplate(): Promise<Cluster> {
  // DATABASE_URL is left aside on purpose: tests drop databases, which nobody wants on a server that is in use
  const { url, ownerUrl, adminUrl } = await ensurePostgres({
    dataDir: TEST_DATA,
    databaseUrl: '',
    fast: true,
    port: TEST_PORT,
  });
  await dropStale(adminUrl);
  const template = `t${process.pid}_template`;
  await dropDatabases(adminUrl, [template]);
  await asAdmin(adminUrl, (admin) => admin.query(`create database ${template} owner ${OWNER}`));
  await runMigrations(inDatabase(ownerUrl, template));
  return { url, ownerUrl, adminUrl, template };
}

/** Databases of runs that were killed: their names begin with the process that made them. */
async function dropStale(adminUrl: string) {
  const all = await databases(adminUrl, '^t[0-9]+_');
  const stale = all.filter((name) => !isAlive(Number(/^t(\d+)_/.exec(name)?.[1])));
  await dropDatabases(adminUrl, stale);
}

function databases(adminUrl: string, pattern: string): Promise<string[]> {
  return asAdmin(adminUrl, async (admin) => {
    const { rows } = await admin.query<{ datname: string }>(
      'select datname from pg_database where datname ~ $1',
      [pattern],
    );
    return rows.map((row) => row.datname);
  });
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM'; // alive, and another user's
  }
}
