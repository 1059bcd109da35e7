import { and, asc, eq, gte, inArray, lt, sql } from 'drizzle-orm';
import type { Db, Holding } from '@/db/client';
import { reading, rollup } from '@/db/series';
import { calibration, point } from '@/db/schema/node';
import type { Calibration } from './plan';

export interface LatestReading {
  pointId: string;
  number: number;
  at: number;
  /** As it was sent, before calibration. */
  value: number;
}

/** The newest reading of each point of a house; points that never spoke are absent. */
export async function latestReadings(holding: Holding, houseId: string): Promise<LatestReading[]> {
  const { rows } = await holding.db.execute<{ id: string; number: string; at: string; value: number }>(sql`
    select p.id, p.number, (extract(epoch from r.at) * 1000)::bigint as at, r.value
    from point p
    cross join lateral (select at, value from reading where point = p.number order by at desc limit 1) r
    where p.holding_id = ${holding.id} and p.house_id = ${houseId} and p.removed_at is null`);
  return rows.map((row) => ({
    pointId: row.id,
    number: Number(row.number),
    at: Number(row.at),
    value: row.value,
  }));
}

/** Corrects a value by the calibration in force at its time; `calibrations` ascend by `from`. */
export function correct(calibrations: readonly Calibration[], at: number, value: number): number {
  const inForce = calibrations.findLast((one) => one.from <= at);
  return inForce === undefined ? value : value * inForce.gain + inForce.offset;
}

export interface RawSeries {
  at: number[];
  value: number[];
  /** 0 good, 1 uncertain, 2 bad. */
  quality: number[];
}

/** Bad readings are left out; `at` is where each step begins. */
export interface SteppedSeries {
  at: number[];
  least: number[];
  mean: number[];
  greatest: number[];
}

/** Steps in seconds; 300 and 3600 come from the roll-ups, and what these have not reached yet from the readings. */
export type SeriesStep = 60 | 300 | 3600;

/** Readings as they came, corrected by the calibration in force at their time, from `from` to before `to` (epoch ms). */
export async function readRawSeries(
  holding: Holding,
  numbers: readonly number[],
  from: number,
  to: number,
  limit = 100_000,
): Promise<Map<number, RawSeries>> {
  const points = await ownPoints(holding, numbers);
  const series = new Map<number, RawSeries>();
  for (const [number, calibrations] of points) {
    const rows = await holding.db
      .select({ at: reading.at, value: reading.value, quality: reading.quality })
      .from(reading)
      .where(and(eq(reading.point, number), gte(reading.at, new Date(from)), lt(reading.at, new Date(to))))
      .orderBy(asc(reading.at))
      .limit(limit);
    series.set(number, {
      at: rows.map((row) => row.at.getTime()),
      value: rows.map((row) => correct(calibrations, row.at.getTime(), row.value)),
      quality: rows.map((row) => row.quality),
    });
  }
  return series;
}

/**
 * Least, mean and greatest a step, from `from` to before `to` (epoch ms). A step in which the calibration changed is
 * corrected by the one in force at its beginning.
 */
export async function readSeries(
  holding: Holding,
  numbers: readonly number[],
  from: number,
  to: number,
  step: SeriesStep,
): Promise<Map<number, SteppedSeries>> {
  const points = await ownPoints(holding, numbers);
  const series = new Map<number, SteppedSeries>();
  for (const [number, calibrations] of points) {
    const rows =
      step === 60
        ? await fromReadings(holding.db, number, from, to, 60)
        : await fromRollup(holding.db, number, from, to, step);
    const one: SteppedSeries = { at: [], least: [], mean: [], greatest: [] };
    for (const row of rows) {
      const ends = [correct(calibrations, row.at, row.least), correct(calibrations, row.at, row.greatest)];
      one.at.push(row.at);
      one.least.push(Math.min(...ends));
      one.mean.push(correct(calibrations, row.at, row.mean));
      one.greatest.push(Math.max(...ends));
    }
    series.set(number, one);
  }
  return series;
}

interface Stepped {
  at: number;
  least: number;
  mean: number;
  greatest: number;
}

async function fromRollup(
  db: Db,
  number: number,
  from: number,
  to: number,
  step: 300 | 3600,
): Promise<Stepped[]> {
  const begin = Math.floor(from / (step * 1000)) * step * 1000;
  const kept = await db
    .select()
    .from(rollup)
    .where(
      and(
        eq(rollup.point, number),
        eq(rollup.stepS, step),
        gte(rollup.at, new Date(begin)),
        lt(rollup.at, new Date(to)),
      ),
    )
    .orderBy(asc(rollup.at));
  const rows = kept.map((row) => ({
    at: row.at.getTime(),
    least: row.least,
    mean: row.mean,
    greatest: row.greatest,
  }));
  // The newest step may still grow, so it is reckoned afresh with what has come since.
  const newest = rows.pop();
  return [...rows, ...(await fromReadings(db, number, newest?.at ?? begin, to, step))];
}

async function fromReadings(
  db: Db,
  number: number,
  from: number,
  to: number,
  step: number,
): Promise<Stepped[]> {
  const { rows } = await db.execute<{ at: string; least: number; mean: number; greatest: number }>(sql`
    select (extract(epoch from date_bin(make_interval(secs => ${step}), at, timestamptz 'epoch')) * 1000)::bigint as at,
      min(value) as least, avg(value) as mean, max(value) as greatest
    from reading
    where point = ${number} and at >= ${new Date(from)} and at < ${new Date(to)} and quality < 2
    group by 1 order by 1`);
  return rows.map((row) => ({ ...row, at: Number(row.at) }));
}

/** Points of this holding among `numbers`, each with its calibrations: readings carry no holding of their own. */
async function ownPoints(holding: Holding, numbers: readonly number[]): Promise<Map<number, Calibration[]>> {
  if (numbers.length === 0) return new Map();
  const rows = await holding.db
    .select({
      number: point.number,
      from: calibration.from,
      offset: calibration.offset,
      gain: calibration.gain,
    })
    .from(point)
    .leftJoin(calibration, and(eq(calibration.holdingId, point.holdingId), eq(calibration.pointId, point.id)))
    .where(and(eq(point.holdingId, holding.id), inArray(point.number, [...numbers])))
    .orderBy(asc(calibration.from));
  const points = new Map<number, Calibration[]>();
  for (const row of rows) {
    const list = points.get(row.number) ?? [];
    points.set(row.number, list);
    if (row.from !== null && row.offset !== null && row.gain !== null) {
      list.push({ from: row.from.getTime(), offset: row.offset, gain: row.gain });
    }
  }
  return points;
}
