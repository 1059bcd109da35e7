// Behind the queries' own clauses the database itself keeps holdings apart.
import { sql } from 'drizzle-orm';
import pg from 'pg';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { closePools, inHolding, everyHolding } from '@/db/client';
import { createHolding } from '@/db/queries/people';
import { createHouse } from '@/db/queries/house';
import { addAudit } from '@/db/queries/audit';
import { HouseCreate } from '@/lib/schema/house';
import { appUrl, ownerUrl } from '../support/own-database-address';

const house = HouseCreate.parse({ name: 'House', zone: 'Europe/London', latitude: 54, longitude: -2 });
let larkmoor: string;
let stonebeck: string;
let bare: pg.Client;
beforeAll(async () => {
  larkmoor = await createHolding('Larkmoor', 'larkmoor');
  stonebeck = await createHolding('Stonebeck', 'stonebeck');
  for (const id of [larkmoor, stonebeck]) {
    await inHolding(id, async (holding) => {
      await createHouse(holding, house, new Date());
      await addAudit(holding, { at: new Date(), by: 'test', action: 'test', subject: id, detail: {} });
    });
  }
  bare = new pg.Client({ connectionString: appUrl() });
  await bare.connect();
});
afterAll(async () => {
  await bare.end();
  await closePools();
});

/** better-auth's tables and what stands outside any holding; every other table carries one. */
const OUTSIDE = new Set([
  'user',
  'session',
  'account',
  'verification',
  'organization',
  'member',
  'invitation',
]);

async function tablesWithHolding(): Promise<string[]> {
  const { rows } = await bare.query<{ name: string }>(
    `select table_name as name from information_schema.columns where column_name = 'holding_id' and table_schema = 'public'`,
  );
  return rows.map((row) => row.name);
}

test('every table that carries a holding is kept by row security, against its owner too', async () => {
  const { rows } = await bare.query<{ name: string; on: boolean; forced: boolean }>(
    `select relname as name, relrowsecurity as on, relforcerowsecurity as forced from pg_class where relkind in ('r', 'p')`,
  );
  const tables = await tablesWithHolding();
  expect(tables.length).toBeGreaterThan(15);
  for (const name of tables.filter((one) => !OUTSIDE.has(one))) {
    expect(rows.find((row) => row.name === name)).toEqual({ name, on: true, forced: true });
  }
});

test("the app's role is neither owner nor above row security", async () => {
  const { rows } = await bare.query(
    `select rolsuper or rolbypassrls as above, exists (select 1 from pg_class where relname = 'house' and relowner = r.oid) as owns from pg_roles r where rolname = current_user`,
  );
  expect(rows).toEqual([{ above: false, owns: false }]);
});

test('with no holding set there is not one row in any of them', async () => {
  for (const name of await tablesWithHolding()) {
    const { rows } = await bare.query(`select count(*)::int as many from "${name}"`);
    expect([name, rows[0]]).toEqual([name, { many: 0 }]);
  }
});

test('a query without a clause of its own sees its own holding only', async () => {
  const seen = await inHolding(larkmoor, ({ db }) => db.execute(sql`select distinct holding_id from house`));
  expect(seen.rows).toEqual([{ holding_id: larkmoor }]);
  const both = await everyHolding().execute(sql`select count(distinct holding_id)::int as many from house`);
  expect(both.rows).toEqual([{ many: 2 }]);
});

test("a change without a clause of its own touches its own holding only, and another's row cannot be written", async () => {
  await inHolding(larkmoor, ({ db }) => db.execute(sql`update house set name = 'touched'`));
  const rows = await everyHolding().execute(sql`select holding_id, name from house order by name`);
  expect(rows.rows).toEqual([
    { holding_id: stonebeck, name: 'House' },
    { holding_id: larkmoor, name: 'touched' },
  ]);
  const smuggled = inHolding(larkmoor, ({ db }) => createHouse({ id: stonebeck, db }, house, new Date()));
  await expect(smuggled).rejects.toThrow();
});

test('the audit log takes new rows only', async () => {
  const change = inHolding(larkmoor, ({ db }) => db.execute(sql`update audit_log set by = 'nobody'`));
  await expect(change).rejects.toThrow();
  const removal = inHolding(larkmoor, ({ db }) => db.execute(sql`delete from audit_log`));
  await expect(removal).rejects.toThrow();
  const owner = new pg.Client({ connectionString: ownerUrl() });
  await owner.connect();
  await owner.query(`select set_config('app.holding', '*', false)`);
  const { rows } = await owner.query(`select count(*)::int as many from audit_log`);
  await owner.end();
  expect(rows).toEqual([{ many: 2 }]);
});
