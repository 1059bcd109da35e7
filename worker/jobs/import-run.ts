/**
 * Brings in what people's loggers kept. A file is read a piece at a time and each batch is committed with how far it came,
 * so that a file of any size needs the same memory, and an end of the worker costs nothing but time.
 *
 * Control takes up the newest reading of each point when it starts, and looks at none that is a day old: readings of the
 * last day are therefore refused here, and no file can move a relay.
 */
import {
  bringPart,
  endCheck,
  endImport,
  type ImportWork,
  nextImport,
  noteChecked,
  undoPart,
} from '@/db/queries/import-work';
import { listPoints, pointNumbers } from '@/db/queries/point';
import { LoggerReader, type TargetPoint } from '@/lib/analysis/logger-reader';
import type { ImportFound } from '@/lib/schema/import';
import { addFaults, dropAll, dropFile, faultLines, textOf } from '@/lib/server/import-file';
import type { Base } from '../base';

/** The longest age at which any point may still be taken for fresh. */
const LIVE_MS = 24 * 3_600_000;
const ROWS_A_PART = 10_000;
/** Lines told in the file of faults: a file read by a wrong layout is wrong in all of them. */
const MOST_FAULTS = 100_000;
const SHOWN = 20;

export interface ImportDeps extends Pick<Base, 'clock' | 'db' | 'pool' | 'log'> {
  isLeading: () => boolean;
}

/** Does what waits, one after another. @returns how many were taken to an end */
export async function runImports(deps: ImportDeps): Promise<number> {
  let ended = 0;
  for (;;) {
    const work = deps.isLeading() ? await nextImport(deps.pool) : null;
    if (work === null) return ended;
    try {
      if (work.state === 'to-undo') await undo(deps, work);
      else if (work.state === 'to-check') await lookThrough(deps, work);
      else await bring(deps, work);
    } catch (error) {
      if (!isOfTheFile(error)) throw error;
      deps.log.warn({ err: error, import: work.id }, 'a file cannot be read');
      await endImport(deps.pool, work, 'failed', {
        now: deps.clock.appNow(),
        problem: 'The file is no longer there; take this import back and send the file again.',
      });
    }
    ended += 1;
  }
}

function isOfTheFile(error: unknown): boolean {
  return error instanceof Error && 'code' in error && error.code === 'ENOENT';
}

async function readerOf(deps: ImportDeps, work: ImportWork): Promise<LoggerReader> {
  const holding = { id: work.holdingId, db: deps.db };
  const numbers = await pointNumbers(holding, work.houseId);
  const points = new Map<string, TargetPoint>();
  for (const { key, unit, min, max, derived } of await listPoints(holding, work.houseId)) {
    const number = numbers.get(key)?.number;
    if (number !== undefined && derived === null) points.set(key, { number, key, unit, min, max });
  }
  return new LoggerReader(work.layout, points, deps.clock.appNow() - LIVE_MS);
}

async function lookThrough(deps: ImportDeps, work: ImportWork): Promise<void> {
  const reader = await readerOf(deps, work);
  const seen = { readings: 0, outside: 0, from: Infinity, to: -Infinity, faults: 0, doubts: 0 };
  const found: Pick<ImportFound, 'firstFaults' | 'firstDoubts'> = { firstFaults: [], firstDoubts: [] };
  const iso = (at: number) => (Number.isFinite(at) ? new Date(at).toISOString() : null);
  const count = () => {
    for (const { at, quality } of reader.readings) {
      seen.from = Math.min(seen.from, at);
      seen.to = Math.max(seen.to, at);
      seen.outside += quality === 2 ? 1 : 0;
    }
    seen.readings += reader.readings.length;
    seen.faults += reader.faults.length;
    seen.doubts += reader.doubts.length;
    found.firstFaults.push(...reader.faults.slice(0, SHOWN - found.firstFaults.length));
    for (const doubt of reader.doubts.slice(0, SHOWN - found.firstDoubts.length))
      found.firstDoubts.push({ ...doubt, readAs: doubt.readAs === null ? null : iso(doubt.readAs) });
    [reader.readings, reader.faults, reader.doubts] = [[], [], []];
  };
  let told = deps.clock.monotonicMs();
  for await (const { text, done } of textOf(work.id, work.layout.encoding)) {
    reader.push(text);
    count();
    if (deps.clock.monotonicMs() - told < 500) continue;
    told = deps.clock.monotonicMs();
    if (!deps.isLeading() || !(await noteChecked(deps.pool, work.id, done))) return;
  }
  reader.end();
  count();
  const { from, to, ...counts } = seen;
  await endCheck(deps.pool, work.id, {
    ...{ ...counts, ...found, lines: reader.lines },
    ...{ from: iso(from), to: iso(to) },
  });
}

async function bring(deps: ImportDeps, work: ImportWork): Promise<void> {
  const reader = await readerOf(deps, work);
  const step = { doneBytes: 0, doneLines: work.doneLines, faults: work.faults, faultBytes: work.faultBytes };
  /** A batch is stored while the next one is read: the database and this process are two. */
  let storing: Promise<boolean> = Promise.resolve(true);
  const store = async (doneBytes: number): Promise<boolean> => {
    const rows = reader.readings;
    const faults = reader.faults;
    [reader.readings, reader.faults, reader.doubts] = [[], [], []];
    const lines = reader.lines;
    if (!(await storing)) return false;
    const kept = faults.slice(0, Math.max(0, MOST_FAULTS - step.faults));
    if (kept.length > 0 || step.faultBytes === 0)
      step.faultBytes = await addFaults(work.id, step.faultBytes, faultLines(kept));
    Object.assign(step, { doneBytes, doneLines: lines, faults: step.faults + faults.length });
    storing = bringPart(deps.pool, work, rows, { ...step });
    // heard of at the next batch; until then it must not count as unheard
    storing.catch(() => undefined);
    return true;
  };
  for await (const { text, done } of textOf(work.id, work.layout.encoding)) {
    reader.push(text);
    // what an earlier try has brought is read again, for the order of the lines, and not stored again
    if (reader.lines <= work.doneLines) [reader.readings, reader.faults, reader.doubts] = [[], [], []];
    if (reader.readings.length + reader.faults.length < ROWS_A_PART) continue;
    // what is being stored is waited for: a next turn would read how far the file is before it is kept
    if (deps.isLeading() && (await store(done))) continue;
    await storing;
    return;
  }
  reader.end();
  if (!(await store(work.bytes)) || !(await storing)) return;
  await endImport(deps.pool, work, 'done', { now: deps.clock.appNow() });
  await dropFile(work.id);
}

async function undo(deps: ImportDeps, work: ImportWork): Promise<void> {
  while (await undoPart(deps.pool, work)) if (!deps.isLeading()) return;
  await endImport(deps.pool, work, 'undone', { now: deps.clock.appNow() });
  await dropAll(work.id);
}
