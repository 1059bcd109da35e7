/** What one step answers: what each channel is to do and why, how good each point is, how each source stands. */
import type { ControlEvent, Fault } from './events';
import type { Memory } from './memory';
import type { Claim, Data, Quality, State } from './types';

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

export interface ChannelResult {
  id: string;
  number: number;
  /** Of the load. */
  state: State;
  /** Of the relay's coil: what is sent. */
  coil: State;
  claim: Claim;
  because: Data;
  /** When this decision ends by itself, if it does. */
  until: number | null;
  mode: 'auto' | 'hand' | 'locked';
  /** The state that counts for timers and credit: reported where that is fresh, else wanted. */
  counted: State;
}

export interface PointResult {
  id: string;
  /** The value in use: the last plausible one. */
  value: number | null;
  at: number | null;
  quality: Quality;
  /** Why it is not good: silent, out-of-range, one-wire-fault, too-fast, frozen, unsteady, input-bad … */
  why: string | null;
  /** Since when it is in doubt; null while it is good, and for a derived point. */
  doubtSince: number | null;
  /** The last time of doubt that is over: what dropped it, and when it came back. */
  lastDoubt: { why: string | null; from: number; to: number } | null;
}

export interface SourceResult {
  id: string;
  slug: string;
  /** Share of the longest draw that is left, 0 to 1. */
  credit: number;
  restSince: number | null;
  /** Earliest or known end of the rest; null: not resting. */
  restUntil: number | null;
  /** Latest end of a rest that waits for a level; null otherwise. */
  restAtMostUntil: number | null;
  /** Channel-seconds on in the rolling 24 h. */
  drawnTodayS: number;
  drawing: boolean;
  ready: boolean | null;
  underFloor: boolean;
}
