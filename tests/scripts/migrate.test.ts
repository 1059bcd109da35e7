import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { runMigrations } from '../../scripts/migrate.mjs';
import { inDatabase } from '../support/clone';

const owner = new pg.Client({ connectionString: inject('cluster').ownerUrl });
beforeAll(() => owner.connect());
afterAll(() => owner.end());

let name: string;
let folder: string;
beforeEach(async () => {
  name = `t${process.pid}_migrations`;
  await owner.query(`create database ${name}`);
  folder = mkdtempSync(path.join(tmpdir(), 'middenward-migrations-'));
  mkdirSync(path.join(folder, 'meta'));
});
afterEach(async () => {
  await owner.query(`drop database ${name} with (force)`);
  rmSync(folder, { recursive: true, force: true });
});

function migrations(...sqls: string[]) {
  const entries = sqls.map((sql, idx) => {
    const tag = `000${idx}_step`;
    writeFileSync(path.join(folder, `${tag}.sql`), sql);
    return { idx, tag, version: '7', when: 1_700_000_000_000 + idx * 86_400_000, breakpoints: true };
  });
  const journal = { version: '7', dialect: 'postgresql', entries };
  writeFileSync(path.join(folder, 'meta', '_journal.json'), JSON.stringify(journal));
}

const run = () => runMigrations(inDatabase(inject('cluster').ownerUrl, name), folder);

async function as<T>(url: string, work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client({ connectionString: inDatabase(url, name) });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

it('two that start at once apply each migration once', async () => {
  migrations('create table a (id int)', 'create table b (id int)');
  expect((await Promise.all([run(), run()])).sort()).toEqual([0, 2]);
});

it('a migration that fails leaves the old schema whole', async () => {
  migrations(
    'create table a (id int)',
    'create table b (id int); --> statement-breakpoint\ncreate gibberish',
  );
  await expect(run()).rejects.toThrow();
  const there = await as(inject('cluster').ownerUrl, (client) =>
    client.query("select to_regclass('a') as a, to_regclass('b') as b"),
  );
  expect(there.rows).toEqual([{ a: null, b: null }]);
});

it('a schema newer than the code is refused with 78, naming both', async () => {
  migrations('create table a (id int)', 'create table b (id int)');
  await run();
  migrations('create table a (id int)');
  await expect(run()).rejects.toMatchObject({
    code: 78,
    message: expect.stringMatching(
      /schema is of 2023-11-15 22:13 \(2 migrations\).*up to 0000_step of 2023-11-14 22:13/,
    ) as string,
  });
});

describe('a table that is append-only', () => {
  beforeEach(async () => {
    migrations("create table trail (id int); comment on table trail is 'append-only: what people did';");
    await run();
  });

  it('takes rows from the app', async () => {
    await as(inject('cluster').url, (app) => app.query('insert into trail values (1)'));
  });

  it.each(['update trail set id = 2', 'delete from trail', 'truncate trail'])(
    'refuses the app: %s',
    async (sql) => {
      await as(inject('cluster').url, (app) => expect(app.query(sql)).rejects.toThrow('permission denied'));
    },
  );
});
