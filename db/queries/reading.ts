import { and, asc, eq, gte, inArray, lt, sql } from 'drizzle-orm';
import type { Db, Holding } from '@/db/client';
import { reading } from '@/db/series';
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
  const begin = step === 60 ? from : Math.floor(from / (step * 1000)) * step * 1000;
  const kept =
    step === 60
      ? new Map<number, SteppedSeries>()
      : await keptSteps(holding.db, [...points.keys()], begin, to, step);
  // the newest step may still grow, so it is reckoned afresh with what has come since
  const since = new Map([...points.keys()].map((number) => [number, dropNewest(kept.get(number)) ?? begin]));
  const fresh = await freshSteps(holding.db, since, to, step);
  return new Map(
    [...points].map(([number, calibrations]) => [
      number,
      corrected(calibrations, [kept.get(number), fresh.get(number)]),
    ]),
  );
}

/** Takes the last step off. @returns where it began; null where there is none */
function dropNewest(series: SteppedSeries | undefined): number | null {
  for (const column of [series?.least, series?.mean, series?.greatest]) column?.pop();
  return series?.at.pop() ?? null;
}

function corrected(
  calibrations: readonly Calibration[],
  parts: readonly (SteppedSeries | undefined)[],
): SteppedSeries {
  const one: SteppedSeries = { at: [], least: [], mean: [], greatest: [] };
  for (const part of parts)
    part?.at.forEach((at, place) => {
      const least = correct(calibrations, at, part.least[place] ?? 0);
      const greatest = correct(calibrations, at, part.greatest[place] ?? 0);
      one.at.push(at);
      one.least.push(Math.min(least, greatest));
      one.mean.push(correct(calibrations, at, part.mean[place] ?? 0));
      one.greatest.push(Math.max(least, greatest));
    });
  return one;
}

/** A type, not an interface: rows of the driver want an index. */
type StepsRow = { point: string } & Pick<SteppedSeries, keyof SteppedSeries>;

/**
 * Steps of the roll-ups, a row a point with its columns as JSON: a year of hours of four points is 35 000 steps, which
 * come so in less than half of the time that as many rows take.
 */
async function keptSteps(
  db: Db,
  numbers: readonly number[],
  begin: number,
  to: number,
  step: 300 | 3600,
): Promise<Map<number, SteppedSeries>> {
  if (numbers.length === 0) return new Map();
  // ordered once before they are gathered, not once a column; date_part reckons in floats, extract in decimals
  const { rows } = await db.execute<StepsRow>(sql`
    select point, json_agg(ms) as at, json_agg(least) as least, json_agg(mean) as mean, json_agg(greatest) as greatest
    from (
      select point, (date_part('epoch', at) * 1000)::bigint as ms, least, mean, greatest from rollup
      where point in (${listed(numbers)}) and step_s = ${step}
        and at >= ${new Date(begin)} and at < ${new Date(to)}
      order by point, at
    ) steps
    group by point`);
  return new Map(rows.map(({ point: number, ...series }) => [Number(number), series]));
}

const listed = (numbers: readonly number[]) =>
  sql.join(
    numbers.map((number) => sql`${number}`),
    sql`, `,
  );

/** Steps reckoned from readings, of each point since a time of its own (epoch ms). */
async function freshSteps(
  db: Db,
  since: ReadonlyMap<number, number>,
  to: number,
  step: SeriesStep,
): Promise<Map<number, SteppedSeries>> {
  if (since.size === 0) return new Map();
  const spans = sql.join(
    [...since].map(([number, from]) => sql`(${number}::bigint, ${new Date(from)}::timestamptz)`),
    sql`, `,
  );
  const { rows } = await db.execute<StepsRow>(sql`
    select point, json_agg((extract(epoch from at) * 1000)::bigint order by at) as at,
      json_agg(least order by at) as least, json_agg(mean order by at) as mean,
      json_agg(greatest order by at) as greatest
    from (
      select span.point, stepped.* from (values ${spans}) as span (point, since)
      cross join lateral (
        select date_bin(make_interval(secs => ${step}), at, timestamptz 'epoch') as at,
          min(value) as least, avg(value) as mean, max(value) as greatest
        from reading
        where point = span.point and at >= span.since and at < ${new Date(to)} and quality < 2
        group by 1
      ) stepped
    ) steps
    group by point`);
  return new Map(rows.map(({ point: number, ...series }) => [Number(number), series]));
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
