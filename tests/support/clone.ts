// A database of one's own: a clone of the migrated template, in some fifty milliseconds.
import { randomBytes } from 'node:crypto';
import pg from 'pg';

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
  template: string;
  /** name that says which run the clone belongs to, where the template's does not */
  prefix?: string;
}): Promise<OwnDatabase> {
  const run = (from.prefix ?? from.template).split('_')[0] ?? '';
  const name = `${run}_${randomBytes(6).toString('hex')}`;
  await asOwner(from.ownerUrl, async (owner) => {
    await owner.query('select pg_advisory_lock($1)', [LOCK_CLONES]);
    await owner.query(`create database ${name} template ${from.template}`);
  });
  return {
    url: inDatabase(from.url, name),
    ownerUrl: inDatabase(from.ownerUrl, name),
    drop: () =>
      asOwner(from.ownerUrl, async (owner) => {
        await owner.query(`drop database if exists ${name} with (force)`);
      }),
  };
}

async function asOwner(ownerUrl: string, work: (owner: pg.Client) => Promise<void>) {
  const owner = new pg.Client({ connectionString: ownerUrl });
  await owner.connect();
  try {
    await work(owner);
  } finally {
    await owner.end();
  }
}
