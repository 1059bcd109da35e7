/**
 * Nights as they are kept. A row is a summary that can be made anew at any time from what was recorded; everybody who
 * shows a night reads its row, so that pages, CSV and interface agree. night-making.ts makes them.
 */
import { and, asc, desc, eq, gte, inArray, isNull, lt, lte, or, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { houseNight as houseNightTable, night as nightTable } from '@/db/schema/study';
import { source } from '@/db/schema/channel';
import { house } from '@/db/schema/house';
import { nightOf } from '@/lib/analysis/night';
import { type HouseNight, type NightSummary, SUMMARY_VERSION } from '@/lib/analysis/nights';
import { bringUp, zoneOf } from './night-making';

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
  // written by night-making.ts and nowhere else, in this shape when the version agrees
  return body['version'] === SUMMARY_VERSION ? (body as unknown as NightSummary) : null;
}

export interface HouseNightOf {
  /** Slug. */
  house: string;
  night: HouseNight;
}

/**
 * Nights of a house, or with null of all houses of the holding that are in use, in the range of names, both included:
 * ascending by night, houses by slug within one. The lasting night is as fresh as its last look, some minutes.
 */
export async function listHouseNights(
  holding: Holding,
  houseId: string | null,
  ask: { from: string; to: string },
): Promise<HouseNightOf[]> {
  const rows = await holding.db
    .select({ house: house.slug, body: houseNightTable.body })
    .from(houseNightTable)
    .innerJoin(
      house,
      and(eq(house.holdingId, houseNightTable.holdingId), eq(house.id, houseNightTable.houseId)),
    )
    .where(
      and(
        eq(houseNightTable.holdingId, holding.id),
        houseId === null ? isNull(house.removedAt) : eq(houseNightTable.houseId, houseId),
        gte(houseNightTable.night, ask.from),
        lte(houseNightTable.night, ask.to),
      ),
    )
    .orderBy(asc(houseNightTable.night), asc(house.slug));
  return rows.flatMap((row) => {
    const night = asHouseNight(row.body);
    return night === null ? [] : [{ house: row.house, night }];
  });
}

/** As `asSummary`, of a house. */
function asHouseNight(body: Record<string, unknown>): HouseNight | null {
  // written by night-making.ts and nowhere else, in this shape when the version agrees
  return body['version'] === SUMMARY_VERSION ? (body as unknown as HouseNight) : null;
}
