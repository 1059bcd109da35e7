/** What a heap's core was read at, as hours at temperature are counted from it. */
import 'server-only';
import { and, asc, eq, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { calibration } from '@/db/schema/node';
import { unsureSpans, withReadings } from '@/lib/analysis/heat-edges';
import type { HeatStep } from '@/lib/analysis/hot-spells';
import { RULE_LINES } from '@/lib/analysis/hygiene';
import type { Extent } from '@/lib/analysis/series';
import type { Calibration } from './plan';
import { correct, readSeries } from './reading';

const STEP_S = 300;

export interface CorePoint {
  id: string;
  number: number;
}

export async function calibrationsOfPoint(holding: Holding, id: string): Promise<Calibration[]> {
  const rows = await holding.db
    .select()
    .from(calibration)
    .where(and(eq(calibration.holdingId, holding.id), eq(calibration.pointId, id)))
    .orderBy(asc(calibration.from));
  return rows.map((one) => ({ from: one.from.getTime(), offset: one.offset, gain: one.gain }));
}

/**
 * Roll-ups of a core, ascending, and where a rule's hours begin or end its readings themselves: a season of them is a million,
 * and all but these would say what the roll-ups say.
 */
export async function heatSteps(
  holding: Holding,
  core: CorePoint,
  from: number,
  to: number,
): Promise<HeatStep[]> {
  const series = (await readSeries(holding, [core.number], from, to, STEP_S)).get(core.number);
  const steps = (series?.at ?? []).map((at, i) => ({
    from: at,
    to: at + STEP_S * 1000,
    least: series?.least[i] ?? 0,
    greatest: series?.greatest[i] ?? 0,
  }));
  const spans = unsureSpans(steps, RULE_LINES);
  const calibrations = await calibrationsOfPoint(holding, core.id);
  const readings = (await readingsWithin(holding, core.number, spans, { from, to })).map(({ at, value }) => ({
    ...{ at, value: correct(calibrations, at, value) },
  }));
  return withReadings(steps, spans, readings);
}

/** Of good and of uncertain quality, as the roll-ups are. */
async function readingsWithin(
  holding: Holding,
  number: number,
  spans: readonly Extent[],
  { from, to }: Extent,
): Promise<{ at: number; value: number }[]> {
  if (spans.length === 0) return [];
  const list = (of: (span: Extent) => number) => sql`${`{${spans.map(of).join()}}`}::bigint[]`;
  const ms = (column: string) =>
    sql`timestamptz 'epoch' + span.${sql.raw(column)} * interval '1 millisecond'`;
  const { rows } = await holding.db.execute<{ at: number; value: number }>(sql`
    select date_part('epoch', one.at) * 1000 as at, one.value
    from unnest(${list((span) => span.from)}, ${list((span) => span.to)}) as span (since, until)
    cross join lateral (
      select at, value from reading
      where point = ${number} and at >= ${ms('since')} and at < ${ms('until')}
        and at >= ${new Date(from)} and at < ${new Date(to)} and quality < 2
    ) one
    order by 1`);
  return rows;
}
