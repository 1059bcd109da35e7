/** Which readings are believed, and how good a point is at an instant. */
import type { PointMemory } from './memory';
import { entry, wakeForReadings, type Run } from './run';
import { steadied } from './steady';
import type { ObservedPoint, Quality } from './types';

const AHEAD_MS = 120_000;
const UNCERTAIN_MS = 600_000;
const FROZEN = { quality: 'uncertain', why: 'frozen' } as const;

/** What cannot be: outside the sensor's range, its fault values, faster than it can change. Null: plausible. */
function implausible(run: Run, index: number, seen: ObservedPoint): string | null {
  const { config, oneWire, maxRateMs } = entry(run.plan.points, index);
  const sent = seen.raw ?? seen.value;
  const { min, max } = config;
  if (oneWire && (sent === 85 || sent === -127)) return 'one-wire-fault';
  if ((min !== null && sent < min) || (max !== null && sent > max)) return 'out-of-range';
  if (maxRateMs === null || !entry(run.points, index).hasValue) return null;
  const most = maxRateMs * (seen.at - (run.readings.at[index] ?? 0));
  // the last binary digit of a division must not make a change of exactly the limit too fast
  return Math.abs(seen.value - (run.readings.value[index] ?? NaN)) > most + 1e-9 ? 'too-fast' : null;
}

/** Whether a reading moves control: finite, newer than the newest known, at most 2 min in the future. */
const isNews = (run: Run, index: number, seen: ObservedPoint): boolean =>
  Number.isFinite(seen.value) &&
  seen.at > (run.readings.lastAt[index] ?? 0) &&
  seen.at <= run.stepAt + AHEAD_MS;

/** Silence counts from the last plausible reading, or, once the quality is dropped, from any; 0: it never spoke. */
const spokeAt = ({ points, readings: { at, lastAt } }: Run, index: number): number =>
  entry(points, index).dropped === null ? (at[index] ?? 0) : (lastAt[index] ?? 0);

/** First instant of silence that the readings' times show up to the newest; Infinity: none. */
function silenceIn(run: Run, index: number, seen: ObservedPoint): number {
  const { staleMs } = entry(run.plan.points, index);
  let last = spokeAt(run, index);
  // what was seen before has been judged: an implausible reading then fills no silence now
  if (last === 0 || seen.at <= (run.readings.lastAt[index] ?? 0)) return Infinity;
  if (seen.between !== undefined) {
    for (const time of seen.between) {
      if (time <= last) continue;
      if (time - last > staleMs) return last + staleMs + 1;
      last = time;
    }
  }
  return seen.at - last > staleMs ? last + staleMs + 1 : Infinity;
}

/** When a point falls silent as far as the times of all its readings tell, those known only now included. */
export function silenceAhead(run: Run, index: number, seen: ObservedPoint | undefined): number {
  const { staleMs } = entry(run.plan.points, index);
  const spoke = spokeAt(run, index) || -Infinity;
  if (seen === undefined || seen.at <= (run.readings.lastAt[index] ?? 0)) return spoke + staleMs + 1;
  return Math.min(silenceIn(run, index, seen), Math.max(spoke, seen.at) + staleMs + 1);
}

/**
 * Takes a point's newest reading. One implausible reading leaves the last good one in force; a second in a row drops
 * the quality; three good ones in a row bring it back. The first good one is believed at once.
 */
export function takeReading(run: Run, index: number, seen: ObservedPoint): void {
  if (!isNews(run, index, seen)) return;
  const { value, at, lastAt, sameSince } = run.readings;
  const doubt = implausible(run, index, seen);
  if (doubt !== null) {
    lastAt[index] = seen.at;
    suspect(run, index, doubt);
    return;
  }
  const { hasValue, why, goodRun, dropped } = entry(run.points, index);
  const { frozenMs } = entry(run.plan.points, index);
  const isSame = hasValue && value[index] === seen.value;
  const since = isSame ? (sameSince[index] ?? 0) : seen.at;
  const frozen = frozenMs !== null && seen.at - since > frozenMs;
  const back = why === 'silent' || silenceIn(run, index, seen) < Infinity;
  const good = frozen ? 0 : back ? 1 : Math.min(3, goodRun + 1);
  value[index] = seen.value;
  at[index] = seen.at;
  lastAt[index] = seen.at;
  sameSince[index] = since;
  keepTrust(run, index, true, 0, good, frozen ? FROZEN : !hasValue || good >= 3 ? null : dropped);
}

function suspect(run: Run, index: number, why: string): void {
  const { hasValue, suspects, dropped } = entry(run.points, index);
  const inRow = Math.min(2, suspects + 1);
  const quality = why === 'too-fast' ? 'uncertain' : 'bad';
  const drops = (inRow === 2 || !hasValue) && (dropped?.why !== why || dropped.quality !== quality);
  keepTrust(run, index, hasValue, inRow, 0, drops ? { quality, why } : dropped);
}

/** Of most readings nothing else changes. Written out, since a spread of an entry costs ten times as much. */
function keepTrust(
  run: Run,
  index: number,
  hasValue: boolean,
  suspects: number,
  goodRun: number,
  dropped: PointMemory['dropped'],
): void {
  const memory = entry(run.points, index);
  if (
    hasValue === memory.hasValue &&
    suspects === memory.suspects &&
    goodRun === memory.goodRun &&
    dropped === memory.dropped
  )
    return;
  run.points[index] = {
    id: memory.id,
    hasValue,
    suspects,
    goodRun,
    dropped,
    quality: memory.quality,
    why: memory.why,
    uncertainSince: memory.uncertainSince,
    doubts: memory.doubts,
    contradictedSince: memory.contradictedSince,
    trail: memory.trail,
  };
}

/** Settles how good every measured point is at `run.at`, and when silence or ten minutes' doubt will change that. */
export function settlePoints(run: Run): void {
  const { plan } = run;
  for (let index = 0; index < plan.points.length; index += 1) {
    const point = entry(plan.points, index);
    if (point.derived !== null) continue;
    const memory = entry(run.points, index);
    const silentAt = silentFrom(run, index);
    // most points are good most of the time, and then nothing about them changes
    if (memory.quality === 'good' && memory.dropped === null && run.at < silentAt) {
      run.usable[index] = 'good';
      wakeForReadings(run, silentAt);
    } else settleDoubt(run, index, silentAt);
  }
}

/** When a point is silent if nothing more is heard of it. */
function silentFrom(run: Run, index: number): number {
  if (run.silentAt !== null) return run.silentAt[index] ?? 0;
  return spokeAt(run, index) + entry(run.plan.points, index).staleMs + 1;
}

function settleDoubt(run: Run, index: number, silentAt: number): void {
  const memory = entry(run.points, index);
  let quality: Quality = memory.dropped?.quality ?? 'good';
  let why = memory.dropped?.why ?? null;
  if (!memory.hasValue) {
    quality = 'bad';
    why ??= 'never-spoke';
  } else if (run.at >= silentAt) {
    const { workerStartedAt } = run.observed;
    // our own absence is not the point's silence: it has its time again from the worker's start
    const excusedTill = workerStartedAt + entry(run.plan.points, index).staleMs + 1;
    const excused = memory.why !== 'silent' && workerStartedAt > spokeAt(run, index) && run.at < excusedTill;
    quality = excused && quality !== 'bad' ? 'uncertain' : 'bad';
    why = excused ? (why ?? 'worker-was-away') : 'silent';
    if (excused) wakeForReadings(run, excusedTill);
  } else wakeForReadings(run, silentAt);
  const judged = steadied(run, index, quality, why);
  keepQuality(run, index, judged.quality, judged.why);
}

/** Notes a point's quality, tells a change of it, and reckons what control may use. */
export function keepQuality(run: Run, index: number, quality: Quality, why: string | null): void {
  let memory = entry(run.points, index);
  if (memory.quality !== quality || memory.why !== why) {
    const uncertainSince = quality === 'uncertain' ? (memory.uncertainSince ?? run.at) : null;
    if (memory.quality !== quality)
      run.events.push({
        kind: 'quality',
        at: run.at,
        point: memory.id,
        from: memory.quality,
        to: quality,
        why,
      });
    memory = { ...memory, quality, why, uncertainSince };
    run.points[index] = memory;
  }
  let usable = quality;
  if (memory.uncertainSince !== null) {
    if (run.at >= memory.uncertainSince + UNCERTAIN_MS) usable = 'bad';
    else wakeForReadings(run, memory.uncertainSince + UNCERTAIN_MS);
  }
  run.usable[index] = usable;
}
