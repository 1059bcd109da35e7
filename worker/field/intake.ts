/** The path of a pack: read, seen by control at once, stored; only its acknowledgement waits for the disk. */
import { correct } from '@/db/queries/reading';
import type { ReadingRow } from '@/db/queries/reading-write';
import type { NodeWiring, PointWiring } from '@/db/queries/plan';
import type { RefusedRecord } from '@/lib/field/frames';
import { readPack, type PackPoint, type PackReading } from '@/lib/field/pack';
import { pointUnits, type PointUnit } from '@/lib/field/units';
import type { Base } from '../base';
import type { House } from '../control/house';
import type { Ingest, Stored } from './ingest';

export interface Taken extends Stored {
  refused: RefusedRecord[];
}

const QUALITY = { good: 0, uncertain: 1, bad: 2 } as const;

/** @returns once the pack is durable */
export async function takePack(
  base: Base,
  ingest: Ingest,
  house: House,
  node: NodeWiring,
  pack: readonly unknown[],
): Promise<Taken> {
  const points = pointsOf(house.record.points, node.id);
  const { readings, refused } = readPack(pack, points, base.clock.appNow());
  base.metrics.add('readings_refused_total', refused.length);
  house.nodes.heard(node.id);
  const known = readings.flatMap((reading) => {
    const point = points.get(reading.key);
    return point === undefined ? [] : [{ point, reading }];
  });
  house.observe(
    known.map(({ point: { id, calibrations }, reading: { at, value } }) => ({
      ...{ pointId: id, at, raw: value },
      value: correct(calibrations, at, value),
    })),
  );
  if (known.length > 0) house.step();
  const rows = known.map(({ point, reading }) => row(house, point, reading));
  return { ...(await ingest.store(rows)), refused };
}

interface NodePoint extends PackPoint {
  id: string;
  number: number;
  calibrations: PointWiring['calibrations'];
}

const kept = new WeakMap<readonly PointWiring[], Map<string, Map<string, NodePoint>>>();

/** Points of a node by key; a house's list is a new one after each change of its plan. */
function pointsOf(all: readonly PointWiring[], nodeId: string): Map<string, NodePoint> {
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

/** The core judges the newest reading of a point; of those before it only what the sensor's range tells is known. */
function row(house: House, { id, number }: NodePoint, { at, value }: PackReading): ReadingRow {
  const config = house.record.config.points.find((one) => one.id === id);
  const result = house.last?.points.find((one) => one.id === id);
  let quality: ReadingRow['quality'] = isOutside(config, value) ? QUALITY.bad : QUALITY.good;
  const isNewest = house.newestAt(id) === at;
  if (isNewest && result !== undefined && config?.derived === null) {
    // Where the core kept an older value, it did not believe this one.
    quality = result.at === at ? QUALITY[result.quality] : QUALITY.bad;
  }
  return { point: number, at, value, quality };
}

function isOutside(
  config: { min: number | null; max: number | null; sensor: string | null } | undefined,
  value: number,
): boolean {
  if (config === undefined) return false;
  if (config.sensor === 'one-wire' && (value === -127 || value === 85)) return true;
  return value < (config.min ?? -Infinity) || value > (config.max ?? Infinity);
}
