import { DateTime } from 'luxon';
import { isInstant } from '@/lib/control/because';
import type { Data, DataValue, LadderStep } from '@/lib/control/types';

/** ISO 8601 with the offset that the zone has at that instant. */
export function isoIn(zone: string, at: number): string {
  const time = DateTime.fromMillis(at, { zone });
  return (time.isValid ? time : DateTime.fromMillis(at, { zone: 'utc' })).toISO() ?? '';
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
