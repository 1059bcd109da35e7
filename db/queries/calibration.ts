import 'server-only';
import { and, asc, desc, eq, gte, lt, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { calibration, point } from '@/db/schema/node';
import { reading } from '@/db/series';
import type { CalibrationKind, CalibrationPlace, Correction } from '@/lib/analysis/calibrate';
import type { Read } from '@/lib/analysis/steadiness';
import { Calibration } from '@/lib/schema/calibration';
import { touchPlan } from './plan';

type Row = typeof calibration.$inferSelect;

function toCalibration(row: Row): Calibration {
  const { id, kind, offset, gain, by, places, residual, note } = row;
  return Calibration.parse({
    ...{ id, kind, offset, gain, by, places, residual, note },
    from: row.from.toISOString(),
  });
}

/** Newest first; the last is that with which the point began. */
export async function listCalibrations(holding: Holding, pointId: string): Promise<Calibration[]> {
  const rows = await holding.db
    .select()
    .from(calibration)
    .where(and(eq(calibration.holdingId, holding.id), eq(calibration.pointId, pointId)))
    .orderBy(desc(calibration.from), desc(calibration.id));
  return rows.map(toCalibration);
}

export interface FoundCorrection extends Correction {
  kind: CalibrationKind;
  places: CalibrationPlace[];
  residual: number;
  note: string;
}

/** In force from now on: readings before keep the calibration of their time. */
export async function addCalibration(
  holding: Holding,
  houseId: string,
  pointId: string,
  found: FoundCorrection,
  act: { by: string; now: Date },
): Promise<Calibration> {
  const rows = await holding.db
    .insert(calibration)
    .values({ ...found, holdingId: holding.id, id: uuid(), pointId, from: act.now, by: act.by })
    .returning();
  await holding.db
    .update(point)
    .set({ revision: sql`${point.revision} + 1` })
    .where(and(eq(point.holdingId, holding.id), eq(point.id, pointId)));
  await touchPlan(holding, houseId);
  const [row] = rows;
  if (row === undefined) throw new Error('the calibration was written a moment ago');
  return toCalibration(row);
}

/** Readings of a point of this holding as its node sent them, ascending, `from` to before `to`, epoch ms. */
export async function rawReadings(
  holding: Holding,
  pointId: string,
  from: number,
  to: number,
): Promise<Read[]> {
  const rows = await holding.db
    .select({ at: reading.at, value: reading.value })
    .from(reading)
    .innerJoin(point, and(eq(point.number, reading.point), eq(point.holdingId, holding.id)))
    .where(and(eq(point.id, pointId), gte(reading.at, new Date(from)), lt(reading.at, new Date(to))))
    .orderBy(asc(reading.at))
    .limit(5000);
  return rows.map((row) => ({ at: row.at.getTime(), value: row.value }));
}
