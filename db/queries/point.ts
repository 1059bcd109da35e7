import 'server-only';
import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { calibration, point } from '@/db/schema/node';
import { needsCycle } from '@/lib/control/interlocks';
import type { PointCreate } from '@/lib/schema/point';
import { Point } from '@/lib/schema/yard-view';
import { touchPlan } from './plan';
import { renamePoint, usesOfPoint } from './point-uses';
import { houseNames, inUse, isId, type HouseNames } from './reference';
import { Refusal } from './refusal';

type Given = z.infer<typeof PointCreate>;
type Row = typeof point.$inferSelect;
/** Corrected value = raw × gain + offset. */
interface Correction {
  offset: number;
  gain: number;
}

const NONE: Correction = { offset: 0, gain: 1 };

function toPoint(row: Row, names: HouseNames, correction: Correction): Point {
  const { id, revision, key, name, role, unit, min, max, maxRate, sensor, derived } = row;
  return Point.parse({
    ...{ id, revision, key, name, role, unit, min, max, maxRate, sensor, derived },
    node: names.nodes.key(row.nodeId),
    staleAfter: row.staleAfterS,
    frozenAfter: row.frozenAfterS,
    offset: correction.offset,
    gain: correction.gain,
  });
}

async function toPoints(holding: Holding, houseId: string, rows: Row[]): Promise<Point[]> {
  const names = await houseNames(holding, houseId);
  const ids = rows.map((row) => row.id);
  const corrections = await holding.db
    .select()
    .from(calibration)
    .where(and(eq(calibration.holdingId, holding.id), inArray(calibration.pointId, ids)))
    .orderBy(asc(calibration.from), asc(calibration.id));
  const newest = new Map(corrections.map((row) => [row.pointId, row]));
  return rows.map((row) => toPoint(row, names, newest.get(row.id) ?? NONE));
}

export async function listPoints(holding: Holding, houseId: string): Promise<Point[]> {
  const rows = await holding.db
    .select()
    .from(point)
    .where(inUse(holding, houseId, point))
    .orderBy(asc(point.number));
  return toPoints(holding, houseId, rows);
}

/** By id or key. */
export async function findPoint(holding: Holding, houseId: string, ref: string): Promise<Point | null> {
  const rows = await holding.db
    .select()
    .from(point)
    .where(and(inUse(holding, houseId, point), isId(ref) ? eq(point.id, ref) : eq(point.key, ref)));
  return (await toPoints(holding, houseId, rows))[0] ?? null;
}

/** @throws Refusal at the path of a name that this house does not have */
async function columns(holding: Holding, houseId: string, given: Given) {
  const names = await houseNames(holding, houseId);
  const { key, name, role, unit, min, max, maxRate, sensor, derived } = given;
  return {
    ...{ key, name, role, unit, min, max, maxRate, sensor },
    nodeId: names.nodes.id(given.node, 'node'),
    staleAfterS: given.staleAfter,
    frozenAfterS: given.frozenAfter,
    derived:
      derived === null
        ? null
        : {
            of: derived.of,
            points: derived.points.map((ref, at) => names.points.find(ref, `derived.points.${at}`).key),
            ...(derived.window === undefined ? {} : { window: derived.window }),
          },
  };
}

async function calibrate(holding: Holding, pointId: string, from: Date, by: string, correction: Correction) {
  const { offset, gain } = correction;
  await holding.db
    .insert(calibration)
    .values({ ...{ pointId, from, by, offset, gain }, id: uuid(), holdingId: holding.id });
}

export async function createPoint(
  holding: Holding,
  houseId: string,
  given: Given,
  by: string,
): Promise<Point> {
  const id = uuid();
  await holding.db
    .insert(point)
    .values({ ...(await columns(holding, houseId, given)), id, houseId, holdingId: holding.id });
  // From the very beginning: a node may send readings that it kept from before it was registered.
  await calibrate(holding, id, new Date(0), by, given);
  await touchPlan(holding, houseId);
  return found(holding, houseId, id);
}

/** Readings stay raw; a changed offset or gain holds from `now` on. A changed key is changed wherever it is named. */
export async function amendPoint(
  holding: Holding,
  houseId: string,
  before: Point,
  given: Given,
  change: { by: string; now: Date },
): Promise<Point> {
  const next = await columns(holding, houseId, given);
  await refuseRing(holding, houseId, before.key, next.derived?.points ?? []);
  await holding.db
    .update(point)
    .set({ ...next, revision: sql`${point.revision} + 1` })
    .where(and(eq(point.holdingId, holding.id), eq(point.id, before.id)));
  if (given.key !== before.key) await renamePoint(holding, houseId, before.key, given.key);
  if (given.offset !== before.offset || given.gain !== before.gain) {
    await calibrate(holding, before.id, change.now, change.by, given);
  }
  await touchPlan(holding, houseId);
  return found(holding, houseId, before.id);
}

/**
 * A new point names only points that were there before it, so a ring can only be closed by an amended one.
 * @throws Refusal where the point would be derived from itself, by whatever way round
 */
async function refuseRing(
  holding: Holding,
  houseId: string,
  key: string,
  inputs: readonly string[],
): Promise<void> {
  const others = (await listPoints(holding, houseId)).filter((one) => one.key !== key);
  const ring = needsCycle(
    [...others.map((one) => ({ key: one.key, inputs: one.derived?.points ?? [] })), { key, inputs }].flatMap(
      (one) => one.inputs.map((other) => ({ channel: one.key, other })),
    ),
  );
  if (ring.length > 0) {
    const told = [...ring, ring[0] ?? key].join(' from ');
    throw new Refusal('derived.points', `Each would be derived from the next: ${told}. Take one out.`);
  }
}

export async function removePoint(holding: Holding, houseId: string, gone: Point, now: Date): Promise<void> {
  const uses = await usesOfPoint(holding, houseId, gone);
  if (uses.length > 0) throw new Refusal(null, `Still used by ${uses.join(', ')}. Change those first.`);
  await holding.db
    .update(point)
    .set({ removedAt: now, revision: sql`${point.revision} + 1` })
    .where(and(eq(point.holdingId, holding.id), eq(point.id, gone.id)));
  await touchPlan(holding, houseId);
}

async function found(holding: Holding, houseId: string, id: string): Promise<Point> {
  const row = await findPoint(holding, houseId, id);
  if (row === null) throw new Error('the point was there a moment ago');
  return row;
}

/** Numbers under which readings are kept, by key and by id. */
export async function pointNumbers(holding: Holding, houseId: string): Promise<Map<string, PointNumber>> {
  const rows = await holding.db
    .select({ id: point.id, key: point.key, number: point.number })
    .from(point)
    .where(inUse(holding, houseId, point));
  return new Map(rows.flatMap((row) => [[row.key, row] as const, [row.id, row] as const]));
}

export interface PointNumber {
  key: string;
  number: number;
}
