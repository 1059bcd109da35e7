/**
 * The compiled configuration of one house: names are resolved to places in the arrays, durations are in ms, and what
 * a rule asks of the calendar is a function that remembers its last answer. Immutable as far as anybody can tell.
 */
import type { CompiledConditions } from './conditions';
import type { RuleCalendar, TimeFacts } from './calendar';
import type { PlanInterlock } from './interlocks';
import type { ChannelConfig, HouseConfig, PointConfig, RuleConfig, SourceConfig, State } from './types';

export interface Plan {
  /** The ids in order; a memory of the same shape needs no fitting. */
  shape: string;
  house: HouseConfig['house'];
  points: PlanPoint[];
  /** Where each key stands. */
  pointPlaces: Map<string, number>;
  /** Points that decide something: their silence is worth an alarm even before they ever spoke. */
  usedPoints: Set<number>;
  sources: PlanSource[];
  channels: PlanChannel[];
  rules: PlanRule[];
  interlocks: PlanInterlock[];
  /** Channels, needed ones before those that need them. */
  needsOrder: number[];
  /** Places of channels, by number: who asks first for the last of a credit. */
  order: number[];
  /** Derived points, each after its inputs. */
  derivedOrder: number[];
  /** house-air and bench points, which frost looks at. */
  housePoints: number[];
  parts: PlanPart[];
  /** By channel: its part. */
  partOf: number[];
  /** By point: the parts that ask for it. */
  askedBy: number[][];
  timeFacts: (at: number) => TimeFacts;
  usesTimeFacts: boolean;
  /** Keys that a rule, channel or point names and that do not exist: what hangs on them counts as bad. */
  missing: string[];
}

/** Places of what bears on each other: a part of the house (parts.ts). */
export interface PlanPart {
  channels: number[];
  sources: number[];
  rules: number[];
  /** The same channels, as in the plan's `order` and `needsOrder`. */
  order: number[];
  needsOrder: number[];
  hasInterlocks: boolean;
}

export interface PlanPoint {
  id: string;
  key: string;
  config: PointConfig;
  staleMs: number;
  frozenMs: number | null;
  /** Fastest plausible change, unit a ms. */
  maxRateMs: number | null;
  oneWire: boolean;
  isHouse: boolean;
  derived: PlanDerived | null;
}

export interface PlanDerived {
  of: string;
  inputs: number[];
  windowMs: number;
  /** Pa, from the house's altitude. */
  pressure: number;
  /** loop-heat: m³/s. */
  flowM3S: number | null;
}

export interface PlanSource {
  id: string;
  slug: string;
  config: SourceConfig;
  core: number | null;
  channels: number[];
  rules: number[];
  hasRest: boolean;
  dailyLimitMs: number | null;
}

export interface PlanChannel {
  id: string;
  key: string;
  number: number;
  config: ChannelConfig;
  source: number | null;
  rules: number[];
  /** What the load does with its coil off. */
  safe: State;
  minOnMs: number;
  minOffMs: number;
  highLimitPoint: number | null;
  runProofPoint: number | null;
  /** On in frost, off in frost, or neither. */
  inFrost: 'helps' | 'cools' | null;
  frostMayBreakRest: boolean;
  /** Interlocks of one kind with the channel at the other end. */
  neverWith: { lock: PlanInterlock; other: number }[];
  needs: PlanInterlock[];
  neededBy: PlanInterlock[];
}

export interface PlanRule {
  id: string;
  config: RuleConfig;
  channel: number;
  warm: boolean;
  /** The rule's own point, then its stand-ins; null: no such point. */
  points: { point: number | null; key: string; offset: number }[];
  calendar: (at: number) => RuleCalendar;
  only: CompiledConditions | null;
  rest: PlanRest | null;
}

export interface PlanRest {
  longestDrawMs: number;
  leastMs: number;
  mostMs: number | null;
  until: { point: number | null; key: string; level: number } | null;
  leastGain: {
    kelvin: number;
    afterMs: number;
    intake: number | null;
    return: number | null;
  } | null;
}
