/** The points of a node as a pack names them, and how its readings are judged when they are stored. */
import type { PointWiring } from '@/db/queries/plan';
import type { ReadingRow } from '@/db/queries/reading-write';
import type { PackPoint } from '@/lib/field/pack';
import { pointUnits, type PointUnit } from '@/lib/field/units';
import type { PointResult } from '@/lib/control/step-result';
import type { PointConfig } from '@/lib/control/types';

const QUALITY = { good: 0, uncertain: 1, bad: 2 } as const;

export interface NodePoint extends PackPoint {
  id: string;
  number: number;
  calibrations: PointWiring['calibrations'];
}

const kept = new WeakMap<readonly PointWiring[], Map<string, Map<string, NodePoint>>>();

/** Points of a node by key; a house's list is a new one after each change of its plan. */
export function pointsOf(all: readonly PointWiring[], nodeId: string): Map<string, NodePoint> {
  const byNode = kept.get(all) ?? new Map<string, Map<string, NodePoint>>();
  kept.set(all, byNode);
  const before = byNode.get(nodeId);
  if (before !== undefined) return before;
  const points = new Map(
    all.flatMap(({ id, number, nodeId: of, key, role, unit, calibrations }) =>
      of === nodeId && isUnit(unit) ? [[key, { id, number, role, unit, calibrations }] as const] : [],
    ),
  );
  byNode.set(nodeId, points);
  return points;
}

function isUnit(unit: string): unit is PointUnit {
  return (pointUnits as readonly string[]).includes(unit);
}

/**
 * The core judges the newest reading of a point; of those before it only what the sensor's range tells is known.
 * @param result what the core says of the point since it saw this reading
 */
export function qualityOf(
  config: PointConfig | undefined,
  result: PointResult | undefined,
  isNewest: boolean,
  { at, value }: { at: number; value: number },
): ReadingRow['quality'] {
  if (isNewest && result !== undefined && config?.derived === null) {
    // Where the core kept an older value, it did not believe this one.
    return result.at === at ? QUALITY[result.quality] : QUALITY.bad;
  }
  return isOutside(config, value) ? QUALITY.bad : QUALITY.good;
}

function isOutside(config: PointConfig | undefined, value: number): boolean {
  if (config === undefined) return false;
  if (config.sensor === 'one-wire' && (value === -127 || value === 85)) return true;
  return value < (config.min ?? -Infinity) || value > (config.max ?? Infinity);
}
