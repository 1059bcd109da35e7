/**
 * Rest: the source's draw credit is spent and its rest has not ended, or the rolling day's limit is used up, or the
 * channel's last draw brought no gain, or the band, or a frost that may not break a rest, wants a start that credit and limit are not worth. Off.
 * The accounts themselves are kept in ../credit.ts and ../day.ts.
 */
import type { RestReason } from '../because';
import { creditAt, drawCost, leastRestMs, waitsOf } from '../credit';
import { usedMs } from '../day';
import { valueOf } from '../readings';
import { entry, wakeAt, type Run } from '../run';
import { bandWants } from './band';
import type { ClaimRung } from './claim';

export const rest: ClaimRung<'rest'> = {
  claim: 'rest',
  speaks: (run, channel) =>
    restForbids(run, channel) !== null || (isAskedOn(run, channel) && !isWorthAStart(run, channel))
      ? 'off'
      : null,
  because,
};

/** By its band, or by a frost that may not break a rest. */
function isAskedOn(run: Run, channel: number): boolean {
  if (bandWants(run, channel)) return true;
  const { inFrost, frostMayBreakRest, config } = entry(run.plan.channels, channel);
  const isBlind = config.loadKind === 'heater' && run.frost.blindSince !== null;
  return run.frost.on && inFrost === 'helps' && !frostMayBreakRest && !isBlind;
}

/** What forbids a draw, frost's own leave aside; null: nothing. */
export function restForbids(run: Run, channel: number): 'credit-spent' | 'daily-limit' | 'no-gain' | null {
  const { source } = entry(run.plan.channels, channel);
  if (source === null) return null;
  const memory = entry(run.sources, source);
  if (memory.resting) return 'credit-spent';
  const { dailyLimitMs } = entry(run.plan.sources, source);
  if (dailyLimitMs !== null && usedMs(memory, run.at) >= dailyLimitMs) {
    wakeForDay(run, source, dailyLimitMs);
    return 'daily-limit';
  }
  // one that is over was taken away when the channel's gain was settled
  const { noGainUntil } = entry(run.channels, channel);
  if (noGainUntil !== null) {
    wakeAt(run, noGainUntil);
    return 'no-gain';
  }
  return null;
}

/** Whether what is left of credit and day carries the channel, beside those that draw, through its least on time. */
function isWorthAStart(run: Run, channel: number): boolean {
  const { source, minOnMs } = entry(run.plan.channels, channel);
  if (source === null || entry(run.channels, channel).counted === 'on') return true;
  const memory = entry(run.sources, source);
  const cost = drawCost(run, channel);
  const { creditMs, dayMs } = worth(run, channel, source, cost);
  // a millionth of a ms forgives the division: a longest draw of exactly the least on time is worth it
  if (creditMs + 1e-6 < minOnMs) {
    const needed = minOnMs * cost;
    if (memory.slope > 0)
      wakeAt(run, memory.creditAt + Math.ceil((needed - memory.credit) / memory.slope - 1e-6));
    return false;
  }
  const targetMs = dailyLimitOf(run, source) - minOnMs * ((run.drawCount[source] ?? 0) + 1);
  if (dayMs < minOnMs) {
    wakeForDay(run, source, targetMs);
    return false;
  }
  // a start that is held up meanwhile is worth it only until the others' draws have used up what it takes
  const { credit, creditAt: since, slope, day } = memory;
  wakeWhenGone(run, since, credit - minOnMs * ((run.drawRate[source] ?? 0) + cost), -slope);
  wakeWhenGone(run, day.at, targetMs - day.usedMs, day.slope);
  return true;
}

/** Infinity: the source has none, and what is left of it is never gone. */
const dailyLimitOf = (run: Run, source: number): number =>
  entry(run.plan.sources, source).dailyLimitMs ?? Infinity;

/** Wakes in the first ms in which what was to spare at `since` is more than gone, at `rate` a ms. */
function wakeWhenGone(run: Run, since: number, spare: number, rate: number): void {
  if (rate > 0) wakeAt(run, Math.max(run.at, since + Math.floor(spare / rate + 1e-6)) + 1);
}

/** For how long credit and day would carry a start, ms. */
function worth(run: Run, channel: number, source: number, cost: number): { creditMs: number; dayMs: number } {
  const memory = entry(run.sources, source);
  const rate = (run.drawRate[source] ?? 0) + cost;
  return {
    creditMs: cost === 0 ? Infinity : creditAt(memory, run.at) / rate,
    dayMs: (dailyLimitOf(run, source) - usedMs(memory, run.at)) / ((run.drawCount[source] ?? 0) + 1),
  };
}

/** Wakes when the rolling day has let its use fall to `targetMs`, or when its slope changes before. */
export function wakeForDay(run: Run, source: number, targetMs: number): void {
  const memory = entry(run.sources, source);
  const { slope, nextAt } = memory.day;
  if (nextAt !== null) wakeAt(run, nextAt);
  // strictly under a limit that is used up: one ms past the instant at which it is met
  if (slope < 0) wakeAt(run, run.at + Math.max(1, Math.ceil((usedMs(memory, run.at) - targetMs) / -slope)));
}

function because(run: Run, channel: number): RestReason {
  const { source: place, minOnMs, inFrost, frostMayBreakRest } = entry(run.plan.channels, channel);
  if (place === null) throw new Error('A channel without a source does not rest.');
  const source = entry(run.plan.sources, place);
  const memory = entry(run.sources, place);
  const cause: RestReason['cause'] = restForbids(run, channel) ?? 'not-worth-a-start';
  const { frostLimit } = run.plan.house;
  const common = {
    cause,
    source: source.slug,
    credit: creditAt(memory, run.at),
    ...(frostLimit !== null && inFrost === 'helps' && frostMayBreakRest
      ? { frostBreaksBelow: frostLimit }
      : {}),
  };
  if (memory.restWhy === 'no-gain')
    return { ...common, cause: 'no-gain', ...figure(memory.restGainK), ...restTimes(run, place) };
  if (cause === 'credit-spent') return { ...common, ...restTimes(run, place) };
  if (cause === 'no-gain') {
    const { noGainUntil, noGainK } = entry(run.channels, channel);
    return { ...common, ...figure(noGainK), restUntil: noGainUntil, until: noGainUntil };
  }
  const drawnS = usedMs(memory, run.at) / 1000;
  const limitS = source.dailyLimitMs === null ? null : source.dailyLimitMs / 1000;
  if (cause === 'daily-limit') return { ...common, drawnS, limitS, until: null };
  const { creditMs, dayMs } = worth(run, channel, place, drawCost(run, channel));
  const worthS = Math.min(creditMs, dayMs) / 1000;
  return { ...common, drawnS, limitS, leastOnS: minOnMs / 1000, worthS, until: null };
}

/** The figure that ended the draw, as it was kept then: rules and seasons may be others by now. */
const figure = (leastGainK: number | undefined): { leastGainK?: number } =>
  leastGainK === undefined ? {} : { leastGainK };

type RestTimes = Pick<
  RestReason,
  'restSince' | 'restUntil' | 'restAtMostUntil' | 'recovery' | 'recoveries' | 'until'
>;

/** When a source's rest began and can end, and what it waits for. */
export function restTimes(run: Run, place: number): RestTimes {
  const source = entry(run.plan.sources, place);
  const { restSince } = entry(run.sources, place);
  const waits = waitsOf(run, source);
  const recoveries = waits.map(({ until: { point, key, level } }) => ({
    point: key,
    value: point === null ? null : valueOf(run, point),
    level,
    good: point !== null && run.usable[point] === 'good',
  }));
  const [recovery, ...others] = recoveries;
  const told = {
    ...(recovery === undefined ? {} : { recovery }),
    ...(others.length === 0 ? {} : { recoveries: others }),
  };
  if (restSince === null) return { restSince, restUntil: null, restAtMostUntil: null, until: null, ...told };
  const leastEnds = restSince + leastRestMs(run, source);
  const mostEnds = Math.max(leastEnds, ...waits.map(({ mostMs }) => restSince + mostMs));
  const restAtMostUntil = waits.length === 0 ? null : mostEnds;
  // past the least it still waits, and where nobody can tell a level it may: then the longest time is the end that is known
  const isKnown = recoveries.every(({ good }) => good) && run.at < leastEnds;
  const restUntil = isKnown ? leastEnds : mostEnds;
  return { restSince, restUntil, restAtMostUntil, until: restUntil, ...told };
}
