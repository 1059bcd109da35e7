/**
 * Nights as they are kept. A row is a summary that can be made anew at any time from what was recorded; everybody who
 * shows a night reads its row, so that pages, CSV and interface agree.
 */
import { and, asc, desc, eq, gte, inArray, lt, lte, or, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { night as nightTable } from '@/db/schema/study';
import { source } from '@/db/schema/channel';
import { house } from '@/db/schema/house';
import { type Night, nightOf, nightsBetween } from '@/lib/analysis/night';
import { type NightSummary, SUMMARY_VERSION, summarise } from '@/lib/analysis/nights';
import { countReadings, firstKnown, nightInputs, yardOfNights, type YardOfNights } from './night-records';

/** How old a lasting night's summary may be when somebody asks for it, ms of app time. */
const FRESH_MS = 30_000;
/** A node that was cut off sends later what it kept, a day's worth at least: so far back nights are looked at again. */
const LATE_MS = 3 * 86_400_000;

export interface NightAsk {
  /** Slugs; left out, all sources of the house. */
  sources?: string[];
  /** Names of nights, both included. */
  from?: string;
  to?: string;
  limit: number;
  /** Behind this one. */
  after?: { night: string; source: string };
}

/** Newest night first, sources by slug within a night. The lasting night is brought up to `nowMs` before. */
export async function listNights(
  holding: Holding,
  houseId: string,
  ask: NightAsk,
  nowMs: number,
): Promise<NightSummary[]> {
  await bringUp(holding, houseId, nowMs);
  const { after } = ask;
  const rows = await holding.db
    .select({ body: nightTable.body })
    .from(nightTable)
    .innerJoin(source, and(eq(source.holdingId, nightTable.holdingId), eq(source.id, nightTable.sourceId)))
    .where(
      and(
        eq(nightTable.holdingId, holding.id),
        eq(nightTable.houseId, houseId),
        ask.sources === undefined ? undefined : inArray(source.slug, ask.sources),
        ask.from === undefined ? undefined : gte(nightTable.night, ask.from),
        ask.to === undefined ? undefined : lte(nightTable.night, ask.to),
        after === undefined
          ? undefined
          : or(
              lt(nightTable.night, after.night),
              and(eq(nightTable.night, after.night), sql`${source.slug} > ${after.source}`),
            ),
      ),
    )
    .orderBy(desc(nightTable.night), asc(source.slug))
    .limit(ask.limit);
  return rows.flatMap((row) => asSummary(row.body) ?? []);
}

/** This night so far, a summary a source, by slug. */
export async function nightSoFar(holding: Holding, houseId: string, nowMs: number): Promise<NightSummary[]> {
  const zone = await zoneOf(holding, houseId);
  if (zone === null) return [];
  const { night } = nightOf(nowMs, zone);
  return listNights(holding, houseId, { from: night, to: night, limit: 500 }, nowMs);
}

/** Names of the first and the last night that are kept of a source; null without any. */
export async function nightsKept(
  holding: Holding,
  sourceId: string,
): Promise<{ first: string; last: string; count: number } | null> {
  const [row] = await holding.db
    .select({
      first: sql<string | null>`min(${nightTable.night})::text`,
      last: sql<string | null>`max(${nightTable.night})::text`,
      count: sql<number>`count(*)::int`,
    })
    .from(nightTable)
    .where(and(eq(nightTable.holdingId, holding.id), eq(nightTable.sourceId, sourceId)));
  if (row === undefined || row.first === null || row.last === null) return null;
  return { first: row.first, last: row.last, count: row.count };
}

/** A row of an older make is not shown: it is made anew by the next look. */
function asSummary(body: Record<string, unknown>): NightSummary | null {
  // written below and nowhere else, in this shape when the version agrees
  return body['version'] === SUMMARY_VERSION ? (body as unknown as NightSummary) : null;
}

async function zoneOf(holding: Holding, houseId: string): Promise<string | null> {
  const [row] = await holding.db
    .select({ zone: house.zone })
    .from(house)
    .where(and(eq(house.holdingId, holding.id), eq(house.id, houseId)));
  return row?.zone ?? null;
}

/** Makes what a reader would find missing or stale: the lasting night, and the one before it just after noon. */
async function bringUp(holding: Holding, houseId: string, nowMs: number): Promise<void> {
  const zone = await zoneOf(holding, houseId);
  if (zone === null) return;
  const present = nightOf(nowMs, zone);
  await makeDue(holding, houseId, nowMs, (night, madeAt) => madeAt < Math.min(night.to, nowMs - FRESH_MS), {
    nights: [nightOf(present.from - 1, zone), present],
  });
}

/**
 * Makes every night of a house that is missing or lasts, and those of the last days for which readings came in late.
 * @returns how many nights were made
 */
export async function refreshNights(holding: Holding, houseId: string, nowMs: number): Promise<number> {
  const made = await makeDue(holding, houseId, nowMs, (night, madeAt) => madeAt < Math.min(night.to, nowMs));
  const late = await nightsGrown(holding, houseId, nowMs);
  return made + (late.length === 0 ? 0 : await remakeNights(holding, houseId, late, nowMs));
}

/** Whole nights of the last days that have more readings by now than they were made of. */
async function nightsGrown(holding: Holding, houseId: string, nowMs: number): Promise<Night[]> {
  const yard = await yardOfNights(holding, houseId);
  if (yard === null) return [];
  const grown: Night[] = [];
  for (const night of nightsBetween(nowMs - LATE_MS, nowMs, yard.house.zone)) {
    if (night.to > nowMs) continue;
    const { rows } = await holding.db.execute<{ readings: number | null }>(sql`
      select min((body->>'readings')::int) as readings from night
      where holding_id = ${holding.id} and house_id = ${houseId} and night = ${night.night}`);
    const kept = rows[0]?.readings;
    if (typeof kept === 'number' && kept < (await countReadings(holding, yard, night))) grown.push(night);
  }
  return grown;
}

/** Makes nights anew, whatever is kept: after an import, or when their making has changed. */
export async function remakeNights(
  holding: Holding,
  houseId: string,
  nights: readonly Night[],
  nowMs: number,
): Promise<number> {
  return makeDue(holding, houseId, nowMs, () => true, { nights });
}

/** @param isDue told when the night was last made, −∞ where it never was */
async function makeDue(
  holding: Holding,
  houseId: string,
  nowMs: number,
  isDue: (night: Night, madeAt: number) => boolean,
  only?: { nights: readonly Night[] },
): Promise<number> {
  const zone = await zoneOf(holding, houseId);
  const known = [...(await firstKnown(holding, houseId))].filter(([, first]) => first <= nowMs);
  if (zone === null || known.length === 0) return 0;
  const nights = only?.nights ?? nightsBetween(Math.min(...known.map(([, first]) => first)), nowMs, zone);
  const made = await madeAtOf(holding, houseId, nights);
  let yard: YardOfNights | null = null;
  let count = 0;
  for (const night of nights) {
    if (night.from > nowMs) continue;
    // a source has no nights from before anything was known of it
    const sources = known.filter(([, first]) => first < night.to).map(([id]) => id);
    if (!sources.some((id) => isDue(night, made.get(`${night.night} ${id}`) ?? -Infinity))) continue;
    yard ??= await yardOfNights(holding, houseId);
    if (yard === null) return 0;
    await make(holding, yard, night, new Set(sources), nowMs);
    count += 1;
  }
  return count;
}

/** When each row of this make was made, epoch ms, by the night's name and the source's id. */
async function madeAtOf(
  holding: Holding,
  houseId: string,
  nights: readonly Night[],
): Promise<Map<string, number>> {
  const names = nights.map((one) => one.night).sort();
  const { rows } = await holding.db.execute<{ night: string; source: string; at: number }>(sql`
    select night::text as night, source_id as source, (extract(epoch from made_at) * 1000)::float8 as at
    from night
    where holding_id = ${holding.id} and house_id = ${houseId}
      and night between ${names[0] ?? null}::date and ${names.at(-1) ?? null}::date
      and (body->>'version')::int = ${SUMMARY_VERSION}`);
  return new Map(rows.map((row) => [`${row.night} ${row.source}`, row.at]));
}

async function make(
  holding: Holding,
  yard: YardOfNights,
  night: Night,
  sources: ReadonlySet<string>,
  nowMs: number,
): Promise<void> {
  const inputs = await nightInputs(holding, yard, night, nowMs);
  const rows = [...inputs]
    .filter(([sourceId]) => sources.has(sourceId))
    .map(([sourceId, input]) => ({
      holdingId: holding.id,
      houseId: yard.house.id,
      sourceId,
      night: night.night,
      body: { ...summarise(input) },
      madeAt: new Date(nowMs),
    }));
  if (rows.length === 0) return;
  await holding.db
    .insert(nightTable)
    .values(rows)
    .onConflictDoUpdate({
      target: [nightTable.holdingId, nightTable.sourceId, nightTable.night],
      set: { body: sql`excluded.body`, madeAt: sql`excluded.made_at` },
      // two may make the same night at once: what saw more readings stays, of equals the later look
      setWhere: sql`coalesce((${nightTable.body}->>'readings')::int, 0) < (excluded.body->>'readings')::int
        or ${nightTable.madeAt} <= excluded.made_at`,
    });
}
