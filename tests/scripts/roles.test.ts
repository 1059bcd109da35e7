import pg from 'pg';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { appUrl, ownerUrl } from '../support/own-database-address';

const app = new pg.Client({ connectionString: appUrl() });
const owner = new pg.Client({ connectionString: ownerUrl() });

beforeAll(async () => {
  await app.connect();
  await owner.connect();
});
afterAll(async () => {
  await app.end();
  await owner.end();
});

it('the app’s role is neither superuser nor free of row-level security', async () => {
  const { rows } = await app.query(
    'select rolsuper, rolbypassrls, rolcreatedb, rolcreaterole from pg_roles where rolname = current_user',
  );
  expect(rows).toEqual([{ rolsuper: false, rolbypassrls: false, rolcreatedb: false, rolcreaterole: false }]);
});

it('the app’s role owns no table, and the owner owns them all', async () => {
  const { rows } = await app.query<{ owner: string }>(
    "select distinct tableowner as owner from pg_tables where schemaname = 'public'",
  );
  const me = await owner.query<{ name: string }>('select current_user as name');
  expect(rows.map((row) => row.owner)).toEqual([me.rows[0]?.name]);
});

it('the app’s role cannot change the schema', async () => {
  await expect(app.query('create table slip (id int)')).rejects.toThrow('permission denied');
});

it('the app’s role may use a table that a later migration makes', async () => {
  await owner.query('create table later (id int)');
  await app.query('insert into later values (1)');
  expect((await app.query('select id from later')).rows).toEqual([{ id: 1 }]);
});
