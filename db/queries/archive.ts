import 'server-only';
import { and, desc, eq, inArray, lt, sql } from 'drizzle-orm';
import type pg from 'pg';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { archive } from '@/db/schema/archive';
import { Archive, type ArchiveFound, type ArchiveState } from '@/lib/schema/archive';
import { isId } from './reference';

type Row = typeof archive.$inferSelect;

function toArchive(row: Row): Archive {
  const { id, way, state, name, bytes, received, done, total, found, problem, by } = row;
  return Archive.parse({
    ...{ id, way, state, name, bytes, received, found, problem, by },
    progress: total === 0 ? 0 : Math.min(1, done / total),
    into: row.intoId === null ? null : { id: row.intoId, name: row.intoName ?? '' },
    createdAt: row.createdAt.toISOString(),
    endedAt: row.endedAt?.toISOString() ?? null,
  });
}

const own = (holding: Holding, id: string) => and(eq(archive.holdingId, holding.id), eq(archive.id, id));

/** The newest first. */
export async function listArchives(holding: Holding): Promise<Archive[]> {
  const rows = await holding.db
    .select()
    .from(archive)
    .where(eq(archive.holdingId, holding.id))
    .orderBy(desc(archive.createdAt), desc(archive.id))
    .limit(100);
  return rows.map(toArchive);
}

/** The list, and the one that a page's address names; without a name the one that is still under way. */
export async function readArchives(holding: Holding, name: unknown) {
  const list = await listArchives(holding);
  const wanted = typeof name === 'string' ? await findArchive(holding, name) : null;
  return { list, open: wanted ?? list.find((one) => UNDER_WAY.has(one.state)) ?? null };
}

const UNDER_WAY = new Set<ArchiveState>(['receiving', 'to-check', 'checked', 'to-bring']);

export async function findArchive(holding: Holding, id: string): Promise<Archive | null> {
  if (!isId(id)) return null;
  const [row] = await holding.db.select().from(archive).where(own(holding, id));
  return row === undefined ? null : toArchive(row);
}

export async function createArchive(
  holding: Holding,
  given: Pick<Row, 'way' | 'state' | 'name' | 'by' | 'userId'> & { bytes?: number; now: Date },
): Promise<Archive> {
  const { now, ...rest } = given;
  const [row] = await holding.db
    .insert(archive)
    .values({ ...rest, holdingId: holding.id, id: uuid(), createdAt: now })
    .returning();
  if (row === undefined) throw new Error('the new archive was not answered');
  return toArchive(row);
}

/** Files that were begun and left lying before `before`, by id. They are forgotten. */
export async function forgetLeft(holding: Holding, before: Date): Promise<string[]> {
  const rows = await holding.db
    .delete(archive)
    .where(
      and(
        eq(archive.holdingId, holding.id),
        inArray(archive.state, ['receiving', 'checked']),
        lt(archive.createdAt, before),
      ),
    )
    .returning({ id: archive.id });
  return rows.map((row) => row.id);
}

export async function countUnderWay(holding: Holding): Promise<number> {
  return holding.db.$count(
    archive,
    and(
      eq(archive.holdingId, holding.id),
      inArray(archive.state, ['receiving', 'to-check', 'checked', 'to-bring']),
    ),
  );
}

/** The last piece hands the file on to the worker. */
export async function noteReceived(holding: Holding, id: string, received: number): Promise<void> {
  await holding.db
    .update(archive)
    .set({
      received,
      total: sql`${archive.bytes}`,
      state: sql`case when ${received} >= ${archive.bytes} then 'to-check' else 'receiving' end`,
    })
    .where(own(holding, id));
}

/** @returns false where its state was not `from`: somebody else was quicker */
export async function moveArchive(
  holding: Holding,
  id: string,
  from: ArchiveState,
  to: ArchiveState,
  set: Partial<Pick<Row, 'intoName' | 'userId' | 'by'>> = {},
): Promise<boolean> {
  const rows = await holding.db
    .update(archive)
    .set({ ...set, state: to, done: 0, problem: null })
    .where(and(own(holding, id), eq(archive.state, from)))
    .returning({ id: archive.id });
  return rows.length > 0;
}

export async function removeArchive(holding: Holding, id: string): Promise<void> {
  await holding.db.delete(archive).where(own(holding, id));
}

export async function noteSending(
  holding: Holding,
  id: string,
  step: Pick<Row, 'state' | 'done' | 'total' | 'bytes'> & { endedAt?: Date },
): Promise<void> {
  await holding.db.update(archive).set(step).where(own(holding, id));
}

export interface ArchiveWork {
  id: string;
  holdingId: string;
  state: 'to-check' | 'to-bring';
  bytes: number;
  found: ArchiveFound | null;
  intoName: string | null;
  userId: string | null;
  by: string;
}

/** The archive that waits longest for the worker; null where none does. */
export async function nextArchive(pool: pg.Pool): Promise<ArchiveWork | null> {
  const { rows } = await pool.query<ArchiveWork>(
    `select id, holding_id as "holdingId", state, bytes::float8 as bytes, found, into_name as "intoName",
       user_id as "userId", by
     from archive where state in ('to-check', 'to-bring') order by created_at, id limit 1`,
  );
  return rows[0] ?? null;
}

/** @returns whether it is still wanted: who drops it takes the row away */
export async function noteWork(
  pool: Pick<pg.Pool, 'query'>,
  work: ArchiveWork,
  done: number,
  total: number,
): Promise<boolean> {
  const { rowCount } = await pool.query(
    'update archive set done = $3, total = $4 where id = $1 and state = $2 and holding_id = $5',
    [work.id, work.state, done, total, work.holdingId],
  );
  return rowCount === 1;
}

/** Where it still stands as it was taken. @returns whether it did */
export async function endWork(
  asks: Pick<pg.Pool, 'query'> | pg.PoolClient,
  work: ArchiveWork,
  end: {
    state: 'checked' | 'done' | 'failed';
    now: number;
    found?: ArchiveFound;
    problem?: string;
    intoId?: string;
  },
): Promise<boolean> {
  const { rowCount } = await asks.query(
    `update archive set state = $3, ended_at = $4, found = coalesce($5, found), problem = $6, into_id = $7, done = total
     where id = $1 and state = $2 and holding_id = $8`,
    [
      ...[work.id, work.state, end.state, new Date(end.now)],
      ...[end.found === undefined ? null : JSON.stringify(end.found), end.problem ?? null],
      ...[end.intoId ?? null, work.holdingId],
    ],
  );
  return rowCount === 1;
}
