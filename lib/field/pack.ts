/**
 * From a SenML pack to readings of known points, in their own units. Names are point keys of the node
 * that sent it, and nothing else: a node cannot write into another's points.
 */
import type { RefusedRecord } from './frames';
import { resolvePack, type ResolvedRecord } from './senml';
import { toPointUnit, type PointUnit } from './units';

/** A time further ahead of ours than this is refused: a wrong clock must not outrank good readings. */
export const aheadMsMax = 120_000;

/** What must be known of a point to read its records. */
export interface PackPoint {
  unit: PointUnit;
  role: string;
}

export interface PackReading {
  /** where its record stood in the pack as sent */
  index: number;
  key: string;
  /** epoch milliseconds; rounded the same way every time, so that a re-sent stamp stays itself */
  at: number;
  /** in the point's unit */
  value: number;
}

export interface ReadPack {
  /** in order of time */
  readings: PackReading[];
  refused: RefusedRecord[];
}

/**
 * Reads a pack.
 *
 * @param pack records as parsed from JSON
 * @param points the node's points by key
 * @param now epoch milliseconds of app time, for relative times and for times too far ahead
 * @returns every record as a reading or as a refusal; records that hold base fields only are neither
 */
export function readPack(
  pack: readonly unknown[],
  points: ReadonlyMap<string, PackPoint>,
  now: number,
): ReadPack {
  const resolved = resolvePack(pack, now / 1000);
  const readings: PackReading[] = [];
  const refused = [...resolved.refused];
  for (const record of resolved.records) {
    const read = readRecord(record, points.get(record.n), now);
    if (typeof read === 'string')
      refused.push({ index: record.index, name: record.n.slice(0, 200), why: read });
    else readings.push(read);
  }
  refused.sort((a, b) => a.index - b.index);
  return { readings, refused };
}

/** The reading, or why there is none. */
function readRecord(record: ResolvedRecord, point: PackPoint | undefined, now: number): PackReading | string {
  if (point === undefined) return 'this node has no point of that name';
  const at = Math.round(record.t * 1000);
  if (at > now + aheadMsMax) return 'its time is more than 2 min ahead';
  if (at < 0) return 'its time is before 1970';
  const isContact = point.role === 'contact';
  if (record.vb !== undefined && !isContact) return 'true or false is not a measurement of this point';
  if (record.vs !== undefined) return 'text is not a measurement';
  if (record.vd !== undefined) return 'data is not a measurement';
  const sent = record.vb === undefined ? record.v : Number(record.vb);
  if (sent === undefined) return 'a sum alone is not a measurement';
  // True and false have no unit: a base unit that stands for the numbers beside them is not theirs.
  const converted = toPointUnit(sent, record.vb === undefined ? record.u : undefined, point.unit);
  if (!converted.ok) return converted.why;
  if (isContact && converted.value !== 0 && converted.value !== 1) return 'a contact is 0 or 1';
  return { index: record.index, key: record.n, at, value: converted.value };
}
