/** Rows of an archive's tables, read with suspicion: whatever a row says is checked before the database is asked. */
import type { PgColumn } from 'drizzle-orm/pg-core';
import { PersonRow } from '@/lib/schema/archive';
import { CELLS } from './archive-cells';
import { ARCHIVE_TABLES, columnsOf, refsOf, type ArchiveTable } from './archive-tables';

export type ArchiveRow = Record<string, unknown>;

/** What is wrong with a row, in words that go behind "line 3:". */
export class RowFault extends Error {
  override readonly name = 'RowFault';
}

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;
const INSTANT = /^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d(\.\d{1,6})?(Z|[+-]\d\d:\d\d)$/;
const DAY = /^\d{4}-\d\d-\d\d$/;
const LONGEST_TEXT = 20_000;

const isWhole = (value: unknown, most: number) =>
  typeof value === 'number' && Number.isInteger(value) && Math.abs(value) <= most;
const isTime = (value: unknown, form: RegExp) =>
  typeof value === 'string' &&
  form.test(value) &&
  value >= '1970' &&
  value < '2200' &&
  !Number.isNaN(Date.parse(value));

/** By the schema's kind of column: what it holds, in words, and whether a value is that. */
const KINDS: Record<string, [string, (value: unknown) => boolean]> = {
  PgUUID: ['an id in the form of a UUID', (value) => typeof value === 'string' && UUID.test(value)],
  PgText: ['text', (value) => typeof value === 'string' && value.length <= LONGEST_TEXT],
  PgInteger: ['a whole number', (value) => isWhole(value, 2 ** 31 - 1)],
  PgBigInt53: ['a whole number', (value) => isWhole(value, Number.MAX_SAFE_INTEGER)],
  PgDoublePrecision: ['a number', (value) => typeof value === 'number' && Number.isFinite(value)],
  PgBoolean: ['true or false', (value) => typeof value === 'boolean'],
  PgTimestamp: ['a time in ISO 8601 with its offset', (value) => isTime(value, INSTANT)],
  PgDateString: ['a date as YYYY-MM-DD', (value) => isTime(value, DAY)],
  PgJsonb: ['JSON', (value) => value !== undefined],
  PgArray: [
    'a list of whole numbers',
    (value) => Array.isArray(value) && value.every((one) => isWhole(one, Number.MAX_SAFE_INTEGER)),
  ],
};

interface Reader {
  one: ArchiveTable;
  columns: Map<string, PgColumn>;
  refs: Map<string, string>;
  lastId: string;
}

/** Tables of which other rows speak: their ids are kept while the archive is read. */
const NAMED = new Set(ARCHIVE_TABLES.flatMap((one) => [...refsOf(one).values()]));

export class ArchiveRows {
  private readonly readers = new Map<string, Reader>(
    ARCHIVE_TABLES.map((one) => [
      one.name,
      {
        one,
        columns: new Map(columnsOf(one).map((column) => [column.name, column])),
        refs: refsOf(one),
        lastId: '',
      },
    ]),
  );
  private readonly ids = new Map<string, Set<string>>([...NAMED].map((name) => [name, new Set()]));
  /** Numbers of points, as readings name them. */
  readonly points = new Set<number>();

  /** @param isOlder it was made by an earlier schema: columns that came since take their default */
  constructor(private readonly isOlder: boolean) {}

  /** @throws RowFault */
  read(table: string, text: string): ArchiveRow {
    const reader = this.readers.get(table);
    if (reader === undefined) throw new RowFault(`${table} is no table of an archive.`);
    const row = parsed(text);
    for (const name of Object.keys(row))
      if (!reader.columns.has(name)) throw new RowFault(`${JSON.stringify(name)} is no column of ${table}.`);
    for (const column of reader.columns.values()) this.checkCell(table, row, column);
    for (const [column, of] of reader.refs) this.checkRef(row, column, of);
    this.note(reader, row);
    return row;
  }

  private checkCell(table: string, row: ArchiveRow, column: PgColumn): void {
    const value = row[column.name];
    if (value === undefined && this.isOlder && (!column.notNull || column.hasDefault)) {
      if (!column.notNull) row[column.name] = null;
      return;
    }
    if (value === undefined) throw new RowFault(`${column.name} is missing.`);
    if (value === null) {
      if (column.notNull) throw new RowFault(`${column.name} must not be null.`);
      return;
    }
    const [holds, is] = KINDS[column.columnType] ?? ['nothing known', () => false];
    if (!is(value)) throw new RowFault(`${column.name} must be ${holds}.`);
    const told = CELLS[table]?.[column.name]?.safeParse(value);
    if (told?.success === false)
      throw new RowFault(
        `${column.name} is not valid: ${told.error.issues[0]?.message ?? 'not as it must be'}`,
      );
  }

  private checkRef(row: ArchiveRow, column: string, of: string): void {
    const value = row[column];
    if (typeof value === 'string' && this.ids.get(of)?.has(value) !== true)
      throw new RowFault(`${column} names ${value}, which is no row of tables/${of}.jsonl.`);
  }

  private note(reader: Reader, row: ArchiveRow): void {
    const { one } = reader;
    if (one.byId && typeof row['id'] === 'string') {
      if (row['id'] <= reader.lastId)
        throw new RowFault('Rows must be in the order of their id, each id once.');
      reader.lastId = row['id'];
      this.ids.get(one.name)?.add(row['id']);
    }
    const number = one.name === 'point' ? row['number'] : undefined;
    if (typeof number === 'number') {
      if (this.points.has(number)) throw new RowFault(`Two points have the number ${number}.`);
      this.points.add(number);
    }
    if (one.name === 'import_part' && !this.points.has(Number(row['point'])))
      throw new RowFault(`point names ${String(row['point'])}, which is no number of tables/point.jsonl.`);
  }
}

export function readPerson(text: string): PersonRow {
  const told = PersonRow.safeParse(parsed(text));
  if (told.success) return told.data;
  const [issue] = told.error.issues;
  throw new RowFault(`${issue?.path.join('.') ?? ''}: ${issue?.message ?? 'not valid'}`);
}

function parsed(text: string): ArchiveRow {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    throw new RowFault('This line is not JSON.');
  }
  if (typeof value !== 'object' || value === null || Array.isArray(value))
    throw new RowFault('This line is not an object in JSON.');
  // the database keeps no NUL in text
  if (text.includes('\\u0000')) throw new RowFault('A text holds the character NUL.');
  return { ...value };
}
