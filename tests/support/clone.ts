// A database of one's own: a clone of the migrated template, in some fifty milliseconds.
import { randomBytes } from 'node:crypto';
import pg from 'pg';
import { OWNER } from '../../scripts/pg.mjs';

export interface OwnDatabase {
  /** as the app's role */
  url: string;
  /** as the owner of the tables: for setting a scene that the app itself may not set */
  ownerUrl: string;
  drop: () => Promise<void>;
}

/** Any open connection on the template, another clone's too, makes a clone fail; so they queue. */
const LOCK_CLONES = 727_276;

/** The address with another database's name in it. */
export function inDatabase(url: string, name: string): string {
  const address = new URL(url);
  address.pathname = `/${name}`;
  return address.href;
}

/**
 * Clones a database of the test cluster.
 * @param from addresses of the cluster, and the name of the database to clone
 */
export async function cloneDatabase(from: {
  url: string;
  ownerUrl: string;
  adminUrl: string;
  template: string;
  /** name that says which run the clone belongs to, where the template's does not */
  prefix?: string;
}): Promise<OwnDatabase> {
  const run = (from.prefix ?? from.template).split('_')[0] ?? '';
  const name = `${run}_${randomBytes(6).toString('hex')}`;
  await copyDatabase(from.adminUrl, from.template, name);
  return {
    url: inDatabase(from.url, name),
    ownerUrl: inDatabase(from.ownerUrl, name),
    drop: () => dropDatabases(from.adminUrl, [name]),
  };
}

/** Copies a database that nobody is connected to, as the owner's. */
export async function copyDatabase(adminUrl: string, template: string, name: string): Promise<void> {
  await asAdmin(adminUrl, async (admin) => {
    await admin.query('select pg_advisory_lock($1)', [LOCK_CLONES]);
    await admin.query(`create database ${name} template ${template} owner ${OWNER}`);
  });
}

/** With force, which ends the connections that a part or a pool left open; only a superuser may end another role's. */
export async function dropDatabases(adminUrl: string, names: string[]): Promise<void> {
  await asAdmin(adminUrl, async (admin) => {
    for (const name of names) await admin.query(`drop database if exists ${name} with (force)`);
  });
}

export async function asAdmin<T>(adminUrl: string, work: (admin: pg.Client) => Promise<T>): Promise<T> {
  const admin = new pg.Client({ connectionString: adminUrl });
  await admin.connect();
  try {
    return await work(admin);
  } finally {
    await admin.end();
  }
}
