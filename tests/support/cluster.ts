// One PostgreSQL for all tests, in a data folder of its own, with one migrated database to clone.
import path from 'node:path';
import pg from 'pg';
import type { TestProject } from 'vitest/node';
import { runMigrations } from '../../scripts/migrate.mjs';
import { ensurePostgres } from '../../scripts/pg.mjs';
import { ROOT } from '../../scripts/places.mjs';
import { inDatabase } from './clone';

declare module 'vitest' {
  export interface ProvidedContext {
    /** addresses of the test cluster, and the name of the migrated database that is cloned for each file */
    cluster: Cluster;
  }
}

export interface Cluster {
  url: string;
  ownerUrl: string;
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
  if (made !== undefined) await dropDatabasesOf((await made).ownerUrl, process.pid);
  made = undefined;
}

/** The cluster with its migrated template: made at the first call in this process, the same afterwards. */
export function makeTemplate(): Promise<Cluster> {
  made ??= newTemplate();
  return made;
}

async function newTemplate(): Promise<Cluster> {
  // DATABASE_URL is left aside on purpose: tests drop databases, which nobody wants on a server that is in use
  const { url, ownerUrl } = await ensurePostgres({
    dataDir: TEST_DATA,
    databaseUrl: '',
    fast: true,
    port: TEST_PORT,
  });
  await dropStale(ownerUrl);
  const template = `t${process.pid}_template`;
  const owner = new pg.Client({ connectionString: ownerUrl });
  await owner.connect();
  try {
    await owner.query(`drop database if exists ${template} with (force)`);
    await owner.query(`create database ${template}`);
  } finally {
    await owner.end();
  }
  await runMigrations(inDatabase(ownerUrl, template));
  return { url, ownerUrl, template };
}

/** Databases of runs that were killed: their names begin with the process that made them. */
async function dropStale(ownerUrl: string) {
  for (const pid of await runsWithDatabases(ownerUrl))
    if (!isAlive(pid)) await dropDatabasesOf(ownerUrl, pid);
}

async function runsWithDatabases(ownerUrl: string): Promise<Set<number>> {
  const names = await databases(ownerUrl, '^t[0-9]+_');
  return new Set(names.map((name) => Number(/^t(\d+)_/.exec(name)?.[1])));
}

async function dropDatabasesOf(ownerUrl: string, pid: number) {
  const names = await databases(ownerUrl, `^t${pid}_`);
  const owner = new pg.Client({ connectionString: ownerUrl });
  await owner.connect();
  try {
    for (const name of names) await owner.query(`drop database if exists ${name} with (force)`);
  } finally {
    await owner.end();
  }
}

async function databases(ownerUrl: string, pattern: string): Promise<string[]> {
  const owner = new pg.Client({ connectionString: ownerUrl });
  await owner.connect();
  try {
    const { rows } = await owner.query<{ datname: string }>(
      'select datname from pg_database where datname ~ $1',
      [pattern],
    );
    return rows.map((row) => row.datname);
  } finally {
    await owner.end();
  }
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM'; // alive, and another user's
  }
}
