/** How a sensor has been, night by night: readings of the quiet hours, its siblings beside it, and when it was silent. */
import { and, eq, gte, lt, or, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { reading } from '@/db/series';
import { nightsBetween, type Night } from '@/lib/analysis/night';
import {
  differenceToSiblings,
  gapsOf,
  healthFindings,
  noiseOf,
  type HealthFinding,
  type HealthNight,
} from '@/lib/analysis/sensor-health';
import type { Read } from '@/lib/analysis/steadiness';
import type { House, Point } from '@/lib/schema/yard-view';
import { pointNumbers } from './point';
import { readSeries } from './reading';

const NIGHTS = 14;
const HOUR_MS = 3_600_000;
/** Hours after noon between which nobody waters, opens a door, or has the sun on a probe: one to five by the clock. */
const QUIET: readonly [from: number, to: number] = [13, 17];
const STEP_S = 300;
/** Roles of which a house has several that should agree: two ends of a bench, not two heaps. */
const ONE_AIR = new Set(['house-air', 'bench', 'outdoors', 'loop-intake']);

export interface PointHealth {
  /** Newest last; those before its first reading are left out. */
  nights: HealthNight[];
  findings: HealthFinding[];
  /** Names of the points that it is held against. */
  siblings: string[];
}

/** @param now epoch ms of app time */
export async function pointHealth(
  holding: Holding,
  house: House,
  point: Point,
  points: readonly Point[],
  silentAfterS: number,
  now: number,
): Promise<PointHealth> {
  const numbers = await pointNumbers(holding, house.id);
  const own = numbers.get(point.id)?.number;
  const nights = nightsBetween(now - (NIGHTS - 1) * 24 * HOUR_MS, now, house.zone);
  const [first] = nights;
  if (own === undefined || first === undefined) return { nights: [], findings: [], siblings: [] };
  const siblings = points.filter(
    (one) =>
      one.id !== point.id && one.role === point.role && one.unit === point.unit && one.derived === null,
  );
  const siblingNumbers = siblings.flatMap((one) => numbers.get(one.id)?.number ?? []);
  const times = await timesOf(holding, own, first.from, now);
  const quiet = await quietReadings(holding, own, nights);
  const series = await readSeries(holding, [own, ...siblingNumbers], first.from, now, STEP_S);
  const since = times[0] ?? Infinity;
  const told = nights.flatMap((night): HealthNight[] => {
    const to = Math.min(night.to, now);
    if (to <= since) return [];
    const from = Math.max(night.from, since);
    const inside = times.filter((at) => at >= from && at < to);
    return [
      {
        night: night.night,
        readings: inside.length,
        noise: noiseOf(quiet.filter((one) => isQuiet(one.at, night))),
        difference: differenceToSiblings(
          stepsOf(series.get(own), night),
          siblingNumbers.map((number) => stepsOf(series.get(number), night)),
        ),
        gaps: gapsOf(inside, from, to, silentAfterS),
      },
    ];
  });
  return {
    nights: told,
    findings: point.unit === 'Cel' ? healthFindings(told, ONE_AIR.has(point.role)) : [],
    siblings: siblings.map((one) => one.name),
  };
}

const isQuiet = (at: number, night: Night) =>
  at >= night.from + QUIET[0] * HOUR_MS && at < night.from + QUIET[1] * HOUR_MS;

function stepsOf(
  series: { at: readonly number[]; mean: readonly number[] } | undefined,
  night: Night,
): Map<number, number> {
  const steps = new Map<number, number>();
  series?.at.forEach((at, place) => {
    const mean = series.mean[place];
    if (mean !== undefined && isQuiet(at, night)) steps.set(at, mean);
  });
  return steps;
}

/** When it sent, ascending. The caller has made sure that the point is of this holding. */
async function timesOf(holding: Holding, number: number, from: number, to: number): Promise<number[]> {
  const { rows } = await holding.db.execute<{ at: number[] | null }>(sql`
    select json_agg((date_part('epoch', at) * 1000)::bigint order by at) as at from reading
    where point = ${number} and at >= ${new Date(from)} and at < ${new Date(to)}`);
  return rows[0]?.at ?? [];
}

async function quietReadings(holding: Holding, number: number, nights: readonly Night[]): Promise<Read[]> {
  const rows = await holding.db
    .select({ at: reading.at, value: reading.value })
    .from(reading)
    .where(
      and(
        eq(reading.point, number),
        eq(reading.quality, 0),
        or(
          ...nights.map(({ from }) =>
            and(
              gte(reading.at, new Date(from + QUIET[0] * HOUR_MS)),
              lt(reading.at, new Date(from + QUIET[1] * HOUR_MS)),
            ),
          ),
        ),
      ),
    )
    .orderBy(reading.at);
  return rows.map((row) => ({ at: row.at.getTime(), value: row.value }));
}
