/** What the page of one point shows. */
import type { Holding } from '@/db/client';
import type { Calibration } from '@/lib/schema/calibration';
import type { StatePoint } from '@/lib/schema/house-state';
import type { PointPhotograph } from '@/lib/schema/point-photograph';
import type { House, Point } from '@/lib/schema/yard-view';
import { photographsOfPoint } from './attachment';
import { listCalibrations } from './calibration';
import { listNodes } from './node';
import { findPoint, listPoints } from './point';
import { pointHealth, type PointHealth } from './point-health';
import { readMemory } from './running';

export interface PointPage {
  house: House;
  point: Point;
  calibrations: Calibration[];
  health: PointHealth;
  photographs: PointPhotograph[];
  /** Null until the worker has stepped this house for the first time. */
  state: StatePoint | null;
}

/** Three reports make a point silent, as control counts it. */
const REPORTS = 3;

/** Null: no such point. @param ref key or id, out of an address */
export async function readPointPage(
  holding: Holding,
  house: House,
  ref: string,
  now: number,
): Promise<PointPage | null> {
  if (!/^[\w.-]{1,64}$/.test(ref)) return null;
  const point = await findPoint(holding, house.id, ref);
  if (point === null) return null;
  const node = (await listNodes(holding, house.id)).find((one) => one.key === point.node);
  const silentAfterS = point.staleAfter ?? REPORTS * (node?.reportEvery ?? 30);
  const points = await listPoints(holding, house.id);
  const memory = await readMemory(holding, house.id);
  return {
    ...{ house, point },
    calibrations: await listCalibrations(holding, point.id),
    health: await pointHealth(holding, house, point, points, silentAfterS, now),
    photographs: await photographsOfPoint(holding, point.id),
    state: memory?.state?.points.find((one) => one.key === point.key) ?? null,
  };
}
