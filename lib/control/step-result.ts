import type { Memory } from './memory';
import type { ChannelResult, ControlEvent, Fault, PointResult, SourceResult } from './types';

/** What one step answers. */
export interface StepResult {
  memory: Memory;
  /** In the plan's order, as points and sources are. */
  channels: ChannelResult[];
  points: PointResult[];
  sources: SourceResult[];
  faults: Fault[];
  /**
   * What changed. After a late step they are told with the instants at which they were due, in order; a channel's
   * switchings that a later one overtook are marked.
   */
  events: ControlEvent[];
  /** Earliest instant at which something changes without a new reading; null: nothing is pending. */
  wakeAt: number | null;
}
