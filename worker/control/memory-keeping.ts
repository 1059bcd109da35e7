/**
 * When a house's memory is kept though no event says so. Timers begin and end silently, and what relays report moves
 * others; a worker that is killed must find them where they were. Readings, which move with every pack, are not worth a
 * write: the newest of each point is stored by itself, and what hangs on the older ones is kept now and then.
 */
import type { ChannelMemory, Memory, PointMemory } from '@/lib/control/memory';

/** Without any change the memory is kept this often all the same; app time, as that is what its readings age in. */
const EVERY_MS = 60_000;

export class MemoryKeeping {
  private kept: Memory | null = null;
  private keptAtMs = -Infinity;

  /** @param rate seconds of app time a second of real time */
  constructor(private readonly rate: number) {}

  /** @param nowMs monotonic real time */
  isDue(memory: Memory, nowMs: number): boolean {
    if (this.kept === null || nowMs - this.keptAtMs >= EVERY_MS / this.rate) return true;
    return memory !== this.kept && !remembersSame(this.kept, memory);
  }

  keep(memory: Memory, nowMs: number): void {
    this.kept = memory;
    this.keptAtMs = nowMs;
  }
}

/** The core shares what stays as it was, so what is not the same entry is looked at field by field, and no deeper. */
function remembersSame(kept: Memory, now: Memory): boolean {
  if (kept.shape !== now.shape) return false;
  return (
    areSame(kept.channels, now.channels, isSameChannel) &&
    areSame(kept.sources, now.sources, (before, one) => isShallowSame(before, one)) &&
    areSame(kept.rules, now.rules, (before, one) => isShallowSame(before, one)) &&
    areSame(kept.points, now.points, isSamePoint) &&
    (kept.frost === now.frost || isShallowSame(kept.frost, now.frost))
  );
}

function areSame<T>(
  before: readonly T[],
  now: readonly T[],
  isSame: (before: T, now: T) => boolean,
): boolean {
  if (before === now) return true;
  return (
    before.length === now.length &&
    now.every((one, place) => {
      const former = before[place];
      return former === one || (former !== undefined && isSame(former, one));
    })
  );
}

/** That a relay says the same again is no change. */
const isSameChannel = (before: ChannelMemory, now: ChannelMemory): boolean =>
  before.relay?.reported === now.relay?.reported && isShallowSame(before, now, 'relay');

/** What it says, and how often it was plausible, changes with every reading. */
const isSamePoint = (before: PointMemory, now: PointMemory): boolean =>
  before.quality === now.quality &&
  before.dropped?.why === now.dropped?.why &&
  before.uncertainSince === now.uncertainSince &&
  before.contradictedSince === now.contradictedSince &&
  before.doubts === now.doubts;

/** Asked at nearly every step of every house: no lists are made for it. */
function isShallowSame<T extends object>(before: T, now: T, but?: keyof T): boolean {
  for (const field in now) if (field !== but && before[field] !== now[field]) return false;
  return true;
}
