// What of the schema goes into an archive: a table that is added later must be put in, or left out with its reason.
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { getTableConfig, type PgTable } from 'drizzle-orm/pg-core';
import { afterAll, expect, it } from 'vitest';
import { closePools, schema } from '@/db/client';
import { NewIds } from '@/db/queries/archive-ids';
import { ARCHIVE_TABLES, columnsOf, refsOf, STAYS } from '@/db/queries/archive-tables';
import { ROOT } from '../../scripts/places.mjs';

afterAll(closePools);

const tables: [string, PgTable][] = Object.entries(schema);
const ofHoldings = tables.filter(([, table]) =>
  getTableConfig(table).columns.some((column) => column.name === 'holding_id'),
);
const inArchive = new Set(ARCHIVE_TABLES.map((one) => one.name));

it('every table of a holding goes into an archive, or stays here for a reason that is said', () => {
  expect(ofHoldings.length).toBeGreaterThan(35);
  for (const [key, table] of ofHoldings) {
    const { name } = getTableConfig(table);
    expect([inArchive.has(name), key in STAYS], name).toEqual([!(key in STAYS), key in STAYS]);
  }
});

it('a column that holds a hash, a token or a secret goes nowhere', () => {
  const names = ARCHIVE_TABLES.flatMap((one) => columnsOf(one).map((column) => `${one.name}.${column.name}`));
  expect(names.filter((name) => /hash|token|secret|password/.test(name))).toEqual([]);
  expect(names.length).toBeGreaterThan(200);
});

it('every column with an id names a table that comes before its own', () => {
  const before = new Set<string>();
  for (const one of ARCHIVE_TABLES) {
    const refs = refsOf(one);
    for (const { name, columnType } of columnsOf(one)) {
      if (columnType !== 'PgUUID' || name === 'id' || one.outOnly !== undefined) continue;
      expect(before.has(refs.get(name) ?? ''), `${one.name}.${name}`).toBe(true);
    }
    before.add(one.name);
  }
});

it('the document speaks of every table that goes', () => {
  const text = readFileSync(path.join(ROOT, 'docs/archive.md'), 'utf8');
  const told = text.slice(text.indexOf('## Tables'), text.indexOf('## Readings'));
  for (const name of inArchive) expect(told, name).toContain(`\`${name}\``);
});

it('new ids keep the order and the time of the old ones, and differ from import to import', () => {
  const ids = [
    '01a2337a-2f2c-7488-9dd2-64f4192abd75',
    '01a2337a-2f2c-7488-9dd2-68f4192abd75',
    '01a2337a-2f82-764d-bca2-c81048e19bd2',
  ];
  const [one, other] = [new NewIds(Buffer.alloc(32, 1)), new NewIds(Buffer.alloc(32, 2))];
  const renewed = ids.map((id) => one.of(id));
  expect([...renewed].sort()).toEqual(renewed);
  expect(renewed.map((id) => id.slice(0, 13))).toEqual(ids.map((id) => id.slice(0, 13)));
  expect(new Set([...ids, ...renewed, ...ids.map((id) => other.of(id))]).size).toBe(9);
  expect(ids.map((id) => one.of(id))).toEqual(renewed);
});
