/**
 * Making and keeping nights. What is due is told by what is kept, not by what was heard of: a night that is missing, that
 * lasted when it was made, that was made by another recipe (an air flow entered later changes every night's heat), or into
 * which readings came late. So it does not matter how often, or after which end, somebody looks.
 */
import { createHash } from 'node:crypto';
import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { houseNight as houseNightTable, night as nightTable } from '@/db/schema/study';
import { source } from '@/db/schema/channel';
import { house } from '@/db/schema/house';
import { houseNight } from '@/lib/analysis/house-night';
import { type Night, nightOf, nightsBetween } from '@/lib/analysis/night';
import { SUMMARY_VERSION } from '@/lib/analysis/nights';
import { summarise } from '@/lib/analysis/summarise';
import {
  countReadings,
  firstKnown,
  firstReading,
  nightInputs,
  yardOfNights,
  type YardOfNights,
} from './night-records';

/** How old a lasting night's summary may be when somebody asks for it, ms of app time. */
const FRESH_MS = 30_000;
/** A node that was cut off sends later what it kept, a day's worth at least: so far back readings are counted again. */
const LATE_MS = 3 * 86_400_000;
/** Nights of another recipe that are made in one turn, newest first: a year of them must not keep the relays waiting. */
const MOST_RECOOKED = 20;

interface Kept {
  madeAt: number;
  recipe: string;
}

/** What is kept of a night, by its name and the id of the source, or of the house. */
type KeptNights = Map<string, Kept>;

const keyOf = (night: string, id: string) => `${night} ${id}`;

/** Zone of a house; null where there is no such house. */
export async function zoneOf(holding: Holding, houseId: string): Promise<string | null> {
  const [row] = await holding.db
    .select({ zone: house.zone })
    .from(house)
    .where(and(eq(house.holdingId, holding.id), eq(house.id, houseId)));
  return row?.zone ?? null;
}

/**
 * Makes what a reader would find missing or stale: the lasting night, and the one before it just after noon. Every page
 * comes through here, so where all is fresh one small query says so: a house's row is made with those of its sources.
 */
export async function bringUp(holding: Holding, houseId: string, nowMs: number): Promise<void> {
  const zone = await zoneOf(holding, houseId);
  if (zone === null) return;
  const present = nightOf(nowMs, zone);
  const nights = [nightOf(present.from - 1, zone), present];
  const { rows } = await holding.db.execute<{ night: string; at: number }>(sql`
    select night::text as night, (extract(epoch from made_at) * 1000)::float8 as at from house_night
    where holding_id = ${holding.id} and house_id = ${houseId}
      and night between ${nights[0]?.night ?? null}::date and ${present.night}::date
      and (body->>'version')::int = ${SUMMARY_VERSION}`);
  const madeAt = new Map(rows.map((row) => [row.night, row.at]));
  const isStale = (night: Night) =>
    (madeAt.get(night.night) ?? -Infinity) < Math.min(night.to, nowMs - FRESH_MS);
  const stale = nights.filter(isStale);
  if (stale.length > 0) await makeDue(holding, houseId, nowMs, stale, () => true);
}

/**
 * Makes every night of a house that is due.
 * @returns how many nights were made
 */
export async function refreshNights(holding: Holding, houseId: string, nowMs: number): Promise<number> {
  await dropUnknown(holding, houseId);
  const made = await makeDue(holding, houseId, nowMs, null, (night, kept) =>
    kept === undefined ? true : kept.madeAt < Math.min(night.to, nowMs),
  );
  const late = await nightsGrown(holding, houseId, nowMs);
  const grown = late.length === 0 ? 0 : await remakeNights(holding, houseId, late, nowMs);
  return made + grown + (await recook(holding, houseId, nowMs));
}

/** Makes nights anew, whatever is kept: after an import, or when their making has changed. */
export async function remakeNights(
  holding: Holding,
  houseId: string,
  nights: readonly Night[],
  nowMs: number,
): Promise<number> {
  return makeDue(holding, houseId, nowMs, nights, () => true);
}

/**
 * Takes nights away that would not be made any more: those that ended before the first thing that is known of their source
 * or house. A logger's file that is taken back leaves them, and nothing would ever look at them again.
 */
async function dropUnknown(holding: Holding, houseId: string): Promise<void> {
  const sources = await firstKnown(holding, houseId);
  const reading = (await firstReading(holding, houseId)) ?? Infinity;
  const first = Math.min(reading, ...sources.values());
  const endsBy = (at: number) => (at === Infinity ? sql`true` : sql`(body->>'ends')::float8 <= ${at}`);
  const ofHouse = sql`holding_id = ${holding.id} and house_id = ${houseId}`;
  await holding.db.execute(sql`delete from house_night where ${ofHouse} and ${endsBy(first)}`);
  const inUse = await holding.db
    .select({ id: source.id })
    .from(source)
    .where(and(eq(source.holdingId, holding.id), eq(source.houseId, houseId), isNull(source.removedAt)));
  for (const { id } of inUse)
    await holding.db.execute(
      sql`delete from night where ${ofHouse} and source_id = ${id} and ${endsBy(sources.get(id) ?? Infinity)}`,
    );
}

/** Nights of the last days that ended and have more readings by now than they were made of, or than were seen behind them. */
async function nightsGrown(holding: Holding, houseId: string, nowMs: number): Promise<Night[]> {
  const yard = await yardOfNights(holding, houseId);
  if (yard === null) return [];
  const grown: Night[] = [];
  for (const night of nightsBetween(nowMs - LATE_MS, nowMs, yard.house.zone)) {
    if (night.to > nowMs) continue;
    const { rows } = await holding.db.execute<{ seen: number | null }>(sql`
      select least(
        (select min((body->>'seen')::int) from night
          where holding_id = ${holding.id} and house_id = ${houseId} and night = ${night.night}),
        (select (body->>'seen')::int from house_night
          where holding_id = ${holding.id} and house_id = ${houseId} and night = ${night.night})) as seen`);
    const kept = rows[0]?.seen;
    if (typeof kept === 'number' && kept < (await countReadings(holding, yard, night, nowMs)))
      grown.push(night);
  }
  return grown;
}

/** Makes the newest nights that were made while the house had other parts, flows or calibrations. */
async function recook(holding: Holding, houseId: string, nowMs: number): Promise<number> {
  const yard = await yardOfNights(holding, houseId);
  const span = yard === null ? null : await spanOf(holding, houseId, nowMs);
  if (yard === null || span === null) return 0;
  const recipe = recipeOf(yard);
  const nights = nightsBetween(span.from, nowMs, yard.house.zone);
  const kept = await keptNights(holding, houseId, nights);
  const old = new Set([...kept].flatMap(([key, one]) => (one.recipe === recipe ? [] : [key.slice(0, 10)])));
  const due = nights.filter(({ night }) => old.has(night)).slice(-MOST_RECOOKED);
  return due.length === 0 ? 0 : remakeNights(holding, houseId, due, nowMs);
}

interface Span {
  from: number;
  /** First thing known of each source, by its id. */
  sources: Map<string, number>;
}

/** From when on a house has nights; null where nothing is known of it. */
async function spanOf(holding: Holding, houseId: string, nowMs: number): Promise<Span | null> {
  const sources = new Map([...(await firstKnown(holding, houseId))].filter(([, first]) => first <= nowMs));
  const reading = (await firstReading(holding, houseId)) ?? Infinity;
  const from = Math.min(reading, ...sources.values());
  return from <= nowMs ? { from, sources } : null;
}

/**
 * @param only the nights looked at; null for all of the house
 * @param isDue told what is kept of the night; undefined where nothing is
 */
async function makeDue(
  holding: Holding,
  houseId: string,
  nowMs: number,
  only: readonly Night[] | null,
  isDue: (night: Night, kept: Kept | undefined) => boolean,
): Promise<number> {
  const zone = await zoneOf(holding, houseId);
  const span = await spanOf(holding, houseId, nowMs);
  if (zone === null || span === null) return 0;
  const nights = only ?? nightsBetween(span.from, nowMs, zone);
  const kept = await keptNights(holding, houseId, nights);
  let yard: YardOfNights | null = null;
  let count = 0;
  for (const night of nights) {
    if (night.from > nowMs || night.to <= span.from) continue;
    // a source has no nights from before anything was known of it
    const sources = [...span.sources].filter(([, first]) => first < night.to).map(([id]) => id);
    if (![houseId, ...sources].some((id) => isDue(night, kept.get(keyOf(night.night, id))))) continue;
    yard ??= await yardOfNights(holding, houseId);
    if (yard === null) return 0;
    await make(holding, yard, night, new Set(sources), nowMs);
    count += 1;
  }
  return count;
}

/** Rows of this make only. */
async function keptNights(holding: Holding, houseId: string, nights: readonly Night[]): Promise<KeptNights> {
  const names = nights.map((one) => one.night).sort();
  const { rows } = await holding.db.execute<{
    night: string;
    id: string;
    at: number;
    recipe: string | null;
  }>(sql`
    select night::text as night, id, (extract(epoch from made_at) * 1000)::float8 as at, body->>'recipe' as recipe
    from (
      select holding_id, house_id, source_id as id, night, made_at, body from night
      union all
      select holding_id, house_id, house_id as id, night, made_at, body from house_night
    ) kept
    where holding_id = ${holding.id} and house_id = ${houseId}
      and night between ${names[0] ?? null}::date and ${names.at(-1) ?? null}::date
      and (body->>'version')::int = ${SUMMARY_VERSION}`);
  return new Map(rows.map((row) => [keyOf(row.night, row.id), { madeAt: row.at, recipe: row.recipe ?? '' }]));
}

/** All of a house that a night's figures follow from, but for what was recorded. */
function recipeOf(yard: YardOfNights): string {
  return createHash('sha256').update(JSON.stringify(yard)).digest('base64url').slice(0, 12);
}

async function make(
  holding: Holding,
  yard: YardOfNights,
  night: Night,
  sources: ReadonlySet<string>,
  nowMs: number,
): Promise<void> {
  const inputs = await nightInputs(holding, yard, night, nowMs);
  const recipe = recipeOf(yard);
  const row = {
    ...{ holdingId: holding.id, houseId: yard.house.id, night: night.night },
    madeAt: new Date(nowMs),
  };
  const rows = [...inputs.sources]
    .filter(([sourceId]) => sources.has(sourceId))
    .map(([sourceId, input]) => ({
      ...row,
      sourceId,
      body: { ...summarise(input), recipe, seen: inputs.seen },
    }));
  // two may make the same night at once: what saw more readings stays, of equals the later look
  const newer = (table: typeof nightTable | typeof houseNightTable) =>
    sql`coalesce((${table.body}->>'readings')::int, 0) < (excluded.body->>'readings')::int
      or ${table.madeAt} <= excluded.made_at`;
  const set = { body: sql`excluded.body`, madeAt: sql`excluded.made_at` };
  if (rows.length > 0) {
    await holding.db
      .insert(nightTable)
      .values(rows)
      .onConflictDoUpdate({
        target: [nightTable.holdingId, nightTable.sourceId, nightTable.night],
        set,
        setWhere: newer(nightTable),
      });
  }
  await holding.db
    .insert(houseNightTable)
    .values({ ...row, body: { ...houseNight(inputs.house), recipe, seen: inputs.seen } })
    .onConflictDoUpdate({
      target: [houseNightTable.holdingId, houseNightTable.houseId, houseNightTable.night],
      set,
      setWhere: newer(houseNightTable),
    });
}
