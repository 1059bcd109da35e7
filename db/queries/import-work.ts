/**
 * The worker's side of imports. What a batch of lines brought, how far the file is read and which hours are due go into one
 * transaction: an end at any moment leaves a file that is read on where it was left, each reading once.
 */
import type pg from 'pg';
import type { FileReading } from '@/lib/analysis/logger-reader';
import { timeRuns, timesOfRuns } from '@/lib/analysis/time-runs';
import type { ImportFound, ImportLayout } from '@/lib/schema/import';
import { copyStored, makeMonths } from './reading-write';

export interface ImportWork {
  id: string;
  holdingId: string;
  houseId: string;
  state: 'to-check' | 'to-bring' | 'to-undo';
  layout: ImportLayout;
  bytes: number;
  doneLines: number;
  faults: number;
  faultBytes: number;
}

/** The import that waits longest; null where none does. */
export async function nextImport(pool: pg.Pool): Promise<ImportWork | null> {
  const { rows } = await pool.query<ImportWork>(
    `select id, holding_id as "holdingId", house_id as "houseId", state, layout, bytes::float8 as bytes,
       done_lines::float8 as "doneLines", faults::float8 as faults, fault_bytes::float8 as "faultBytes"
     from import_batch where state in ('to-check', 'to-bring', 'to-undo') order by created_at, id limit 1`,
  );
  return rows[0] ?? null;
}

export interface ImportStep {
  doneBytes: number;
  doneLines: number;
  faults: number;
  faultBytes: number;
}

/** @returns whether it is still wanted */
export async function noteChecked(pool: pg.Pool, id: string, doneBytes: number): Promise<boolean> {
  const { rowCount } = await pool.query(
    `update import_batch set done_bytes = $2 where id = $1 and state = 'to-check'`,
    [id, doneBytes],
  );
  return rowCount === 1;
}

export async function endCheck(pool: pg.Pool, id: string, found: ImportFound): Promise<void> {
  await pool.query(
    `update import_batch set state = 'checked', found = $2, done_bytes = bytes, done_lines = 0,
       brought = 0, duplicates = 0, faults = 0, fault_bytes = 0
     where id = $1 and state = 'to-check'`,
    [id, JSON.stringify(found)],
  );
}

/** @returns false where the import was taken back meanwhile: nothing was stored */
export async function bringPart(
  pool: pg.Pool,
  work: Pick<ImportWork, 'id' | 'holdingId'>,
  rows: readonly FileReading[],
  step: ImportStep,
): Promise<boolean> {
  await makeMonths(pool, rows);
  const client = await pool.connect();
  let failure: Error | undefined;
  try {
    await client.query('begin');
    const { rows: states } = await client.query<{ state: string; parts: number }>(
      `select state, (select coalesce(max(part), 0) from import_part where batch_id = $1 and holding_id = $2) as parts
       from import_batch where id = $1 for update`,
      [work.id, work.holdingId],
    );
    const [state] = states;
    if (state?.state !== 'to-bring') {
      await client.query('rollback');
      return false;
    }
    const stored = await copyStored(client, rows);
    await keepPart(client, work, state.parts + 1, stored);
    await client.query(
      `update import_batch set done_bytes = $2, done_lines = $3, faults = $4, fault_bytes = $5,
         brought = brought + $6, duplicates = duplicates + $7 where id = $1`,
      [
        work.id,
        ...[step.doneBytes, step.doneLines, step.faults, step.faultBytes],
        ...[stored.length, rows.length - stored.length],
      ],
    );
    await client.query('commit');
    return true;
  } catch (error) {
    failure = error instanceof Error ? error : new Error(String(error));
    throw failure;
  } finally {
    // A client that failed may be in mid-COPY: it is not given back.
    client.release(failure);
  }
}

async function keepPart(
  client: pg.PoolClient,
  work: Pick<ImportWork, 'id' | 'holdingId'>,
  part: number,
  stored: readonly { point: number; at: number }[],
): Promise<void> {
  if (stored.length === 0) return;
  const times = new Map<number, number[]>();
  for (const { point, at } of stored) {
    const list = times.get(point);
    if (list === undefined) times.set(point, [at]);
    else list.push(at);
  }
  // one statement whatever the number of points: the line to the database is the slow part
  const values = [...times].map((_, place) => `($1, $2, $3, $${place * 2 + 4}, $${place * 2 + 5})`);
  await client.query(
    `insert into import_part (holding_id, batch_id, part, point, times) values ${values.join()}`,
    [
      work.holdingId,
      work.id,
      part,
      ...[...times].flatMap(([point, list]) => [point, `{${timeRuns(list).join()}}`]),
    ],
  );
  await markDue(client, times);
}

const HOUR_MS = 3_600_000;

/**
 * In the transaction of the readings themselves, and over a row that is there already: that locks it, so that whoever takes
 * it away to reckon its hour afresh has looked either before it was written again or after these readings are seen.
 */
async function markDue(client: pg.PoolClient, times: ReadonlyMap<number, readonly number[]>): Promise<void> {
  const points: number[] = [];
  const hours: number[] = [];
  for (const [point, list] of times) {
    for (const hour of new Set(list.map((at) => Math.floor(at / HOUR_MS)))) {
      points.push(point);
      hours.push(hour);
    }
  }
  // in the order in which the hours are taken away, so that the two do not wait for each other
  await client.query(
    `insert into reading_due (point, hour)
     select point, to_timestamp(hour * 3600) from unnest($1::bigint[], $2::bigint[]) as due (point, hour)
     order by hour desc, point
     on conflict (point, hour) do update set hour = excluded.hour`,
    [`{${points.join()}}`, `{${hours.join()}}`],
  );
}

/** Where it still stands as it was taken: who took it back at the last moment is not overruled. */
export async function endImport(
  pool: pg.Pool,
  work: Pick<ImportWork, 'id' | 'state'>,
  state: 'done' | 'undone' | 'failed',
  end: { now: number; problem?: string },
): Promise<void> {
  await pool.query(
    `update import_batch set state = $3, ended_at = $4, problem = $5, done_bytes = bytes
     where id = $1 and state = $2`,
    [work.id, work.state, state, new Date(end.now), end.problem ?? null],
  );
}

/** Takes one part back, the newest first. @returns false when there is none left */
export async function undoPart(pool: pg.Pool, work: Pick<ImportWork, 'id' | 'holdingId'>): Promise<boolean> {
  const client = await pool.connect();
  let failure: Error | undefined;
  try {
    await client.query('begin');
    const { rows } = await client.query<{ point: string; times: string[] }>(
      `delete from import_part where holding_id = $1 and batch_id = $2 and part =
         (select max(part) from import_part where holding_id = $1 and batch_id = $2)
       returning point, times`,
      [work.holdingId, work.id],
    );
    let gone = 0;
    const taken = new Map<number, number[]>();
    for (const { point, times: runs } of rows) {
      const times = timesOfRuns(runs.map(Number));
      const { rowCount } = await client.query(
        `delete from reading using unnest($2::bigint[]) ms
         where point = $1 and at = timestamptz 'epoch' + ms * interval '1 millisecond'
           and at >= $3 and at <= $4`,
        [point, `{${times.join()}}`, ...endsOf(times)],
      );
      gone += rowCount ?? 0;
      taken.set(Number(point), times);
    }
    await markDue(client, taken);
    await client.query(`update import_batch set brought = greatest(0, brought - $2) where id = $1`, [
      work.id,
      gone,
    ]);
    await client.query('commit');
    return rows.length > 0;
  } catch (error) {
    failure = error instanceof Error ? error : new Error(String(error));
    throw failure;
  } finally {
    client.release(failure);
  }
}

/** The partitions that a part lies in, so that the others are not looked at. */
function endsOf(times: readonly number[]): [Date, Date] {
  let [least, most] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const time of times) {
    least = Math.min(least, time);
    most = Math.max(most, time);
  }
  return [new Date(least), new Date(most)];
}
