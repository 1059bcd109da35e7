/**
 * What goes into an archive, read as the database prints it: rows pass through as bytes, so that a year of readings needs
 * no more memory than a day of them. All of it is one snapshot.
 */
import 'server-only';
import { getTableConfig } from 'drizzle-orm/pg-core';
import type pg from 'pg';
import { to as copyTo } from 'pg-copy-streams';
import { ownConnection } from '@/db/client';
import { READINGS_HEAD } from '@/lib/schema/archive';
import { ARCHIVE_TABLES, columnsOf, type ArchiveTable } from './archive-tables';

const OWN = `holding_id = current_setting('app.holding')::uuid`;
/** A line as it is: JSON escapes both of these characters, so none is quoted. */
const RAW_LINES = `(format csv, delimiter e'\\x02', quote e'\\x01')`;

const quoted = (name: string) => `"${name}"`;

function whereOf({ only }: ArchiveTable): string {
  return only === undefined ? OWN : `${OWN} and ${only}`;
}

function orderOf({ table, byId }: ArchiveTable): string {
  const keys = getTableConfig(table).primaryKeys.flatMap((key) => key.columns.map((column) => column.name));
  const names = byId ? ['id'] : keys.filter((name) => name !== 'holding_id');
  return names.length === 0 ? '' : `order by ${names.map(quoted).join()}`;
}

export class ArchiveSnapshot {
  private constructor(
    private readonly client: pg.Client,
    readonly holding: { name: string; slug: string },
    readonly schemaNumber: number,
    private readonly points: readonly number[],
  ) {}

  /** Row security holds it to the holding, besides the clauses here. */
  static async take(holdingId: string): Promise<ArchiveSnapshot> {
    const client = await ownConnection(holdingId);
    try {
      await client.query('begin transaction isolation level repeatable read, read only');
      const { rows: holdings } = await client.query<{ name: string; slug: string }>(
        'select name, slug from organization where id = $1',
        [holdingId],
      );
      const { rows: schemas } = await client.query<{ number: number }>(SCHEMA_NUMBER);
      const { rows: points } = await client.query<{ number: string }>(
        `select number from point where ${OWN} order by number`,
      );
      const [[holding], [schema]] = [holdings, schemas];
      if (holding === undefined || schema === undefined) throw new Error('there is no such holding');
      return new ArchiveSnapshot(
        client,
        holding,
        schema.number,
        points.map((row) => Number(row.number)),
      );
    } catch (error) {
      await client.end();
      throw error;
    }
  }

  /** Whatever is being read breaks off. */
  async end(): Promise<void> {
    await this.client.end().catch(() => undefined);
  }

  private copied(statement: string): AsyncIterable<Buffer> {
    const stream = this.client.query(copyTo(statement));
    // an error that comes before anybody reads must be kept for who does, and end neither the process nor wait for ever
    stream.on('error', (error) => stream.destroy(error));
    return stream;
  }

  async countRows(): Promise<number> {
    let rows = 0;
    for (const one of ARCHIVE_TABLES) rows += await this.count(`${quoted(one.name)} where ${whereOf(one)}`);
    return rows;
  }

  private async count(of: string): Promise<number> {
    const { rows } = await this.client.query<{ count: string }>(`select count(*) as count from ${of}`);
    return Number(rows[0]?.count ?? 0);
  }

  table(one: ArchiveTable): AsyncIterable<Buffer> {
    const columns = columnsOf(one).map((column) => quoted(column.name));
    const rows = `select ${columns.join()} from ${quoted(one.name)} where ${whereOf(one)} ${orderOf(one)}`;
    return this.copied(`copy (select row_to_json(kept) from (${rows}) kept) to stdout with ${RAW_LINES}`);
  }

  /** Name, e-mail and role of everybody who belongs to the holding: better-auth's tables stand outside row security. */
  people(): AsyncIterable<Buffer> {
    const rows = `select u.name, u.email, m.role, m.created_at as since from member m join "user" u on u.id = m.user_id
      where m.organization_id = current_setting('app.holding')::uuid order by m.created_at, m.id`;
    return this.copied(`copy (select row_to_json(kept) from (${rows}) kept) to stdout with ${RAW_LINES}`);
  }

  /** Months that hold readings, as `2026-11`, with how many they hold. */
  async months(): Promise<{ month: string; readings: number }[]> {
    if (this.points.length === 0) return [];
    const { rows } = await this.client.query<{ first: Date | null; last: Date | null }>(
      `select min(ends.first) as first, max(ends.last) as last from unnest($1::bigint[]) as own (number)
       cross join lateral (select
         (select at from reading where point = own.number order by at limit 1) as first,
         (select at from reading where point = own.number order by at desc limit 1) as last) ends`,
      [`{${this.points.join()}}`],
    );
    const [ends] = rows;
    if (ends === undefined || ends.first === null || ends.last === null) return [];
    const months: { month: string; readings: number }[] = [];
    for (let at = startOfMonth(ends.first.getTime()); at <= ends.last.getTime(); at = monthAfter(at)) {
      const readings = await this.count(`reading where point in (${this.points.join()}) and ${within(at)}`);
      if (readings > 0) months.push({ month: new Date(at).toISOString().slice(0, 7), readings });
    }
    return months;
  }

  /** Point after point, each in the order of time: both are the order of the table's own key, so nothing is sorted. */
  async *readings(month: string): AsyncGenerator<Buffer> {
    yield Buffer.from(`${READINGS_HEAD}\n`);
    const at = Date.parse(`${month}-01T00:00:00Z`);
    for (const point of this.points) {
      const rows = `select point, to_char(at, 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"'), value,
        case quality when 0 then 'good' when 1 then 'uncertain' else 'bad' end
        from reading where point = ${point} and ${within(at)} order by at`;
      yield* this.copied(`copy (${rows}) to stdout with (format csv)`);
    }
  }

  async photographs(): Promise<string[]> {
    const { rows } = await this.client.query<{ id: string }>(
      `select id from attachment where ${OWN} order by id`,
    );
    return rows.map((row) => row.id);
  }

  async photograph(id: string): Promise<Buffer> {
    const { rows } = await this.client.query<{ image: Buffer }>(
      `select image from attachment where ${OWN} and id = $1`,
      [id],
    );
    return rows[0]?.image ?? Buffer.alloc(0);
  }
}

/** How many migrations the database has: drizzle's own mark. */
export const SCHEMA_NUMBER = 'select count(*)::int as number from drizzle.__drizzle_migrations';

export function startOfMonth(at: number): number {
  const date = new Date(at);
  return Date.UTC(date.getUTCFullYear(), date.getUTCMonth());
}

export function monthAfter(at: number): number {
  const date = new Date(at);
  return Date.UTC(date.getUTCFullYear(), date.getUTCMonth() + 1);
}

function within(at: number): string {
  const iso = (time: number) => new Date(time).toISOString();
  return `at >= '${iso(at)}' and at < '${iso(monthAfter(at))}'`;
}
