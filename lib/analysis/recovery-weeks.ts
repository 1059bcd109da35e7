/** How a source's recovery goes from week to week, and before and after what was done to it. Made of kept nights. */
import type { NightSummary } from './nights';
import { type Shift, shiftOf, theilSen } from './ranks';
import {
  type Change,
  type EntryEffect,
  type Estimate,
  pooledRecovery,
  type RecoveryTrend,
  type RecoveryWeek,
} from './recovery';

/** What of a kept night the recovery is made of. */
export type NightOfRests = Pick<NightSummary, 'night' | 'from' | 'ends' | 'rests'>;

const DAY_MS = 86_400_000;

/** Name of the Monday's night of a night's week. @example weekOf('2026-11-26') === '2026-11-23' */
export function weekOf(night: string): string {
  // by the calendar's own arithmetic: of four hundred nights luxon would take a new process a tenth of what a page takes
  const at = Date.parse(`${night}T00:00:00Z`);
  const sinceMonday = (new Date(at).getUTCDay() + 6) % 7;
  return new Date(at - sinceMonday * DAY_MS).toISOString().slice(0, 10);
}

/** One entry a week that has nights, ascending. @param nights of one source, ascending */
export function recoveryWeeks(nights: readonly NightOfRests[]): RecoveryWeek[] {
  const weeks = new Map<string, NightOfRests[]>();
  for (const night of nights) {
    const week = weekOf(night.night);
    weeks.set(week, [...(weeks.get(week) ?? []), night]);
  }
  return [...weeks].map(([week, of]) => {
    const rests = of.flatMap((night) => night.rests);
    return {
      week,
      from: of[0]?.from ?? 0,
      to: of.at(-1)?.ends ?? 0,
      recovery: pooledRecovery(rests),
      rests: rests.length,
    };
  });
}

const WEEK_MS = 7 * DAY_MS;

/** The trend of ln τ over weeks, as a ratio a week. */
export function recoveryTrend(weeks: readonly RecoveryWeek[]): RecoveryTrend {
  const known = weeks.flatMap(({ from, recovery }) =>
    recovery === null ? [] : [{ x: from / WEEK_MS, y: Math.log(recovery.tau.value) }],
  );
  const slope = theilSen(known);
  const ratioPerWeek = slope === null ? null : ratioOf(slope);
  return { weeks: known.length, ratioPerWeek, change: changeOf(ratioPerWeek) };
}

function ratioOf({ value, low, high }: Estimate): Estimate {
  const raised = (end: number | null) => (end === null ? null : Math.exp(end));
  return { value: Math.exp(value), low: raised(low), high: raised(high) };
}

function changeOf(ratio: Estimate | null): Change {
  if (ratio === null || ratio.low === null || ratio.high === null) return 'cannot-tell';
  if (ratio.low > 1) return 'slower';
  return ratio.high < 1 ? 'quicker' : 'none-seen';
}

/** Nights on either side that are compared. */
const MOST_NIGHTS = 7;
/** What changes how a heap comes back; a cover does not, and a note is none. */
const KINDS: ReadonlySet<string> = new Set(['fed', 'watered', 'turned']);

/**
 * For each turning, feeding and watering: the nights before against the nights after, up to the next such entry on either
 * side. The night in which it was done belongs to neither. A night counts once, by its rests together: rests of one night
 * are alike, and counting each would find differences that are none.
 * @param entries ascending
 */
export function entryEffects(
  nights: readonly NightOfRests[],
  entries: readonly { at: number; kind: string }[],
): EntryEffect[] {
  const done = entries.filter(({ kind }) => KINDS.has(kind));
  if (done.length === 0) return [];
  const known = nights.flatMap(({ from, ends, rests }) => {
    const recovery = pooledRecovery(rests);
    return recovery === null
      ? []
      : [{ from, ends, logTau: Math.log(recovery.tau.value), level: recovery.level.value }];
  });
  return done.map(({ at, kind }) => {
    // several things done on one day are one: they cannot be told apart
    const last = done.findLast((one) => one.at < at - DAY_MS)?.at ?? -Infinity;
    const next = done.find((one) => one.at > at + DAY_MS)?.at ?? Infinity;
    const before = known.filter((night) => night.ends <= at && night.from >= last).slice(-MOST_NIGHTS);
    const after = known.filter((night) => night.from >= at && night.ends <= next).slice(0, MOST_NIGHTS);
    const tau = shiftOf(
      before.map((night) => night.logTau),
      after.map((night) => night.logTau),
    );
    const level = shiftOf(
      before.map((night) => night.level),
      after.map((night) => night.level),
    );
    const tauRatio = tau === null ? null : ratioOf(tau.shift);
    return {
      at,
      kind,
      nightsBefore: before.length,
      nightsAfter: after.length,
      tauRatio,
      levelChange: level?.shift ?? null,
      p: tau?.p ?? null,
      change: beyondChance(tau, tauRatio),
    };
  });
}

/** Interval and chance must agree: where ranks are shared they may part by a hair. */
function beyondChance(tau: Shift | null, ratio: Estimate | null): Change {
  const change = changeOf(ratio);
  if (change === 'cannot-tell' || change === 'none-seen') return change;
  return tau !== null && tau.p <= 0.05 ? change : 'none-seen';
}
