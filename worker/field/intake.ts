/** The path of a pack: read, seen by control at once, stored; only its acknowledgement waits for the disk. */
import { correct } from '@/db/queries/reading';
import type { ReadingRow } from '@/db/queries/reading-write';
import type { NodeWiring } from '@/db/queries/plan';
import type { RefusedRecord } from '@/lib/field/frames';
import { readPack, type PackReading } from '@/lib/field/pack';
import type { Base } from '../base';
import type { House } from '../control/house';
import type { Ingest, Stored } from './ingest';
import { pointsOf, qualityOf, type NodePoint } from './node-points';
import { tailOf } from './tail';

export interface Taken extends Stored {
  refused: RefusedRecord[];
}

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
  house.nodes.tookPack(node.id, { pack, refused, taken: readings.length }, () =>
    tailOf(readings, refused, points, pack),
  );
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

function row(house: House, { id, number }: NodePoint, { at, value }: PackReading): ReadingRow {
  const config = house.record.config.points.find((one) => one.id === id);
  const result = house.last?.points.find((one) => one.id === id);
  const quality = qualityOf(config, result, house.newestAt(id) === at, { at, value });
  return { point: number, at, value, quality };
}
