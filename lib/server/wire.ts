import { DateTime } from 'luxon';
import { isInstant } from '@/lib/control/because';
import type { LadderStep } from '@/lib/control/events';
import type { Data, DataValue } from '@/lib/control/types';

const QUARTER_MS = 900_000;
const REMEMBERED = 5000;

interface Offset {
  ms: number;
  /** `Z` or `+01:00`. */
  suffix: string;
}
/**
 * By zone and quarter of an hour: zones change on quarters. A house's state tells some thirty instants at each report,
 * and the offset is what costs, a hundredth of it the digits.
 */
const offsets = new Map<string, Offset>();

/** ISO 8601 with the offset that the zone has at that instant. */
export function isoIn(zone: string, at: number): string {
  const { ms, suffix } = offsetAt(zone, Math.floor(at / QUARTER_MS));
  return new Date(at + ms).toISOString().slice(0, -1) + suffix;
}

function offsetAt(zone: string, quarter: number): Offset {
  const key = `${zone} ${quarter}`;
  let offset = offsets.get(key);
  if (offset === undefined) {
    const local = DateTime.fromMillis(quarter * QUARTER_MS, { zone });
    const time = local.isValid ? local : DateTime.fromMillis(quarter * QUARTER_MS, { zone: 'utc' });
    offset = {
      ms: time.offset * 60_000,
      suffix: time.zone.isUniversal && time.offset === 0 ? 'Z' : time.toFormat('ZZ'),
    };
    if (offsets.size >= REMEMBERED) offsets.clear();
    offsets.set(key, offset);
  }
  return offset;
}

export function isoOrNull(zone: string, at: number | null): string | null {
  return at === null ? null : isoIn(zone, at);
}

/** A reason of the core as it goes on the wire: instants, which the core counts in milliseconds, become ISO times. */
export function wireData(zone: string, data: Data): Data {
  return Object.fromEntries(
    Object.entries(data).map(([field, value]) => [field, wireValue(zone, field, value)]),
  );
}

function wireValue(zone: string, field: string, value: DataValue): DataValue {
  if (typeof value === 'number') return isInstant(field) ? isoIn(zone, value) : value;
  if (Array.isArray(value)) return value.map((one) => wireValue(zone, field, one));
  if (value === null || typeof value !== 'object') return value;
  return wireData(zone, value);
}

export function wireLadder(zone: string, ladder: readonly LadderStep[]) {
  return ladder.map(({ claim, speaks, wants, because }) => ({
    claim,
    speaks,
    ...(wants === undefined ? {} : { wants }),
    ...(because === undefined ? {} : { because: wireData(zone, because) }),
  }));
}
