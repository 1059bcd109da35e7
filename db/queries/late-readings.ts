/**
 * Readings that come late: from a node that was cut off, or out of a logger's file. Their roll-ups and nights were made
 * without them, so the hours are noted, and made anew by the next turn of the job, whatever ends in between.
 */
import type pg from 'pg';
import type { Db } from '@/db/client';
import { sql } from 'drizzle-orm';
import { rollUp } from './reading-write';

const HOUR_MS = 3_600_000;

export interface LateRow {
  point: number;
  /** Epoch ms. */
  at: number;
}

/**
 * Notes the hours of readings before `before`: called before they are stored and again after. Infinity notes all of them,
 * for an import and its undoing.
 */
export async function noteLate(pool: pg.Pool, rows: readonly LateRow[], before: number): Promise<void> {
  const hours = new Map<string, [number, Date]>();
  for (const { point, at } of rows) {
    if (at >= before) continue;
    const hour = Math.floor(at / HOUR_MS) * HOUR_MS;
    hours.set(`${point} ${hour}`, [point, new Date(hour)]);
  }
  if (hours.size === 0) return;
  const due = [...hours.values()];
  await pool.query(
    `insert into reading_due (point, hour) select * from unnest($1::bigint[], $2::timestamptz[])
     on conflict do nothing`,
    [due.map(([point]) => point), due.map(([, hour]) => hour)],
  );
}

/** Hours made anew in one turn: a logger's winter is some 50 000, and must not keep the live ones waiting. */
const MOST_HOURS = 5000;

/**
 * Rolls the noted hours up, and makes the nights that hold them due. An hour that is noted again meanwhile stays noted:
 * its row is taken away before its readings are looked at.
 * @returns how many hours were taken
 */
export async function makeLate(pool: pg.Pool, db: Db): Promise<number> {
  const { rows } = await pool.query<{ point: string; hour: Date }>(
    `delete from reading_due where (point, hour) in
       (select point, hour from reading_due order by hour desc, point limit $1)
     returning point, hour`,
    [MOST_HOURS],
  );
  const late = rows.map((row) => ({ point: Number(row.point), at: row.hour.getTime() }));
  try {
    for (const { points, from, to } of spansOf(late)) {
      await rollUp(pool, points, from, to);
      await forgetEmpty(pool, points, from, to);
      await markNights(db, points, from, to);
    }
  } catch (error) {
    await noteLate(pool, late, Infinity);
    throw error;
  }
  return rows.length;
}

/** Steps that hold no reading any more, after an import was undone. */
async function forgetEmpty(
  pool: pg.Pool,
  points: readonly number[],
  from: number,
  to: number,
): Promise<void> {
  await pool.query(
    `delete from rollup kept where point = any($1) and at >= $2 and at <= $3 and not exists (
       select from reading where point = kept.point and at >= kept.at
         and at < kept.at + make_interval(secs => kept.step_s) and quality < 2)`,
    [points, new Date(from), new Date(to)],
  );
}

interface PointSpan {
  points: number[];
  from: number;
  /** Within the last hour. */
  to: number;
}

/** Neighbouring hours of the same points go together: a logger's file is one span, not thousands. */
function spansOf(late: readonly LateRow[]): PointSpan[] {
  const hours = new Map<number, number[]>();
  for (const { point, at } of late) hours.set(at, [...(hours.get(at) ?? []), point]);
  const spans: PointSpan[] = [];
  for (const at of [...hours.keys()].sort((a, b) => a - b)) {
    const points = (hours.get(at) ?? []).sort((a, b) => a - b);
    const last = spans.at(-1);
    if (last !== undefined && last.to + 1 === at && last.points.join() === points.join())
      last.to = at + HOUR_MS - 1;
    else spans.push({ points, from: at, to: at + HOUR_MS - 1 });
  }
  return spans;
}

/** A point may be believed for a day at most (lib/schema/point.ts): so far behind its noon a night's readings reach into it. */
const REACH_MS = 86_400_000;

/** Nights of the points' houses that a span's readings reach into were made without what it holds by now: they are due. */
export async function markNights(db: Db, points: readonly number[], from: number, to: number): Promise<void> {
  if (points.length === 0) return;
  const numbers = sql.join(
    points.map((point) => sql`${point}`),
    sql`, `,
  );
  for (const table of [sql`night`, sql`house_night`])
    await db.execute(sql`
      update ${table} kept set made_at = to_timestamp(0)
      from (select distinct holding_id, house_id from point where number in (${numbers})) own
      where kept.holding_id = own.holding_id and kept.house_id = own.house_id
        and (kept.body->>'from')::float8 <= ${to} and (kept.body->>'ends')::float8 > ${from - REACH_MS}`);
}
