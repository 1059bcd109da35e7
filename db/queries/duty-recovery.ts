/** How a source comes back, week by week, with some of its rests as they were read. */
import { and, asc, eq, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { source } from '@/db/schema/channel';
import { calibration, point } from '@/db/schema/node';
import type { NightSummary } from '@/lib/analysis/nights';
import type { EntryEffect, RecoveryTrend, RecoveryWeek } from '@/lib/analysis/recovery';
import { entryEffects, recoveryTrend, recoveryWeeks } from '@/lib/analysis/recovery-weeks';
import { type FittedRest, isFitted } from '@/lib/analysis/rest-fit';
import { correct } from './reading';

export interface RestCurve {
  fit: FittedRest;
  readings: { at: number; value: number }[];
}

export interface DutyRecovery {
  weeks: RecoveryWeek[];
  trend: RecoveryTrend;
  effects: EntryEffect[];
  /** Some rests of the first and of the last week that has a figure. */
  first: RestCurve[];
  last: RestCurve[];
}

/** Curves of a week that are drawn: more only lie upon each other. */
const MOST_CURVES = 8;
/** Readings of a rest that are drawn. */
const MOST_DOTS = 30;

/** @param nights of the source, ascending */
export async function readRecovery(
  holding: Holding,
  sourceId: string,
  nights: readonly NightSummary[],
  entries: readonly { at: number; kind: string }[],
): Promise<DutyRecovery> {
  const weeks = recoveryWeeks(nights);
  const known = weeks.filter((week) => week.recovery !== null);
  const [first, last] = [known[0], known.at(-1)];
  const drawn = (week: RecoveryWeek | undefined) =>
    week === undefined ? [] : some(restsIn(nights, week.from, week.to), MOST_CURVES);
  const early = first === last ? [] : drawn(first);
  const late = drawn(last);
  const readings = await readingsOf(holding, sourceId, [...early, ...late]);
  const curve = (fit: FittedRest): RestCurve => ({ fit, readings: readings.get(fit.from) ?? [] });
  return {
    weeks,
    trend: recoveryTrend(weeks),
    effects: entryEffects(nights, entries),
    first: early.map(curve),
    last: late.map(curve),
  };
}

function restsIn(nights: readonly NightSummary[], from: number, to: number): FittedRest[] {
  return nights
    .filter((night) => night.from >= from && night.ends <= to)
    .flatMap((night) => night.rests.filter(isFitted));
}

/** So many of a list, evenly over it. */
function some<T>(all: readonly T[], most: number): T[] {
  const step = Math.max(1, all.length / most);
  return all.filter((_, place) => Math.floor(place / step) !== Math.floor((place - 1) / step));
}

/** Good readings beside the pipe in each rest, corrected, by the rest's beginning. */
async function readingsOf(holding: Holding, sourceId: string, rests: readonly FittedRest[]) {
  const found = new Map<number, { at: number; value: number }[]>();
  const [base] = await holding.db
    .select({ id: point.id, number: point.number })
    .from(source)
    .innerJoin(point, and(eq(point.holdingId, source.holdingId), eq(point.id, source.basePointId)))
    .where(and(eq(source.holdingId, holding.id), eq(source.id, sourceId)));
  if (base === undefined || rests.length === 0) return found;
  const calibrations = (
    await holding.db
      .select()
      .from(calibration)
      .where(and(eq(calibration.holdingId, holding.id), eq(calibration.pointId, base.id)))
      .orderBy(asc(calibration.from))
  ).map((row) => ({ from: row.from.getTime(), offset: row.offset, gain: row.gain }));
  // a branch a rest: with bounds as constants the planner leaves out the partitions of all other months
  const branches = rests.map(
    (rest) => sql`
      (select ${rest.from}::float8 as rest, (extract(epoch from at) * 1000)::float8 as at, value from reading
        where point = ${base.number} and at >= ${new Date(rest.from)} and at < ${end(rest)} and quality = 0
        order by at)`,
  );
  const { rows } = await holding.db.execute<{ rest: number; at: number; value: number }>(
    sql.join(branches, sql` union all `),
  );
  for (const { rest, at, value } of rows)
    found.set(rest, [...(found.get(rest) ?? []), { at, value: correct(calibrations, at, value) }]);
  for (const [rest, all] of found) found.set(rest, some(all, MOST_DOTS));
  return found;
}

/** What the fit looked at of the rest: a day without a draw is drawn no further. */
const end = (rest: FittedRest) => new Date(Math.min(rest.to, rest.from + rest.lengthS * 1000));
