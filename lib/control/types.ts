/**
 * What the core is told; what it answers is in step-result.ts and events.ts. Everything is plain data in SI: °C, K, s, W;
 * instants are epoch milliseconds UTC. Ids are the database's, so that latches, timers and credits outlive a renaming.
 */
import type { ConditionTree, RuleBody } from './rule-body';

export type State = 'on' | 'off';
export type Quality = 'good' | 'uncertain' | 'bad';
export type Contact = 'NO' | 'NC';

/** The ladder, highest first. */
export const CLAIMS = [
  'lock-out',
  'interlock',
  'limit',
  'proving',
  'short-cycle',
  'hand',
  'source-guard',
  'frost',
  'fail-safe',
  'rest',
  'band',
  'idle',
] as const;
export type Claim = (typeof CLAIMS)[number];

/** What a reason or an explanation may carry: JSON, with instants as epoch ms in fields that end in `At`, `Until` or `Since` (`isInstant` in because.ts). */
export type Data = { [key: string]: DataValue };
export type DataValue = string | number | boolean | null | DataValue[] | { [key: string]: DataValue };

// ── configuration of one house, as the database keeps it ────────────────────────────────────────────────────────

export interface HouseConfig {
  house: {
    id: string;
    name: string;
    zone: string;
    latitude: number;
    longitude: number;
    altitude: number;
    frostLimit: number | null;
    frostAlarm: number | null;
  };
  points: PointConfig[];
  sources: SourceConfig[];
  loops: LoopConfig[];
  channels: ChannelConfig[];
  interlocks: InterlockConfig[];
  /** Rules in force only, one version each. */
  rules: RuleConfig[];
}

export interface PointConfig {
  id: string;
  key: string;
  name: string;
  role: string;
  unit: string;
  min: number | null;
  max: number | null;
  /** Seconds of silence after which the point is bad; null means three reporting intervals. */
  staleAfterS: number | null;
  /** Reporting interval of its node, s. */
  reportEveryS: number;
  /** Fastest plausible change, unit a second. */
  maxRate: number | null;
  frozenAfterS: number | null;
  sensor: string | null;
  derived: { of: string; points: string[]; windowS?: number } | null;
}

export interface SourceConfig {
  id: string;
  slug: string;
  name: string;
  kind: 'heap' | 'ground' | 'heater' | 'other';
  corePoint: string | null;
  basePoint: string | null;
  coreFloor: number | null;
  /** Channel-seconds on in the rolling 24 h; null means no limit. */
  dailyLimitS: number | null;
  ready: { level: number; forS: number } | null;
}

export interface LoopConfig {
  id: string;
  name: string;
  source: string | null;
  channel: string | null;
  intake: string | null;
  return: string | null;
}

export interface ChannelConfig {
  id: string;
  number: number;
  key: string;
  label: string;
  node: string | null;
  relay: number | null;
  /** Slug of its source. */
  source: string | null;
  frostHelp: boolean;
  contact: Contact;
  loadKind: 'motor' | 'vent' | 'heater' | 'valve' | 'lamp' | 'other';
  loadW: number | null;
  minOnS: number;
  minOffS: number;
  longestOnS: number | null;
  highLimit: { point: string; above: number } | null;
  runProof: { point: string; above: number } | null;
  /** Air through its loop while it runs, m³/s; without it the heat that a loop moves is unknown. */
  flowM3S?: number | null;
}

export interface InterlockConfig {
  id: string;
  channel: string;
  kind: 'never-with' | 'needs';
  other: string;
  delayS: number;
  frostMayBreak: boolean;
}

export interface RuleConfig {
  id: string;
  name: string;
  channel: string;
  versionId: string;
  version: number;
  body: RuleBody;
}

export type { ConditionTree, RuleBody };

// ── what the worker saw ─────────────────────────────────────────────────────────────────────────────────────────

export interface Observed {
  workerStartedAt: number;
  /** By point id: the newest reading by its own time; a point that never spoke is absent. */
  points: Record<string, ObservedPoint>;
  /** By channel id; a channel whose node never reported is absent. */
  relays: Record<string, ObservedRelay>;
  /** Not yet taken or taken: the core takes each number once, in order. */
  commands: PersonCommand[];
}

export interface ObservedPoint {
  /** Corrected by the calibration in force at the reading's time. */
  value: number;
  /** As sent, where a calibration changed it: a sensor's range and its fault values (85.0, −127) show only here. */
  raw?: number;
  at: number;
  /** Times of this point's readings since the step before, the newest not among them, ascending. */
  between?: number[];
}

export interface ObservedRelay {
  /** What the relay says of itself, as the load's state (an NC contact is turned round already). */
  reported: State | null;
  /** When that report was received. */
  reportedAt: number | null;
  /** The report names the newest command that changed this relay. */
  acknowledges: boolean;
  /** Latest instant at which a lease given so far can end; null: none was given. */
  leaseEndsAt: number | null;
  /** Nobody commanded the node when it reported, and its fallback has this coil on. */
  isAlone?: boolean;
  /** When this load ran by its node's own fallback, told since the step before; over, epoch ms. */
  ranAlone?: { from: number; to: number }[];
}

export type PersonCommand = { number: number; at: number; by: string } & (
  | { kind: 'hand'; channel: string; state: State; seconds: number; holdInFrost: boolean }
  | { kind: 'auto'; channel: string }
  | { kind: 'all-off'; seconds: number }
  | { kind: 'lock-out'; channel: string; lockout: string; why: string }
  | { kind: 'unlock'; channel: string; lockout: string }
  | { kind: 'prove'; channel: string; seconds: number }
  | { kind: 'prove-end'; channel: string }
  | { kind: 'ready'; source: string }
  | { kind: 'rebuilt'; source: string }
);
