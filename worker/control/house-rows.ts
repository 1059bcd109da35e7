/** How a house stands and what its core remembers: when that is told and kept, and as which rows. */
import type { MemoryRow } from '@/db/queries/running';
import type { Memory } from '@/lib/control/memory';
import type { HouseState } from '@/lib/schema/house-state';
import type { Cancel } from '../clock';
import type { ControlledHouse, HouseDeps } from './house-deps';

/** States go to browsers and database at most five times a second. */
const STATE_EVERY_MS = 200;
/** Without any event the memory is kept this often all the same. */
const MEMORY_EVERY_MS = 60_000;

export class HouseRows {
  state: HouseState | null = null;
  private cancelState: Cancel | null = null;
  private stateAtMs = -Infinity;
  private memoryAtMs = -Infinity;

  constructor(
    private readonly house: ControlledHouse,
    /** Greatest number of a person's command whose taking is kept. */
    public takenKept: number,
    private readonly deps: HouseDeps,
  ) {}

  /**
   * State always, memory where something happened; null while the last one is too fresh to write again.
   * @param stateNow how the house stands by the step that left this memory
   */
  toKeep(memory: Memory, stateNow: () => HouseState, now: number, isEvent: boolean): MemoryRow | null {
    const nowMs = this.deps.clock.monotonicMs();
    const isDue = nowMs - this.stateAtMs >= STATE_EVERY_MS;
    if (!isEvent && !isDue) {
      this.cancelState ??= this.deps.clock.after(STATE_EVERY_MS, () => {
        this.cancelState = null;
        this.house.step();
      });
      return null;
    }
    this.stateAtMs = nowMs;
    this.state = stateNow();
    this.deps.onState(this.house, this.state);
    const withMemory = isEvent || nowMs - this.memoryAtMs >= MEMORY_EVERY_MS;
    if (withMemory) this.memoryAtMs = nowMs;
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

  stop(): void {
    this.cancelState?.();
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
