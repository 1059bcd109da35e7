#!/usr/bin/env node
// Brings the schema up to this code, as the owner of the tables, and gives the app's role its rights.
//   node scripts/migrate.mjs            DATABASE_URL, DATA_DIR: see pg.mjs
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import pg from 'pg';
import { APP, ensurePostgres } from './pg.mjs';
import { isCommand, MIGRATIONS } from './places.mjs';
import { CONFIGURATION, giveUp, say, Trouble } from './say.mjs';

const LOCK_MIGRATIONS = 727_275;

/**
 * Applies what is missing, all in one transaction (Drizzle's), so that a kill leaves the old or the new schema whole.
 * Drizzle takes no lock of its own: two that start at once would both apply the same file, so the second waits here.
 * @param {string} ownerUrl
 * @returns {Promise<number>} how many migrations were applied
 */
export async function runMigrations(ownerUrl, folder = MIGRATIONS) {
  const known = knownMigrations(folder);
  const client = new pg.Client({ connectionString: ownerUrl });
  await client.connect();
  try {
    await client.query('select pg_advisory_lock($1)', [LOCK_MIGRATIONS]);
    await client.query("set time zone 'UTC'");
    const before = await applied(client);
    refuseNewer(before, known);
    await migrate(drizzle({ client }), { migrationsFolder: folder });
    await grantToApp(client);
    return (await applied(client)).length - before.length;
  } finally {
    await client.end();
  }
}

function knownMigrations(folder) {
  const journal = path.join(folder, 'meta', '_journal.json');
  if (!existsSync(journal))
    throw new Trouble(`There are no migrations in ${folder}; this copy of the project is not whole.`);
  return JSON.parse(readFileSync(journal, 'utf8')).entries;
}

/** Times at which the applied migrations were written: Drizzle's own mark of a migration. */
async function applied(client) {
  const there = await client.query("select to_regclass('drizzle.__drizzle_migrations') is not null as there");
  if (!there.rows[0].there) return [];
  const { rows } = await client.query(
    'select created_at from drizzle.__drizzle_migrations order by created_at',
  );
  return rows.map((row) => Number(row.created_at));
}

function refuseNewer(inDatabase, known) {
  const newest = inDatabase.at(-1);
  const last = known.at(-1);
  if (newest === undefined || (last !== undefined && newest <= last.when)) return;
  const day = (ms) => new Date(ms).toISOString().slice(0, 16).replace('T', ' ');
  throw new Trouble(
    `The database is newer than this code: its schema is of ${day(newest)} (${inDatabase.length} migrations), ` +
      `the code knows ${last === undefined ? 'none' : `up to ${last.tag} of ${day(last.when)} (${known.length} migrations)`}. ` +
      'Use the newer version of Middenward, or another DATABASE_URL or DATA_DIR.',
    CONFIGURATION,
  );
}

/**
 * The app's role may read and write rows, never change the schema. A table whose comment begins with "append-only"
 * (the audit) takes only new rows. With an outside server there is no such role, and nothing to grant.
 */
async function grantToApp(client) {
  if ((await client.query('select 1 from pg_roles where rolname = $1', [APP])).rowCount === 0) return;
  await client.query('begin');
  await client.query(`grant usage on schema public, drizzle to ${APP}`);
  await client.query(`grant select on all tables in schema drizzle to ${APP}`);
  await client.query(`grant select, insert, update, delete on all tables in schema public to ${APP}`);
  await client.query(`grant usage, select on all sequences in schema public to ${APP}`);
  await client.query(
    `alter default privileges in schema public grant select, insert, update, delete on tables to ${APP}`,
  );
  await client.query(`alter default privileges in schema public grant usage, select on sequences to ${APP}`);
  const { rows } = await client.query(
    `select quote_ident(relname) as name from pg_class
     where relnamespace = 'public'::regnamespace and relkind in ('r', 'p')
       and obj_description(oid, 'pg_class') like 'append-only%'`,
  );
  for (const { name } of rows)
    await client.query(`revoke update, delete, truncate on public.${name} from ${APP}`);
  await client.query('commit');
}

async function command() {
  const { ownerUrl } = await ensurePostgres();
  const count = await runMigrations(ownerUrl);
  say(count === 0 ? 'schema … already there' : `schema: ${count} migration${count === 1 ? '' : 's'} applied`);
}

if (isCommand(import.meta.url)) command().catch(giveUp);
