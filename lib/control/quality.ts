/** Which readings are believed, and how good a point is at an instant. */
import type { PointMemory } from './memory';
import type { PlanPoint } from './plan';
import { entry, wakeForReadings, type Run } from './run';
import { steadied } from './steady';
import type { ObservedPoint, Quality } from './types';

const AHEAD_MS = 120_000;
const UNCERTAIN_MS = 600_000;

/** What cannot be: outside the sensor's range, its fault values, faster than it can change. Null: plausible. */
function implausible(point: PlanPoint, memory: PointMemory, seen: ObservedPoint): string | null {
  const sent = seen.raw ?? seen.value;
  const { min, max } = point.config;
  if (point.oneWire && (sent === 85 || sent === -127)) return 'one-wire-fault';
  if ((min !== null && sent < min) || (max !== null && sent > max)) return 'out-of-range';
  if (point.maxRateMs === null || memory.value === null || memory.at === null) return null;
  const most = point.maxRateMs * (seen.at - memory.at);
  // the last binary digit of a division must not make a change of exactly the limit too fast
  return Math.abs(seen.value - memory.value) > most + 1e-9 ? 'too-fast' : null;
}

/** Whether a reading moves control: finite, newer than the newest known, at most 2 min in the future. */
const isNews = (memory: PointMemory, seen: ObservedPoint, now: number): boolean =>
  Number.isFinite(seen.value) &&
  (memory.lastAt === null || seen.at > memory.lastAt) &&
  seen.at <= now + AHEAD_MS;

/** Silence counts from the last plausible reading, or, once the quality is dropped, from any. */
const spokeAt = (memory: PointMemory): number =>
  (memory.dropped === null ? memory.at : memory.lastAt) ?? -Infinity;

/** First instant of silence that the readings' times show up to the newest; null: none. */
export function silenceIn(
  point: PlanPoint,
  memory: PointMemory,
  seen: ObservedPoint | undefined,
): number | null {
  let last = spokeAt(memory);
  if (last === -Infinity) return null;
  // what was seen before has been judged: an implausible reading then fills no silence now
  if (seen === undefined || seen.at <= (memory.lastAt ?? -Infinity)) return null;
  if (seen.between !== undefined) {
    for (const time of seen.between) {
      if (time <= last) continue;
      if (time - last > point.staleMs) return last + point.staleMs + 1;
      last = time;
    }
  }
  if (seen.at - last > point.staleMs) return last + point.staleMs + 1;
  return null;
}

/** When a point falls silent as far as the times of all its readings tell, those known only now included. */
export function silenceAhead(point: PlanPoint, memory: PointMemory, seen: ObservedPoint | undefined): number {
  const isNew = seen !== undefined && seen.at > (memory.lastAt ?? -Infinity);
  const newest = isNew ? Math.max(spokeAt(memory), seen.at) : spokeAt(memory);
  return silenceIn(point, memory, seen) ?? newest + point.staleMs + 1;
}

/**
 * Takes a point's newest reading. One implausible reading leaves the last good one in force; a second in a row drops
 * the quality; three good ones in a row bring it back. The first good one is believed at once.
 */
export function takeReading(
  point: PlanPoint,
  memory: PointMemory,
  seen: ObservedPoint,
  now: number,
): PointMemory {
  if (!isNews(memory, seen, now)) return memory;
  const doubt = implausible(point, memory, seen);
  if (doubt !== null) {
    const suspects = memory.suspects + 1;
    const drops = suspects >= 2 || memory.value === null;
    const quality = doubt === 'too-fast' ? 'uncertain' : 'bad';
    const dropped = drops ? ({ quality, why: doubt } as const) : memory.dropped;
    return { ...memory, lastAt: seen.at, suspects, goodRun: 0, dropped };
  }
  const sameSince = memory.value === seen.value ? (memory.sameSince ?? seen.at) : seen.at;
  const frozen = point.frozenMs !== null && seen.at - sameSince > point.frozenMs;
  const back = memory.why === 'silent' || silenceIn(point, memory, seen) !== null;
  const goodRun = frozen ? 0 : back ? 1 : Math.min(3, memory.goodRun + 1);
  const dropped = frozen
    ? ({ quality: 'uncertain', why: 'frozen' } as const)
    : memory.value === null || goodRun >= 3
      ? null
      : memory.dropped;
  // written out: one is made for every reading, and a spread of it costs ten times as much
  return {
    id: memory.id,
    value: seen.value,
    at: seen.at,
    lastAt: seen.at,
    sameSince,
    suspects: 0,
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
    let quality: Quality = memory.dropped?.quality ?? 'good';
    let why = memory.dropped?.why ?? null;
    if (memory.value === null) {
      quality = 'bad';
      why ??= 'never-spoke';
    } else {
      const silentAt = run.silentAt?.[index] ?? spokeAt(memory) + point.staleMs + 1;
      if (run.at >= silentAt) {
        // our own absence is not the point's silence: it has its time again from the worker's start
        const excusedTill = run.observed.workerStartedAt + point.staleMs + 1;
        const excused =
          memory.why !== 'silent' && run.observed.workerStartedAt > spokeAt(memory) && run.at < excusedTill;
        quality = excused && quality !== 'bad' ? 'uncertain' : 'bad';
        why = excused ? (why ?? 'worker-was-away') : 'silent';
        if (excused) wakeForReadings(run, excusedTill);
      } else wakeForReadings(run, silentAt);
    }
    // most points are good most of the time
    if (quality === 'good' && memory.quality === 'good') keepQuality(run, index, quality, why);
    else {
      const judged = steadied(run, index, quality, why);
      keepQuality(run, index, judged.quality, judged.why);
    }
  }
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
