/** A pack as people watch it come: each reading in the unit of its point, each refusal as it was sent, with its reason. Pure. */
import type { RefusedRecord } from '@/lib/field/frames';
import type { PackPoint, PackReading } from '@/lib/field/pack';
import type { TailRecord } from '@/lib/live/frames';
import { isoUtc } from '../control/state';

/** A whole pack has at most a hundred records; a name that is no name may be long. */
const NAME_MOST = 60;

export function tailOf(
  readings: readonly PackReading[],
  refused: readonly RefusedRecord[],
  points: ReadonlyMap<string, PackPoint>,
  pack: readonly unknown[],
): TailRecord[] {
  const taken = readings.map(({ index, key, at, value }) => ({
    index,
    record: { name: key, value, unit: points.get(key)?.unit ?? null, at: isoUtc(at), why: null },
  }));
  const not = refused.map(({ index, name, why }) => ({
    index,
    record: { name: name.slice(0, NAME_MOST), ...sent(pack[index]), at: null, why },
  }));
  return [...taken, ...not].sort((a, b) => a.index - b.index).map(({ record }) => record);
}

function sent(record: unknown): { value: number | null; unit: string | null } {
  if (typeof record !== 'object' || record === null) return { value: null, unit: null };
  const { v, u } = record as Record<string, unknown>;
  return {
    value: typeof v === 'number' && Number.isFinite(v) ? v : null,
    unit: typeof u === 'string' ? u.slice(0, NAME_MOST) : null,
  };
}
