/**
 * A point that comes and goes. One whose quality has dropped three times within an hour is unsteady: it is believed
 * again only once it has been good for ten minutes without a break. So a loose plug moves no stand-in to and fro, and
 * raises one alarm instead of one a minute. Until then it keeps the quality that it dropped to, and frost alone listens.
 *
 * What is not the point's own doing is no drop: our own absence, and a silence in which no other point of the house was
 * heard, since then it was the line that fell silent.
 */
import type { DoubtMemory, PointMemory } from './memory';
import { lastTimeOf } from './readings';
import { entry, wakeForReadings, type Run } from './run';
import type { Quality } from './types';
import { UNSTEADY } from './unsteady';

interface Judged {
  quality: Quality;
  why: string | null;
}

const NONE: DoubtMemory = { since: null, why: null, last: null, drops: [], goodSince: null };

/** Whether a point has dropped so often that its being good is not yet believed; asked while it is in doubt. */
export function isUnsteady({ quality, doubts }: PointMemory): boolean {
  const [first, , last] = doubts?.drops ?? [];
  if (quality === 'good' || first === undefined || last === undefined) return false;
  return last - first <= UNSTEADY.withinMs;
}

/** Keeps when and why a measured point's quality dropped and came back, and holds an unsteady one down. */
export function steadied(run: Run, index: number, quality: Quality, why: string | null): Judged {
  const memory = entry(run.points, index);
  const now = { quality, why };
  if (quality !== 'good') dropped(run, index, memory, why);
  if (quality !== 'good' || memory.quality === 'good' || memory.why === 'never-spoke') return now;
  const doubts = memory.doubts ?? NONE;
  if (isUnsteady(memory) && doubts.why !== 'worker-was-away') {
    // an implausible reading breaks the run, though a single one leaves the last good value in force
    const goodSince = memory.suspects > 0 ? null : (doubts.goodSince ?? run.at);
    if (goodSince !== doubts.goodSince) note(run, index, { ...doubts, goodSince });
    if (goodSince === null || run.at < goodSince + UNSTEADY.goodForMs) {
      if (goodSince !== null) wakeForReadings(run, goodSince + UNSTEADY.goodForMs);
      return { quality: memory.quality, why: 'unsteady' };
    }
  }
  const { since } = doubts;
  const isOurs = since === null || doubts.why === 'worker-was-away';
  const last = isOurs ? doubts.last : { why: doubts.why, from: since, to: run.at };
  note(run, index, { ...doubts, since: null, why: null, last, goodSince: null });
  return now;
}

function dropped(run: Run, index: number, memory: PointMemory, why: string | null): void {
  const doubts = memory.doubts ?? NONE;
  if (memory.quality === 'good') {
    const drops = isOwnDoing(run, index, why)
      ? [...doubts.drops, run.at].slice(-UNSTEADY.drops)
      : doubts.drops;
    note(run, index, { ...doubts, since: run.at, why, drops, goodSince: null });
  } else if (doubts.goodSince !== null) note(run, index, { ...doubts, goodSince: null });
}

function note(run: Run, index: number, doubts: DoubtMemory): void {
  run.points[index] = { ...entry(run.points, index), doubts };
}

function isOwnDoing(run: Run, index: number, why: string | null): boolean {
  if (why === 'worker-was-away') return false;
  if (why !== 'silent') return true;
  const { staleMs } = entry(run.plan.points, index);
  const from = (lastTimeOf(run, index) ?? -Infinity) + staleMs / 2;
  return run.plan.points.some(
    ({ id, derived }, other) => other !== index && derived === null && spoke(run, other, id, from),
  );
}

/** Whether a point was heard after `from` and by `run.at`, by what is remembered and what this step was told. */
function spoke(run: Run, index: number, id: string, from: number): boolean {
  const seen = run.observed.points[id];
  const times = [lastTimeOf(run, index) ?? -Infinity, ...(seen?.between ?? []), seen?.at ?? -Infinity];
  return times.some((at) => at > from && at <= run.at);
}
