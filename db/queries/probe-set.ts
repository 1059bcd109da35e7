import 'server-only';
import { and, desc, eq, lt, or, sql, type SQL } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { probeSet } from '@/db/schema/heap';
import { source } from '@/db/schema/channel';
import { ProbeSet, type ProbeSetAmend, type ProbeSetCreate } from '@/lib/schema/probe-set';
import { doneAt, heapId } from './heap-record-of';
import { cut, type Listed, type Page } from './page';
import { isId } from './reference';
import { Refusal } from './refusal';

type Given = z.infer<typeof ProbeSetCreate>;
type Row = { round: typeof probeSet.$inferSelect; slug: string };
interface Act {
  by: string;
  now: Date;
}

function toRound({ round, slug }: Row): ProbeSet {
  const { id, revision, section, places, text, by, amendedBy } = round;
  return ProbeSet.parse({
    ...{ id, revision, section, places, text, by, amendedBy },
    source: slug,
    at: round.at.toISOString(),
    enteredAt: round.enteredAt.toISOString(),
    amendedAt: round.amendedAt?.toISOString() ?? null,
  });
}

async function select(
  holding: Holding,
  houseId: string,
  only: SQL | undefined,
  limit: number,
): Promise<Row[]> {
  return holding.db
    .select({ round: probeSet, slug: source.slug })
    .from(probeSet)
    .innerJoin(source, and(eq(source.holdingId, probeSet.holdingId), eq(source.id, probeSet.sourceId)))
    .where(and(eq(probeSet.holdingId, holding.id), eq(source.houseId, houseId), only))
    .orderBy(desc(probeSet.at), desc(probeSet.id))
    .limit(limit);
}

/** Newest first; of one heap where its slug or id is given. */
export async function listProbeSets(
  holding: Holding,
  houseId: string,
  page: Page & { source?: string | undefined },
): Promise<Listed<ProbeSet>> {
  const { cursor } = page;
  const at = cursor?.at === undefined ? null : new Date(cursor.at);
  const behind =
    cursor === undefined || at === null
      ? undefined
      : or(lt(probeSet.at, at), and(eq(probeSet.at, at), lt(probeSet.id, cursor.id)));
  const heap = page.source;
  const ofHeap = heap === undefined ? undefined : isId(heap) ? eq(source.id, heap) : eq(source.slug, heap);
  const rows = await select(holding, houseId, and(behind, ofHeap), page.limit + 1);
  const listed = cut(rows, page.limit, ({ round }) => ({ id: round.id, at: round.at.getTime() }));
  return { items: listed.items.map(toRound), next: listed.next };
}

export async function findProbeSet(holding: Holding, houseId: string, id: string): Promise<ProbeSet | null> {
  if (!isId(id)) return null;
  const row = (await select(holding, houseId, eq(probeSet.id, id), 1))[0];
  return row === undefined ? null : toRound(row);
}

/** As `createHeapEntry`: a round that its sender gave an id is written once. */
export async function createProbeSet(
  holding: Holding,
  houseId: string,
  given: Given,
  act: Act,
): Promise<{ round: ProbeSet; isRepeat: boolean }> {
  const sourceId = await heapId(holding, houseId, given.source);
  const id = given.id ?? uuid();
  const { section, places, text } = given;
  const written = await holding.db
    .insert(probeSet)
    .values({
      ...{ holdingId: holding.id, id, sourceId, section, places, text, by: act.by, enteredAt: act.now },
      at: doneAt(given.at, act.now),
    })
    .onConflictDoNothing()
    .returning({ id: probeSet.id });
  const round = await findProbeSet(holding, houseId, id);
  if (round === null) throw new Refusal('id', 'This id was used for something else; make a new one.');
  return { round, isRepeat: written.length === 0 };
}

export async function amendProbeSet(
  holding: Holding,
  houseId: string,
  id: string,
  given: z.infer<typeof ProbeSetAmend>,
  act: Act,
): Promise<ProbeSet> {
  const { at, section, places, text } = given;
  await holding.db
    .update(probeSet)
    .set({
      ...{ section, places, text, amendedBy: act.by, amendedAt: act.now },
      ...(at === undefined ? {} : { at: doneAt(at, act.now) }),
      revision: sql`${probeSet.revision} + 1`,
    })
    .where(and(eq(probeSet.holdingId, holding.id), eq(probeSet.id, id)));
  const round = await findProbeSet(holding, houseId, id);
  if (round === null) throw new Error('the round was there a moment ago');
  return round;
}
