/** How a house stands and what its core remembers: when that is told and kept, and as which rows. */
import type { MemoryRow } from '@/db/queries/running';
import type { Memory } from '@/lib/control/memory';
import type { HouseState } from '@/lib/schema/house-state';
import type { ControlledHouse, HouseDeps } from './house-deps';
import { MemoryKeeping } from './memory-keeping';

/** States go to browsers and database at most five times a second. */
const STATE_EVERY_MS = 200;

export class HouseRows {
  state: HouseState | null = null;
  private stateAtMs = -Infinity;
  private readonly keeping: MemoryKeeping;

  constructor(
    private readonly house: ControlledHouse,
    /** Greatest number of a person's command whose taking is kept. */
    public takenKept: number,
    private readonly deps: HouseDeps,
  ) {
    this.keeping = new MemoryKeeping(deps.clock.rate);
  }

  /**
   * State always, memory where something happened or changed silently; null while the last one is too fresh to write again.
   * @param stateNow how the house stands by the step that left this memory
   */
  toKeep(memory: Memory, stateNow: () => HouseState, now: number, isEvent: boolean): MemoryRow | null {
    const nowMs = this.deps.clock.monotonicMs();
    const isDue = nowMs - this.stateAtMs >= STATE_EVERY_MS;
    if (!isEvent && !isDue) {
      this.house.stepWithin(STATE_EVERY_MS);
      return null;
    }
    this.stateAtMs = nowMs;
    this.state = stateNow();
    this.deps.onState(this.house, this.state);
    const withMemory = isEvent || this.keeping.isDue(memory, nowMs);
    if (withMemory) this.keeping.keep(memory, nowMs);
    return withMemory ? this.memoryRow(memory, now) : this.stateRow(now);
  }

  memoryRow(memory: Memory, now: number): MemoryRow {
    this.takenKept = memory.taken;
    return {
      ...this.stateRow(now),
      memory: { ...memory },
      memoryAt: new Date(now),
      taken: memory.taken,
      planRevision: this.house.record.planRevision,
      epoch: this.deps.epoch(),
    };
  }

  private stateRow(now: number): MemoryRow {
    return {
      holdingId: this.house.holdingId,
      houseId: this.house.id,
      state: this.state === null ? null : { ...this.state },
      stateAt: new Date(now),
    };
  }
}
