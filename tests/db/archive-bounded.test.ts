// An archive is made no faster than it is taken, and is of one moment however long that lasts.
import { afterAll, beforeAll, expect, it } from 'vitest';
import { closePools, everyHolding, everyPool, type Holding } from '@/db/client';
import { createHolding } from '@/db/queries/people';
import { makeReadingMonth } from '@/db/queries/reading-write';
import { ArchiveSnapshot } from '@/db/queries/archive-out';
import { ARCHIVE_TABLES } from '@/db/queries/archive-tables';
import { longHouse } from '@/db/seed/long-house';
import { writeHouse } from '@/db/seed/write-house';
import { packed, type Packing } from '@/lib/server/archive-pack';
import { manifestOf, unzipped } from '../support/archive-zip';
import { until } from '../support/until';

const FROM = Date.parse('2026-11-01T00:00:00Z');
const STEPS = 40_000;
let holding: Holding;
let readings: number;

beforeAll(async () => {
  holding = { id: await createHolding('Larkmoor Growers', 'larkmoor'), db: everyHolding() };
  await writeHouse(holding, longHouse, 'owner@larkmoor.example', new Date(FROM));
  await makeReadingMonth(everyPool(), FROM);
  const { rowCount } = await everyPool().query(
    `insert into reading (point, at, value, quality)
     select number, to_timestamp($1::bigint / 1000 + step * 30), step % 977 / 8.0, 0
     from point cross join generate_series(0, $2::int - 1) step`,
    [FROM, STEPS],
  );
  readings = rowCount ?? 0;
}, 60_000);
afterAll(closePools);

it('who takes no more of it is given no more: what was read ahead is a small part of the whole', async () => {
  const packing: Packing = { rows: 0, ofRows: 0, bytes: 0 };
  const parts = packed(holding.id, new Date(FROM), packing);
  const parted: Uint8Array[] = [];
  while (packing.rows < 1000) parted.push((await parts.next()).value as Uint8Array);
  let before = -1;
  await until('nothing more is read', () => {
    const isStill = packing.rows === before;
    before = packing.rows;
    return isStill;
  });
  expect(packing.ofRows).toBeGreaterThan(readings);
  expect(packing.rows).toBeLessThan(readings / 4);
  // the live readings' next month must not wait for somebody who fetches slowly
  await makeReadingMonth(everyPool(), Date.parse('2027-03-01T00:00:00Z'));
  // written after the snapshot was taken
  await everyPool().query('update house set name = $1 where holding_id = $2', ['Renamed', holding.id]);
  await everyPool().query('delete from reading where at >= $1', [new Date(FROM + 3_600_000)]);
  for await (const part of { [Symbol.asyncIterator]: () => parts }) parted.push(part);
  const files = await unzipped(Buffer.concat(parted));
  expect(manifestOf(files).files.find(({ path }) => path.startsWith('readings/'))?.rows).toBe(readings);
  expect(files.get('tables/house.jsonl')?.toString()).toContain('"name":"Long house"');
  expect(packing.rows).toBe(packing.ofRows + 1);
}, 60_000);

it.each([
  ['at the beginning', 0],
  ['among the readings', 1000],
])('who goes away %s leaves no snapshot behind', async (_where, rows) => {
  const packing: Packing = { rows: 0, ofRows: 0, bytes: 0 };
  const parts = packed(holding.id, new Date(FROM), packing);
  do await parts.next();
  while (packing.rows < rows);
  await parts.return(undefined);
  const isGone = async () => {
    const { rows } = await everyPool().query<{ open: number }>(
      `select count(*)::int as open from pg_stat_activity where datname = current_database() and backend_xmin is not null
         and pid <> pg_backend_pid()`,
    );
    return rows[0]?.open === 0;
  };
  await expect(until('the connection is gone', isGone)).resolves.toBeUndefined();
});

it('a table that is asked for as its connection goes is told so to whoever reads it later, and ends nothing else', async () => {
  const snapshot = await ArchiveSnapshot.take(holding.id);
  const [first] = ARCHIVE_TABLES;
  if (first === undefined) throw new Error('an archive has no table');
  const ended = snapshot.end();
  const table = snapshot.table(first);
  await ended;
  // a turn of the loop on, the error has come with nobody there to hear it
  await new Promise((resolve) => {
    setImmediate(resolve);
  });
  const read = async () => {
    for await (const part of table) expect(part).toBeInstanceOf(Buffer);
  };
  await expect(read()).rejects.toThrow();
});
