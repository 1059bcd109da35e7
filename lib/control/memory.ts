/**
 * What must survive a restart. Plain JSON: `JSON.parse(JSON.stringify(memory))` is the same memory. Entries carry
 * the database's ids and stand in the plan's order (`fit.ts` puts them there), so a hot step copies arrays, not maps.
 * A step never changes the memory that it is given; what stays the same is shared with the one that it returns.
 */
import type { Fault } from './events';
import type { Claim, Quality, State } from './types';

export const MEMORY_VERSION = 2;

export interface Memory {
  version: typeof MEMORY_VERSION;
  /** Instant of the last step; null before the first. */
  at: number | null;
  /** Earliest instant after `at` at which something changes by itself, as known then. */
  wakeAt: number | null;
  /** The plan's ids in order: entries below stand in it. */
  shape: string;
  /** Greatest number of a person's command taken. */
  taken: number;
  points: PointMemory[];
  readings: Readings;
  rules: RuleMemory[];
  sources: SourceMemory[];
  channels: ChannelMemory[];
  frost: FrostMemory;
  faults: Fault[];
  /** Entries whose ids the plan no longer has; they come back with their ids. */
  parked: { points: ParkedPoint[]; rules: RuleMemory[]; sources: SourceMemory[]; channels: ChannelMemory[] };
}

export interface PointMemory {
  id: string;
  /** Whether it has a value in use: it spoke, or, being derived, could be reckoned. */
  hasValue: boolean;
  /** Implausible readings in a row, counted to 2. */
  suspects: number;
  /** Good readings in a row, counted to 3. */
  goodRun: number;
  /** What dropped the quality, silence apart. */
  dropped: { quality: 'uncertain' | 'bad'; why: string } | null;
  /** Quality and reason at the last step. */
  quality: Quality;
  why: string | null;
  uncertainSince: number | null;
  /** When and why it was in doubt; null: it never was. Memories of before this was kept lack it. */
  doubts: DoubtMemory | null;
  /** A frozen cold point that another house point contradicts, since then. */
  contradictedSince: number | null;
  /** trend: [time, value], thinned to the window's needs. */
  trail: [number, number][] | null;
}

/**
 * The reading in use of each point, in the order of `points`: the last plausible one. Every pack of readings changes all
 * of them, and little else of a point; so they stand in lists of plain numbers, which a step copies at once.
 */
export interface Readings {
  /** What counts only where the point's `hasValue` says so. */
  value: number[];
  /** Time of the reading; 0: there was none. */
  at: number[];
  /** Time of the newest reading, plausible or not; 0: there was none. */
  lastAt: number[];
  /** Since when the value has been the same to the last bit, by readings' times. */
  sameSince: number[];
}

/** A point that the plan no longer has, with the reading that it had. */
export interface ParkedPoint extends PointMemory {
  reading: { value: number; at: number; lastAt: number; sameSince: number };
}

export interface DoubtMemory {
  /** Since when it is not good, and what dropped it; null while it is. */
  since: number | null;
  why: string | null;
  /** The last time in doubt that is over. */
  last: { why: string | null; from: number; to: number } | null;
  /** Its newest drops, three at most. */
  drops: number[];
  /** Good without a break since, while that is not yet believed. */
  goodSince: number | null;
}

export interface RuleMemory {
  id: string;
  latch: boolean;
  /** Which point is in use: 0 the rule's own, 1 its first stand-in, … */
  using: number;
  /** Its channel's draw has been without its least gain since; memories of before this was kept by rule lack it. */
  gainLowSince?: number | null;
}

export interface SourceMemory {
  id: string;
  /** Credit at `creditAt`, and its change a millisecond from there on. */
  credit: number;
  creditAt: number;
  slope: number;
  resting: boolean;
  /** Beginning of the undrawn time of this rest; null while not resting or while something draws in it. */
  restSince: number | null;
  restWhy: 'credit-spent' | 'no-gain' | null;
  /** The least gain that the draw was without; memories of before this was kept lack it. */
  restGainK?: number;
  /** The last rest ended only by its longest time. */
  ranToMost: boolean;
  /** Channels drawing. */
  draws: number;
  /** On time of the last 24 h: [from, to, channels]; `to` is null while it goes on. Milliseconds. */
  spans: [number, number | null, number][];
  day: { usedMs: number; at: number; slope: number; nextAt: number | null };
  underFloor: boolean;
  ready: boolean;
  /** Core strictly above the ready level without a break since. */
  aboveSince: number | null;
}

export interface HandMemory {
  state: State;
  by: string;
  number: number;
  givenAt: number;
  until: number;
  holdInFrost: boolean;
}

export interface RelayMemory {
  reported: State | null;
  reportedAt: number | null;
  acknowledges: boolean;
  leaseEndsAt: number | null;
  /** Its node's fallback has it on, and nobody commands the node. */
  isAlone?: boolean;
  /** The step that was told this. */
  seenAt: number;
}

export interface ChannelMemory {
  id: string;
  /** Of the load. */
  wanted: State;
  /** The step that ordered it: a report told to that step or before cannot acknowledge it. */
  orderedAt: number | null;
  claim: Claim | null;
  /** What counts for timers and credit, and since when; null: longer than anybody remembers. */
  counted: State;
  countedSince: number | null;
  /** Least times run from here: as `countedSince`, but for the end of a proving run. */
  leastSince: number | null;
  /** What the relay is known to be, for interlocks; null: cannot be said. */
  known: State | null;
  knownSince: number | null;
  relay: RelayMemory | null;
  hand: HandMemory | null;
  /** `carries`: it is this pulse that makes the load run. */
  prove: { by: string; seconds: number; until: number } | null;
  lockouts: { id: string; why: string; by: string; placedAt: number }[];
  overHighLimit: boolean;
  /** A longest run has ended: the load keeps off till the claims have wanted it off once. */
  ranLongest: { at: number; wantedOff: boolean } | null;
  /** None of its rules has had a usable point since. */
  pointDeadSince: number | null;
  gainLowSince: number | null;
  noGainUntil: number | null;
  /** The least gain that its draw was without when that ended it last; absent: none ever did, or it was before this was kept. */
  noGainK?: number;
  /** What its node's fallback ran up to then has been taken in; absent: nothing was ever told. */
  aloneTill?: number;
  /** Ordered on, but its proof point shows nothing. */
  standing: boolean;
  /** Off, but its proof point shows that it runs; memories of before this was kept lack it. */
  unbidden?: boolean;
}

export interface FrostMemory {
  on: boolean;
  since: number | null;
  /** No house reading since; a begun frost holds for 30 min. */
  blindSince: number | null;
  /** Under the frost alarm. */
  alarm: boolean;
}

/** A memory that remembers nothing: least off passed, credit 1, heaps not ready, latches off. */
export function emptyMemory(): Memory {
  return {
    version: MEMORY_VERSION,
    at: null,
    wakeAt: null,
    shape: '',
    taken: 0,
    points: [],
    readings: { value: [], at: [], lastAt: [], sameSince: [] },
    rules: [],
    sources: [],
    channels: [],
    frost: { on: false, since: null, blindSince: null, alarm: false },
    faults: [],
    parked: { points: [], rules: [], sources: [], channels: [] },
  };
}
