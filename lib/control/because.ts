/**
 * Why a claim speaks, as data: one shape a claim. Sentences (lib/wording) and REST answers are made from these.
 * Points, channels and sources are named by key or slug, rules by name. Values are in the point's own unit, K for
 * differences; instants are epoch ms in fields for which `isInstant` holds; durations are seconds and end in `S`.
 */
import type { Claim, State } from './types';

/** True for a field that carries an instant: on the wire it becomes ISO 8601. */
export const isInstant = (field: string): boolean => /^(at|until)$|(At|Until|Since)$/.test(field);

export interface LockOutReason {
  lockouts: LockOutPlaced[];
}

export interface LockOutPlaced {
  id: string;
  why: string;
  by: string;
  placedAt: number;
  /** Only where a past moment is told, and it was removed since. */
  removedAt?: number;
  removedBy?: string;
}

export interface InterlockReason {
  /** `holds`: this channel is needed by `other`, which is not yet reported off. */
  kind: 'never-with' | 'needs' | 'holds';
  other: string;
  /** What the other's relay is known to be; null: not known. */
  otherState: State | null;
  delayS: number;
  /** When the delay is over, once it runs. */
  until: number | null;
}

export interface LimitReason {
  cause: 'high-limit' | 'high-limit-point-bad' | 'longest-on';
  point?: string;
  value?: number | null;
  above?: number;
  /** The load may run again at or under this. */
  againAtOrBelow?: number;
  longestOnS?: number;
  /** The least off time that a longest run must keep; after it the load waits to be wanted off once. */
  until?: number | null;
}

export interface ProvingReason {
  by: string;
  seconds: number;
  until: number;
}

export interface ShortCycleReason {
  holds: State;
  holdsSince: number;
  leastS: number;
  until: number;
  wanted: State;
  wantedBy: Claim;
}

export interface HandReason {
  state: State;
  by: string;
  givenAt: number;
  until: number;
  holdInFrost: boolean;
  /** The hand ends early because the channel's point is dead since then. */
  pointDeadSince?: number;
}

export interface SourceGuardReason {
  cause: 'core-floor' | 'not-ready';
  source: string;
  point: string | null;
  value: number | null;
  /** core-floor */
  floor?: number;
  againAtOrAbove?: number;
  /** not-ready: the core must stay above `level` for `forS`; it has been since `aboveSince`. */
  level?: number;
  forS?: number;
  aboveSince?: number | null;
  until?: number | null;
}

export interface FrostReason {
  /** The coldest point that is not bad; null while frost holds without any. */
  point: string | null;
  value: number | null;
  limit: number;
  endsAtOrAbove: number;
  frostSince: number;
  /** `helps` runs, `cools` stands still. */
  part: 'helps' | 'cools';
  /** What is drawn although a rest or the daily limit forbids it: recorded as borrowed. */
  borrows: 'rest' | 'daily-limit' | 'no-gain' | null;
  /** Without a reading: frost is held till then. */
  until?: number;
}

export interface FailSafeReason {
  safe: State;
  points: { point: string; why: string | null; lastAt: number | null }[];
  /** The relay dropped with its lease: no sensor is missing, nobody commanded it. */
  trip?: string;
  /** Between these two it dropped: its last renewal (null: not known any more), and the report that told of it. */
  lease?: { renewedAt: number | null; toldAt: number };
  /** The same, known only from control not running since. */
  stoppedAt?: number;
  /** Its node's own fallback switched it while nobody commanded the node; °C. */
  fallback?: {
    state: State;
    point: string | null;
    value: number | null;
    why: string | null;
    below: number | null;
    above: number | null;
  };
}

export interface RestReason {
  cause: 'credit-spent' | 'daily-limit' | 'no-gain' | 'not-worth-a-start';
  source: string;
  /** Share of the longest draw that is left, 0 to 1. */
  credit: number;
  /** Beginning of the undrawn time that counts; null while something draws in the rest. */
  restSince?: number | null;
  /** Known or earliest end. */
  restUntil?: number | null;
  /** Latest end, where the rest waits for a level. */
  restAtMostUntil?: number | null;
  recovery?: { point: string; value: number | null; level: number; good: boolean };
  /** Several rules may wait for several points: those after the first. */
  recoveries?: { point: string; value: number | null; level: number; good: boolean }[];
  /** Under this the frost limit breaks the rest. */
  frostBreaksBelow?: number;
  /** daily-limit, not-worth-a-start */
  drawnS?: number;
  limitS?: number | null;
  /** not-worth-a-start: what credit or limit would have to be worth. */
  leastOnS?: number;
  worthS?: number;
  /** no-gain */
  leastGainK?: number;
  until: number | null;
}

/** How a rule stands, in band and idle. */
export interface RuleStanding {
  rule: string;
  version: number;
  purpose: 'warm' | 'cool';
  /** The point in use; `standInFor` names the rule's own when it is another. */
  point: string;
  standInFor?: string;
  /** With the stand-in's offset added. */
  value: number | null;
  low: number;
  high: number;
  latch: boolean;
  why:
    | 'wants'
    | 'satisfied'
    | 'out-of-season'
    | 'out-of-hours'
    | 'condition-not-met'
    | 'condition-unknown'
    | 'point-bad';
  /** Facts without a good reading that leave the condition open. */
  unknown?: string[];
}

export interface BandReason extends RuleStanding {
  /** The latch turns off beyond this value: `above` for warm, `below` for cool. */
  stops: { side: 'above' | 'below'; value: number };
}

export interface IdleReason {
  rules: RuleStanding[];
}

export interface Reasons {
  'lock-out': LockOutReason;
  interlock: InterlockReason;
  limit: LimitReason;
  proving: ProvingReason;
  'short-cycle': ShortCycleReason;
  hand: HandReason;
  'source-guard': SourceGuardReason;
  frost: FrostReason;
  'fail-safe': FailSafeReason;
  rest: RestReason;
  band: BandReason;
  idle: IdleReason;
}
