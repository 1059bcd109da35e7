/**
 * Looks archives through, and brings them in. Both read the file from its beginning to its end; what is brought in is one
 * transaction, so an end of the worker leaves nothing, and its successor begins again.
 */
import { rm } from 'node:fs/promises';
import { type ArchiveWork, endWork, nextArchive, noteWork } from '@/db/queries/archive';
import { Bringing, makeMonth, schemaNumber } from '@/db/queries/archive-in';
import { RowFault } from '@/db/queries/archive-rows';
import { ArchiveFault, archiveFile, monthsOf, openArchive, sha256Of } from '@/lib/server/archive-file';
import { type ArchiveSink, readArchive } from '@/lib/server/archive-read';
import { OWNER } from '@/lib/server/permissions';
import type { Base } from '../base';

export interface ArchiveDeps extends Pick<Base, 'clock' | 'pool' | 'log'> {
  isLeading: () => boolean;
}

/** It was dropped meanwhile, or another worker leads. */
class Unwanted extends Error {}

const NOTE_EVERY_MS = 500;
/** As far as a node's clock may run ahead. */
const AHEAD_MS = 2 * 60_000;

/** Does what waits, one after another. @returns how many were taken to an end */
export async function runArchives(deps: ArchiveDeps): Promise<number> {
  let ended = 0;
  for (;;) {
    const work = deps.isLeading() ? await nextArchive(deps.pool) : null;
    if (work === null) return ended;
    try {
      await (work.state === 'to-check' ? lookThrough(deps, work) : bring(deps, work));
      ended += 1;
    } catch (error) {
      if (error instanceof Unwanted) {
        if (!deps.isLeading()) return ended;
        continue;
      }
      const problem = problemOf(error);
      if (problem === null) throw error;
      await endWork(deps.pool, work, { state: 'failed', now: deps.clock.appNow(), problem });
      await drop(work.id);
      ended += 1;
    }
  }
}

function problemOf(error: unknown): string | null {
  if (error instanceof ArchiveFault || error instanceof RowFault) return error.message;
  const isGone = error instanceof Error && 'code' in error && error.code === 'ENOENT';
  return isGone ? 'The file is no longer there; send it again.' : null;
}

const drop = (id: string) => rm(archiveFile(id), { force: true });

/** Notes how far it is, twice a second. @throws Unwanted */
function stepper(deps: ArchiveDeps, work: ArchiveWork): ArchiveSink['step'] {
  let told = -Infinity;
  return async (done, of) => {
    if (deps.clock.monotonicMs() - told < NOTE_EVERY_MS) return;
    told = deps.clock.monotonicMs();
    if (!deps.isLeading() || !(await noteWork(deps.pool, work, done, of))) throw new Unwanted();
  };
}

const nothing = () => Promise.resolve();

async function lookThrough(deps: ArchiveDeps, work: ArchiveWork): Promise<void> {
  const schema = await schemaNumber(deps.pool);
  const open = await openArchive(archiveFile(work.id), schema);
  try {
    const found = await readArchive(open, open.manifest.schema < schema, {
      ...{ rows: nothing, photograph: nothing, readings: nothing, monthEnds: nothing },
      ...{ step: stepper(deps, work), skips: () => false, newest: deps.clock.appNow() + AHEAD_MS },
    });
    await endWork(deps.pool, work, { state: 'checked', now: deps.clock.appNow(), found });
  } finally {
    open.close();
  }
}

async function bring(deps: ArchiveDeps, work: ArchiveWork): Promise<void> {
  const { pool, clock } = deps;
  if (work.userId === null) throw new ArchiveFault('Nobody is named who would own it; bring it in anew.');
  const schema = await schemaNumber(pool);
  const sha256 = await sha256Of(archiveFile(work.id));
  const open = await openArchive(archiveFile(work.id), schema);
  try {
    const { madeAt, holding } = open.manifest;
    for (const month of monthsOf(open.manifest)) await makeMonth(pool, month);
    const bringing = await Bringing.begin(pool, {
      ...{ name: work.intoName ?? holding.name, userId: work.userId, role: OWNER, by: work.by },
      ...{ now: clock.appNow(), madeAt, sha256 },
    });
    let isDone = false;
    try {
      const step = stepper(deps, work);
      await readArchive(open, open.manifest.schema < schema, {
        rows: (one, rows) => bringing.rows(one, rows),
        photograph: (one, row, made) =>
          bringing.photograph(one, { ...row, width_px: made.width, height_px: made.height }, made),
        readings: (rows) => bringing.readings(rows),
        monthEnds: (month) => bringing.rollUpMonth(month),
        step,
        newest: clock.appNow() + AHEAD_MS,
        skips: (one) => one.outOnly !== undefined,
      });
      isDone = await bringing.finish(work, () => noteWork(pool, work, 1, 1));
    } finally {
      if (!isDone) bringing.breakOff();
    }
  } finally {
    open.close();
  }
  await drop(work.id);
}
