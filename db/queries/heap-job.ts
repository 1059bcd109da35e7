import 'server-only';
import { and, asc, eq, isNull, sql, type SQL } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { heapJob } from '@/db/schema/heap';
import { source } from '@/db/schema/channel';
import { house } from '@/db/schema/house';
import { HeapJob, type HeapJobAmend, type HeapJobCreate } from '@/lib/schema/heap-job';
import { houseNames, isId } from './reference';

interface Act {
  by: string;
  now: Date;
}
type Row = { job: typeof heapJob.$inferSelect; slug: string };

function toJob({ job, slug }: Row): HeapJob {
  const { id, revision, kind, title, dueOn, checklist, doneBy } = job;
  return HeapJob.parse({
    ...{ id, revision, kind, title, dueOn, checklist, doneBy },
    source: slug,
    doneAt: job.doneAt?.toISOString() ?? null,
  });
}

async function select(holding: Holding, houseId: string, only?: SQL): Promise<HeapJob[]> {
  const rows = await holding.db
    .select({ job: heapJob, slug: source.slug })
    .from(heapJob)
    .innerJoin(source, and(eq(source.holdingId, heapJob.holdingId), eq(source.id, heapJob.sourceId)))
    .where(
      and(
        eq(heapJob.holdingId, holding.id),
        eq(source.houseId, houseId),
        isNull(heapJob.removedAt),
        isNull(source.removedAt),
        only,
      ),
    )
    .orderBy(asc(heapJob.dueOn), asc(heapJob.id));
  return rows.map(toJob);
}

/** In the order of their days. */
export async function listHeapJobs(holding: Holding, houseId: string, heap?: string): Promise<HeapJob[]> {
  return select(
    holding,
    houseId,
    heap === undefined ? undefined : isId(heap) ? eq(source.id, heap) : eq(source.slug, heap),
  );
}

export async function findHeapJob(holding: Holding, houseId: string, id: string): Promise<HeapJob | null> {
  return isId(id) ? ((await select(holding, houseId, eq(heapJob.id, id)))[0] ?? null) : null;
}

export async function createHeapJob(
  holding: Holding,
  houseId: string,
  given: z.infer<typeof HeapJobCreate>,
  act: Act,
): Promise<HeapJob> {
  const sourceId = (await houseNames(holding, houseId)).sources.find(given.source, 'source').id;
  const id = uuid();
  const { kind, title, dueOn } = given;
  await holding.db.insert(heapJob).values({
    ...{ holdingId: holding.id, id, sourceId, kind, title, dueOn, by: act.by, enteredAt: act.now },
    checklist: given.checklist.map((item) => ticked(item, undefined, act)),
  });
  return again(holding, houseId, id);
}

/** An item keeps who ticked it and when for as long as it stays ticked under the same words. */
function ticked(item: { text: string; done: boolean }, before: HeapJob['checklist'] | undefined, act: Act) {
  if (!item.done) return { text: item.text, doneAt: null, doneBy: null };
  const kept = before?.find((one) => one.text === item.text && one.doneAt !== null);
  return kept ?? { text: item.text, doneAt: act.now.toISOString(), doneBy: act.by };
}

export async function amendHeapJob(
  holding: Holding,
  houseId: string,
  before: HeapJob,
  given: z.infer<typeof HeapJobAmend>,
  act: Act,
): Promise<HeapJob> {
  const { title, dueOn, checklist, done } = given;
  const isSame = done === undefined || done === (before.doneAt !== null);
  await holding.db
    .update(heapJob)
    .set({
      ...(title === undefined ? {} : { title }),
      ...(dueOn === undefined ? {} : { dueOn }),
      ...(checklist === undefined
        ? {}
        : { checklist: checklist.map((item) => ticked(item, before.checklist, act)) }),
      ...(isSame ? {} : { doneAt: done ? act.now : null, doneBy: done ? act.by : null }),
      ...{ amendedBy: act.by, amendedAt: act.now, revision: sql`${heapJob.revision} + 1` },
    })
    .where(and(eq(heapJob.holdingId, holding.id), eq(heapJob.id, before.id)));
  return again(holding, houseId, before.id);
}

export async function removeHeapJob(holding: Holding, id: string, now: Date): Promise<void> {
  await holding.db
    .update(heapJob)
    .set({ removedAt: now })
    .where(and(eq(heapJob.holdingId, holding.id), eq(heapJob.id, id)));
}

export interface CalendarJob {
  job: HeapJob;
  house: { slug: string; name: string };
  heap: string;
  changedAt: Date;
}

/** Every job of the holding that still has a house, for its calendar. */
export async function listJobsOfHolding(holding: Holding): Promise<CalendarJob[]> {
  const rows = await holding.db
    .select({ job: heapJob, slug: source.slug, heap: source.name, house: house.slug, name: house.name })
    .from(heapJob)
    .innerJoin(source, and(eq(source.holdingId, heapJob.holdingId), eq(source.id, heapJob.sourceId)))
    .innerJoin(house, and(eq(house.holdingId, source.holdingId), eq(house.id, source.houseId)))
    .where(
      and(
        eq(heapJob.holdingId, holding.id),
        isNull(heapJob.removedAt),
        isNull(source.removedAt),
        isNull(house.removedAt),
      ),
    )
    .orderBy(asc(heapJob.dueOn), asc(heapJob.id));
  return rows.map((row) => ({
    job: toJob(row),
    house: { slug: row.house, name: row.name },
    heap: row.heap,
    changedAt: row.job.amendedAt ?? row.job.enteredAt,
  }));
}

async function again(holding: Holding, houseId: string, id: string): Promise<HeapJob> {
  const job = await findHeapJob(holding, houseId, id);
  if (job === null) throw new Error('the job was there a moment ago');
  return job;
}
