/** What is known of a heap, and what a finding about it is made of. */
import type { CoreTrend, Dawn } from './core';
import type { HeapMix } from './material-book';
import type { RecoveryHistory } from './slower-recovery';

export const SMELLS = ['earthy', 'ammonia', 'rotten-egg', 'sour'] as const;
export type Smell = (typeof SMELLS)[number];
export const SQUEEZES = ['crumbles', 'drops', 'runs'] as const;
export type Squeeze = (typeof SQUEEZES)[number];

export interface BookEntry {
  id: string;
  /** Epoch ms */
  at: number;
  kind: string;
  smell: Smell | null;
  squeeze: Squeeze | null;
}

/**
 * What was written of the heap that stands: from its last building on, all of it where no building is in the book. A heap
 * that was built anew is another one, and what was done to the old one says nothing of it.
 * @param entries newest first
 */
export function sinceBuilt<Entry extends { at: string; kind: string }>(
  entries: readonly Entry[],
): readonly Entry[] {
  const built = entries.find((entry) => entry.kind === 'built');
  if (built === undefined) return entries;
  const from = Date.parse(built.at);
  return entries.filter((entry) => Date.parse(entry.at) >= from);
}

export interface HeapFacts {
  now: number;
  core: { value: number; at: number } | null;
  trend: CoreTrend | null;
  /** One a day, oldest first. */
  dawns: readonly Dawn[];
  recovery: RecoveryHistory | null;
  mix: HeapMix | null;
  /** Newest first. */
  entries: readonly BookEntry[];
  /** Of the last probe round. */
  probes: { id: string; at: number; hottestC: number; coldestC: number } | null;
}

/** `act` is for now, `soon` for the next days, `look` for a look. */
export type Urgency = 'act' | 'soon' | 'look';
/** How sure: measured beyond its error; seen by hand or nose; or reckoned from figures of a table. */
export type Sureness = 'measured' | 'seen' | 'reckoned';

export type FindingBody =
  | { kind: 'core-falls'; changeK: number; days: number; hasTurned: boolean }
  | { kind: 'recovery-slower'; fromS: number; toS: number; sdS: number; weeks: number }
  | { kind: 'dry'; squeeze: Squeeze | null; moisture: number | null; sd: number | null }
  | { kind: 'wet'; squeeze: Squeeze | null; smell: Smell | null; moisture: number | null; sd: number | null }
  | { kind: 'cn-low'; smell: Smell | null; cn: number | null; sd: number | null }
  | { kind: 'cn-high'; cn: number; sd: number }
  | { kind: 'too-hot'; celsius: number; from: 'core' | 'probes'; limit: number }
  | { kind: 'uneven'; hottestC: number; coldestC: number };

export const FINDING_KINDS = [
  'core-falls',
  'recovery-slower',
  'dry',
  'wet',
  'cn-low',
  'cn-high',
  'too-hot',
  'uneven',
] as const satisfies FindingBody['kind'][];

export type Finding = FindingBody & {
  urgency: Urgency;
  sure: Sureness;
  /** Epoch ms of the newest of its evidence. */
  at: number;
  /** What the evidence is; another mark is new evidence. */
  mark: string;
  /** How bad, in steps of `step`: a step worse is new evidence too. */
  level: number;
  step: number;
};

export interface Dismissal {
  id: string;
  kind: string;
  mark: string;
  level: number;
  why: string;
  by: string;
  at: number;
}

export interface Findings {
  open: Finding[];
  dismissed: { finding: Finding; dismissal: Dismissal }[];
}
