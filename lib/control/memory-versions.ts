/** Memories of earlier versions, and what makes today's of them. A step only knows today's. */
import {
  emptyMemory,
  MEMORY_VERSION,
  type Memory,
  type ParkedPoint,
  type PointMemory,
  type RuleMemory,
} from './memory';
import { inLists } from './readings';

/**
 * A memory from storage, brought to today's version. Null and undefined give an empty one; anything else that is
 * not a memory, or is of a later version than this code, throws: dropping it in silence would forget a rest.
 */
export function migrateMemory(json: unknown): Memory {
  if (json === null || json === undefined) return emptyMemory();
  if (typeof json !== 'object' || !('version' in json))
    throw new Error('This is not a memory of the control core.');
  const { version } = json;
  if (version !== 1 && version !== MEMORY_VERSION)
    throw new Error(
      `Memory of version ${String(version)} is unknown here; this code knows up to ${MEMORY_VERSION}.`,
    );
  // Written by this code alone and checked by its version; entries that lack a field are filled from an empty one.
  return withGainByRule({
    ...emptyMemory(),
    ...(version === 1 ? ofVersion1(json as MemoryV1) : (json as Memory)),
  });
}

/**
 * Want of gain was first kept by channel alone. Where there was none, no rule had any; where there was, which rule's it
 * was is not said, and a rule that finds its gain low takes it for its own (least-gain.ts).
 */
function withGainByRule(memory: Memory): Memory {
  if (memory.channels.some(({ gainLowSince }) => typeof gainLowSince === 'number')) return memory;
  const filled = (rules: RuleMemory[]): RuleMemory[] =>
    rules.map((rule) => ('gainLowSince' in rule ? rule : { ...rule, gainLowSince: null }));
  const { rules, parked } = memory;
  return { ...memory, rules: filled(rules), parked: { ...parked, rules: filled(parked.rules) } };
}

/** Version 1 kept a point's reading in its entry. */
interface PointV1 extends Omit<PointMemory, 'hasValue'> {
  value: number | null;
  at: number | null;
  lastAt: number | null;
  sameSince: number | null;
}

interface MemoryV1 extends Partial<Omit<Memory, 'version' | 'points' | 'readings' | 'parked'>> {
  points?: PointV1[];
  parked?: Omit<Memory['parked'], 'points'> & { points: PointV1[] };
}

function ofVersion1({ points = [], parked, ...memory }: MemoryV1): Partial<Memory> {
  return {
    ...memory,
    version: MEMORY_VERSION,
    ...inLists(points.map(pointOfVersion1)),
    ...(parked === undefined ? {} : { parked: { ...parked, points: parked.points.map(pointOfVersion1) } }),
  };
}

function pointOfVersion1({ value, at, lastAt, sameSince, ...point }: PointV1): ParkedPoint {
  return {
    ...point,
    hasValue: value !== null,
    suspects: Math.min(2, point.suspects),
    reading: { value: value ?? 0, at: at ?? 0, lastAt: lastAt ?? 0, sameSince: sameSince ?? at ?? 0 },
  };
}
