/**
 * Puts what an archive holds in as a new holding. All of it is one transaction: until its end nobody sees anything of it,
 * and whatever breaks off leaves nothing behind but empty months of readings.
 *
 * Nothing that comes in may move a relay by itself: houses are laid up, nodes have no token, no channel counts as proved,
 * and letters of reports are ended.
 */
import { randomBytes } from 'node:crypto';
import { getTableConfig, type PgColumn } from 'drizzle-orm/pg-core';
import pg from 'pg';
import { v7 as uuid } from 'uuid';
import { onConnection, type Holding } from '@/db/client';
import { member, organization } from '@/db/schema/auth';
import { addAudit } from './audit';
import { endWork, type ArchiveWork } from './archive';
import { NewIds } from './archive-ids';
import { RowFault, type ArchiveRow } from './archive-rows';
import { ARCHIVE_TABLES, type ArchiveTable } from './archive-tables';
import { refreshNights } from './night-making';
import { copyNew, makeReadingMonth, rollUp, type ReadingRow } from './reading-write';
import { freeSlug } from './slug';
import { monthAfter } from './archive-out';

export interface BringFacts {
  name: string;
  /** Who becomes the owner: nobody else is let in by an archive. */
  userId: string;
  role: string;
  by: string;
  /** App time, epoch ms. */
  now: number;
  madeAt: string;
  /** Of the archive's file, for the audit log. */
  sha256: string;
}

export class Bringing {
  private readonly ids = new NewIds(randomBytes(32));
  private readonly numbers = new Map<number, number>();
  private readonly houses: string[] = [];
  private readonly holding: Holding;

  private constructor(
    private readonly client: pg.PoolClient,
    private readonly facts: BringFacts,
    readonly holdingId: string,
  ) {
    this.holding = { id: holdingId, db: onConnection(client) };
  }

  static async begin(pool: pg.Pool, facts: BringFacts): Promise<Bringing> {
    const client = await pool.connect();
    const bringing = new Bringing(client, facts, uuid());
    try {
      await client.query('begin');
      const { db, id } = bringing.holding;
      const taken = await db.select({ slug: organization.slug }).from(organization);
      const slug = freeSlug(facts.name, new Set(taken.map((row) => row.slug)));
      await db.insert(organization).values({ id, name: facts.name, slug, createdAt: new Date(facts.now) });
      return bringing;
    } catch (error) {
      bringing.breakOff();
      throw error;
    }
  }

  /** Points go in at one call, so that their numbers keep their order. */
  async rows(one: ArchiveTable, rows: readonly ArchiveRow[]): Promise<void> {
    const first = rows[0];
    if (first === undefined) return;
    const columns = new Map(getTableConfig(one.table).columns.map((column) => [column.name, column]));
    const ready = rows.map((row) => this.asBrought(one.name, row, [...columns.values()]));
    const names = Object.keys(ready[0] ?? {}).filter((name) => !(one.name === 'point' && name === 'number'));
    const order = one.name === 'point' ? 'order by number' : '';
    const told = await this.asked(
      `insert into "${one.name}" (${listed(names)})
       select ${listed(names)} from jsonb_populate_recordset(null::public."${one.name}", $1::jsonb) ${order}
       returning ${one.name === 'point' ? 'id, number' : '1'}`,
      [JSON.stringify(ready)],
    );
    if (one.name === 'house') this.houses.push(...inUse(ready));
    if (one.name === 'point') this.noteNumbers(rows, told);
  }

  async photograph(
    one: ArchiveTable,
    row: ArchiveRow,
    bytes: { image: Buffer; thumbnail: Buffer },
  ): Promise<void> {
    const ready = this.asBrought(one.name, row, getTableConfig(one.table).columns);
    const names = Object.keys(ready);
    await this.asked(
      `insert into "${one.name}" (${listed(names)}, image, thumbnail)
       select ${listed(names)}, $2, $3 from jsonb_populate_record(null::public."${one.name}", $1::jsonb)`,
      [JSON.stringify(ready), bytes.image, bytes.thumbnail],
    );
  }

  /** Of one month, in the archive's numbers of points. The month must be made already. */
  async readings(rows: readonly ReadingRow[]): Promise<void> {
    const renumbered = rows.map((row) => ({ ...row, point: this.numbers.get(row.point) ?? -1 }));
    await copyNew(this.client, renumbered);
  }

  async rollUpMonth(month: string): Promise<void> {
    const from = Date.parse(`${month}-01T00:00:00Z`);
    const points = [...this.numbers.values()];
    // a query may last no longer than the pool allows
    for (let first = 0; first < points.length; first += POINTS_A_ROLL_UP)
      await rollUp(this.client, points.slice(first, first + POINTS_A_ROLL_UP), from, monthAfter(from) - 1);
  }

  /** Makes the nights of every house that is in use, and the holding visible to its one owner. @returns false: not wanted any more */
  async finish(work: ArchiveWork, isWanted: () => Promise<boolean>): Promise<boolean> {
    const { now, by, userId, role, madeAt, sha256 } = this.facts;
    for (const house of this.houses) {
      if (!(await isWanted())) return false;
      await refreshNights(this.holding, house, now);
    }
    const { db, id } = this.holding;
    await db
      .insert(member)
      .values({ id: uuid(), organizationId: id, userId, role, createdAt: new Date(now) });
    const detail = { archive: work.id, madeAt, sha256 };
    await addAudit(this.holding, {
      at: new Date(now),
      by,
      action: 'archive.bring',
      subject: this.facts.name,
      detail,
    });
    if (!(await endWork(this.client, work, { state: 'done', now, intoId: id }))) return false;
    await this.client.query('commit');
    this.client.release();
    return true;
  }

  /** The connection is closed, not given back: it may stand in the middle of a COPY. What it had put in is gone with it. */
  breakOff(): void {
    this.client.release(new Error('an archive was broken off'));
  }

  private asBrought(table: string, row: ArchiveRow, columns: readonly PgColumn[]): ArchiveRow {
    const now = new Date(this.facts.now).toISOString();
    const renewed = { ...this.ids.inRow(table, row, columns), holding_id: this.holdingId };
    switch (table) {
      case 'house':
        return { ...renewed, laid_up_at: now };
      case 'node':
        // no token hashes to this, and the unique index wants one a node
        return { ...renewed, token_hash: `none ${uuid()}`, revoked_at: row['revoked_at'] ?? now, status: {} };
      case 'channel':
        return { ...renewed, proved_at: null };
      case 'alarm':
        // what stood then is not watched any more
        return { ...renewed, cleared_at: row['cleared_at'] ?? this.facts.madeAt };
      case 'report_schedule':
        return { ...renewed, removed_at: row['removed_at'] ?? now };
      case 'import_part':
        return { ...renewed, point: this.numbers.get(Number(row['point'])) };
      default:
        return renewed;
    }
  }

  private noteNumbers(rows: readonly ArchiveRow[], told: readonly Record<string, unknown>[]): void {
    const made = new Map(told.map((row) => [String(row['id']), Number(row['number'])]));
    for (const row of rows) {
      const number = made.get(this.ids.of(String(row['id'])));
      if (number !== undefined) this.numbers.set(Number(row['number']), number);
    }
  }

  private async asked(text: string, values: unknown[]): Promise<Record<string, unknown>[]> {
    try {
      return (await this.client.query<Record<string, unknown>>(text, values)).rows;
    } catch (error) {
      // class 22: a value that is none; 23: a row that contradicts another
      if (error instanceof pg.DatabaseError && /^2[23]/.test(error.code ?? ''))
        throw new RowFault(`The database refuses a row: ${error.detail ?? error.message}`);
      throw error;
    }
  }
}

const POINTS_A_ROLL_UP = 5;

const listed = (names: readonly string[]) => names.map((name) => `"${name}"`).join();

const inUse = (rows: readonly ArchiveRow[]) =>
  rows.flatMap((row) => (row['removed_at'] === null && typeof row['id'] === 'string' ? [row['id']] : []));

/** Outside of the transaction: making a month locks all readings for a moment. */
export async function makeMonth(pool: pg.Pool, month: string): Promise<void> {
  await makeReadingMonth(pool, Date.parse(`${month}-01T00:00:00Z`));
}

export async function schemaNumber(pool: pg.Pool): Promise<number> {
  const { rows } = await pool.query<{ number: number }>(
    'select count(*)::int as number from drizzle.__drizzle_migrations',
  );
  return rows[0]?.number ?? 0;
}

/** Tables that are put in, parents before what names them. */
export const TABLES_IN = ARCHIVE_TABLES.filter((one) => one.outOnly === undefined);
