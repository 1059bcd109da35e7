/** What a step tells of: switchings with the ladder that decided them, what began or ended, and what is wrong. */
import type { Claim, Data, Quality, State } from './types';

export interface LadderStep {
  claim: Claim;
  speaks: boolean;
  wants?: State | 'hold';
  because?: Data;
}

/** The ladder down to the claim that decided, what stands under it, and what would follow it. */
export interface Explanation {
  channel: string;
  at: number;
  state: State;
  claim: Claim;
  until: number | null;
  ladder: LadderStep[];
  /** Claims under the one that decided that speak too, highest first; absent in what was stored before they were told. */
  under?: LadderStep[];
  /** What comes next, earliest first: when known, the claim that then decides, and what would bring it sooner. */
  next: Data[];
  rule: { id: string; version: number } | null;
}

export type ControlEvent = { at: number } & (
  | {
      kind: 'switching';
      channel: string;
      from: State;
      to: State;
      claim: Claim;
      explanation: Explanation;
      /** The step came late, and a later switching of this channel in the same step overtook this one: no command can carry it. */
      overtaken?: true;
    }
  /** Another claim decides, the state stays; a switching tells its claim itself. `before` is null at a channel's first step. */
  | {
      kind: 'decision';
      channel: string;
      state: State;
      claim: Claim;
      before: Claim | null;
      explanation: Explanation;
    }
  | { kind: 'rest-begun' | 'rest-ended'; source: string; why: Data }
  /** Told afterwards: a node ran its fallback while nobody commanded it. */
  | { kind: 'ran-alone'; channel: string; from: number; to: number }
  | { kind: 'latch'; rule: string; on: boolean }
  | { kind: 'hand-begun' | 'hand-ended'; channel: string; why: Data }
  | { kind: 'lock-out-begun' | 'lock-out-ended'; channel: string; why: Data }
  | { kind: 'command-refused'; number: number; channel: string | null; why: string }
  | { kind: 'quality'; point: string; from: Quality; to: Quality; why: string | null }
  | { kind: 'fault-begun' | 'fault-ended'; fault: Fault }
);

/** A standing condition somebody should know of; level-triggered: the list is whole at every step. */
export interface Fault {
  /** Stable while it stands: kind and what it is about. */
  key: string;
  kind:
    | 'frost'
    | 'point-bad'
    | 'point-unsteady'
    | 'core-under-floor'
    | 'core-not-good'
    | 'frost-without-reading'
    | 'hand-off-in-frost'
    | 'hand-on-in-frost'
    | 'interlock-blocks-frost'
    | 'high-limit'
    | 'no-gain'
    | 'daily-limit'
    | 'rest-ran-to-most'
    | 'fan-standing'
    | 'runs-though-off'
    | 'relay-does-not-follow'
    | 'frozen-point-in-frost';
  about: { point?: string; channel?: string; source?: string };
  since: number;
  data: Data;
}
