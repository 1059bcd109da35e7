/**
 * A source's draw credit, rest and rolling day. Credit and day are kept as a value at an instant and a slope from
 * there, anchored anew only when the slope changes: so they do not depend on how often anybody looked.
 */
import type { SourceMemory } from './memory';
import { settleDay, usedMs } from './day';
import { isUnder } from './lines';
import { dueAt, entry, wakeAt, type Run } from './run';
import type { PlanSource } from './plan';

/** Credit of a source at an instant, 0 to 1. */
export function creditAt(memory: SourceMemory, at: number): number {
  if (memory.resting) return 0;
  return Math.min(1, Math.max(0, memory.credit + memory.slope * (at - memory.creditAt)));
}

/** A whole ms not before the exact instant; the guard takes the last digits of a division. */
const ceilMs = (ms: number): number => Math.ceil(ms - 1e-6);

const inSeason = (run: Run, rule: number): boolean => run.calendars[rule]?.inSeason === true;

/** Whether a rule's rest counts: those in season do; of all, if none is. */
export function counts(run: Run, rules: readonly number[], rule: number): boolean {
  return inSeason(run, rule) || !rules.some((one) => inSeason(run, one));
}

/**
 * What a channel's draw costs its source, share a ms: by the smallest longest draw of its rules in season, of all if
 * none is. With a rule in season and no rest among those that are, it costs nothing: a summer rule has no winter's rest.
 */
export function drawCost(run: Run, channel: number): number {
  let cost = 0;
  let costOfAll = 0;
  let anyInSeason = false;
  const { rules } = entry(run.plan.channels, channel);
  for (const index of rules) {
    const { rest } = entry(run.plan.rules, index);
    const now = inSeason(run, index);
    anyInSeason ||= now;
    if (rest === null) continue;
    costOfAll = Math.max(costOfAll, 1 / rest.longestDrawMs);
    if (now) cost = Math.max(cost, 1 / rest.longestDrawMs);
  }
  return anyInSeason ? cost : costOfAll;
}

/** The largest least rest of the rules that count, ms. */
export function leastRestMs(run: Run, source: PlanSource): number {
  let least = 0;
  for (const index of source.rules)
    if (counts(run, source.rules, index))
      least = Math.max(least, entry(run.plan.rules, index).rest?.leastMs ?? 0);
  return least;
}

/** What a rest waits for past its least, and for how long at most. */
export interface Wait {
  until: { point: number | null; key: string; level: number };
  mostMs: number;
}

/** The waits of the rules that count. */
export function waitsOf(run: Run, source: PlanSource): Wait[] {
  return source.rules.flatMap((index) => {
    const { rest } = entry(run.plan.rules, index);
    if (rest === null || rest.until === null || !counts(run, source.rules, index)) return [];
    return [{ until: rest.until, mostMs: rest.mostMs ?? rest.leastMs }];
  });
}

/** Whether a load takes heat from its source: it counts as on, and its proof, if it has one, does not deny it. */
export const draws = (run: Run, channel: number): boolean => {
  const memory = entry(run.channels, channel);
  return memory.counted === 'on' && !memory.standing;
};

/** Settles a source at `run.at`: what draws, what that costs, whether its rest begins or ends. */
export function settleSource(run: Run, index: number): void {
  const source = entry(run.plan.sources, index);
  const before = entry(run.sources, index);
  let number = 0;
  let cost = 0;
  for (const channel of source.channels) {
    if (!draws(run, channel)) continue;
    number += 1;
    cost += drawCost(run, channel);
  }
  run.drawCount[index] = number;
  run.drawRate[index] = cost;
  let memory = before;
  const zeroAt = spentAt(memory);
  if (zeroAt !== null && run.at >= zeroAt) memory = beginRest(run, memory, 'credit-spent');
  if (memory.resting) memory = settleRest(run, source, memory, number);
  const slope = slopeOf(run, source, memory, number, cost);
  if (slope !== memory.slope)
    memory = { ...memory, credit: creditAt(memory, run.at), creditAt: run.at, slope };
  memory = settleDay(memory, number, run.at);
  if (memory.day.nextAt !== null) dueAt(run, memory.day.nextAt);
  const spends = spentAt(memory);
  if (spends !== null) wakeAt(run, spends);
  if (source.dailyLimitMs !== null && number > 0) {
    const left = source.dailyLimitMs - usedMs(memory, run.at);
    if (left > 0 && memory.day.slope > 0) wakeAt(run, run.at + ceilMs(left / memory.day.slope));
    if (memory.day.nextAt !== null) wakeAt(run, memory.day.nextAt);
  }
  if (memory !== before) run.sources[index] = memory;
}

/** When the credit will be spent at the present slope; null: it does not fall. */
function spentAt(memory: SourceMemory): number | null {
  if (memory.resting || memory.slope >= 0) return null;
  return memory.creditAt + Math.max(0, ceilMs(memory.credit / -memory.slope));
}

function slopeOf(run: Run, source: PlanSource, memory: SourceMemory, number: number, cost: number): number {
  if (memory.resting || !source.hasRest) return 0;
  // a draw that costs nothing still keeps the credit from coming back; 0 − 0 is 0, where −0 would not survive JSON
  if (number > 0) return 0 - cost;
  return 1 / Math.max(1, leastRestMs(run, source));
}

/** Credit 0; the undrawn time counts from when the last draw ends. */
export function beginRest(run: Run, memory: SourceMemory, why: 'credit-spent' | 'no-gain'): SourceMemory {
  run.events.push({ kind: 'rest-begun', at: run.at, source: memory.id, why: { cause: why } });
  return { ...memory, resting: true, restSince: null, restWhy: why, credit: 0, creditAt: run.at, slope: 0 };
}

function settleRest(run: Run, source: PlanSource, memory: SourceMemory, number: number): SourceMemory {
  // a draw within a rest starts it anew
  if (number > 0) return memory.restSince === null ? memory : { ...memory, restSince: null };
  const since = memory.restSince ?? run.at;
  const ends = restEnd(run, source, since);
  if (ends === null) return memory.restSince === since ? memory : { ...memory, restSince: since };
  run.events.push({
    kind: 'rest-ended',
    at: run.at,
    source: memory.id,
    why: { cause: ends, begunAt: since },
  });
  return {
    ...memory,
    resting: false,
    restSince: null,
    restWhy: null,
    ranToMost: ends === 'longest-rest',
    credit: 1,
    creditAt: run.at,
    slope: 0,
  };
}

/** How a rest that has been undrawn since `since` ends at `run.at`; null: it goes on. */
function restEnd(
  run: Run,
  source: PlanSource,
  since: number,
): 'rested' | 'recovered' | 'longest-rest' | null {
  const leastEnds = since + leastRestMs(run, source);
  if (run.at < leastEnds) {
    wakeAt(run, leastEnds);
    return null;
  }
  let how: 'rested' | 'recovered' | 'longest-rest' = 'rested';
  for (const { until, mostMs } of waitsOf(run, source)) {
    if (!run.undriven && recovered(run, until)) {
      if (how === 'rested') how = 'recovered';
      continue;
    }
    const mostEnds = since + mostMs;
    if (run.at < mostEnds) {
      wakeAt(run, mostEnds);
      return null;
    }
    how = 'longest-rest';
  }
  return how;
}

/** At or above its level, by a good reading, at the instant of looking. */
export function recovered(run: Run, until: { point: number | null; level: number }): boolean {
  if (until.point === null || run.usable[until.point] !== 'good') return false;
  return !isUnder(run, until.point, until.level);
}
