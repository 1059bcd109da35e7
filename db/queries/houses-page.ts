/** What the page of all houses shows: how each stands, its last night, and what its sources gave in a week. */
import { and, asc, count, eq, gte, isNull, max, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { night as nightTable } from '@/db/schema/study';
import { alarm } from '@/db/schema/watch';
import { source } from '@/db/schema/channel';
import { heapEntry } from '@/db/schema/heap';
import { house } from '@/db/schema/house';
import { type CoreTrend, coreTrend } from '@/lib/analysis/core';
import { nightBefore, nightOf } from '@/lib/analysis/night';
import { type HouseNight, type NightSummary, SUMMARY_VERSION } from '@/lib/analysis/nights';
import { type NightTotals, totalOf } from '@/lib/analysis/totals';
import type { WatchCard } from '@/lib/schema/watch-view';
import { listHouseNights } from './night';
import { readCards } from './watch';

export interface SourceWeek {
  slug: string;
  name: string;
  /** Of its whole nights of the last seven; null where none is kept. */
  week: NightTotals | null;
  /** The first and the last night of the seven, by name; null where none is kept. */
  nights: { from: string; to: string } | null;
  /** Why heat is not known, where it is not. */
  missing: NightSummary['missing']['heat'];
  /** Null for what has no core, and under five dawns. */
  core: { trend: CoreTrend | null; last: { value: number; at: number } } | null;
}

export interface HouseStanding extends WatchCard {
  /** The last whole night; null where none is kept. */
  lastNight: Pick<HouseNight, 'night' | 'lowest' | 'coverageLow' | 'coverage'> | null;
  sources: SourceWeek[];
}

/** Dawns for the trend of a core need a day more than the nights of a week. */
const DAYS = 8;

export interface HousesPage {
  houses: HouseStanding[];
  /** Open alarms that are no house's own. */
  ofHolding: number;
}

export async function readHouses(holding: Holding, nowMs: number): Promise<HousesPage> {
  const cards = await readCards(holding, null);
  const rows = await holding.db
    .select({ house: house.slug, zone: house.zone, id: source.id, slug: source.slug, name: source.name })
    .from(source)
    .innerJoin(house, and(eq(house.holdingId, source.holdingId), eq(house.id, source.houseId)))
    .where(and(eq(source.holdingId, holding.id), isNull(source.removedAt), isNull(house.removedAt)))
    .orderBy(asc(source.createdAt), asc(source.id));
  // the earliest today of any zone, less a week
  const from = nightBefore(nightOf(nowMs, 'UTC').night, DAYS + 1);
  const nights = await lightNights(holding, from);
  const houseNights = await listHouseNights(holding, null, { from, to: nightBefore(from, -DAYS - 2) });
  const built = await builtLast(holding);
  const houses = cards.map((card) => {
    const own = rows.filter((row) => row.house === card.slug);
    const last = nightBefore(nightOf(nowMs, card.zone).night, 1);
    const sources = own.map(({ id, slug, name }) =>
      sourceWeek({ slug, name, built: built.get(id) ?? 0 }, nights.get(id) ?? [], last),
    );
    const told = houseNights.find((one) => one.house === card.slug && one.night.night === last)?.night;
    return {
      ...card,
      lastNight:
        told?.complete === true
          ? { night: told.night, lowest: told.lowest, coverageLow: told.coverageLow, coverage: told.coverage }
          : null,
      sources,
    };
  });
  const [whole] = await holding.db
    .select({ many: count() })
    .from(alarm)
    .where(and(eq(alarm.holdingId, holding.id), isNull(alarm.houseId), isNull(alarm.clearedAt)));
  return { houses, ofHolding: whole?.many ?? 0 };
}

function ends(nights: readonly NightSummary[]): { from: string; to: string } | null {
  const [first, last] = [nights[0], nights.at(-1)];
  return first === undefined || last === undefined ? null : { from: first.night, to: last.night };
}

function sourceWeek(
  { built, ...named }: { slug: string; name: string; built: number },
  nights: readonly NightSummary[],
  last: string,
): SourceWeek {
  const first = nightBefore(last, 6);
  const whole = nights.filter(({ night, complete }) => complete && night >= first && night <= last);
  const dawns = nights.flatMap(({ coreAtDawn }) => coreAtDawn ?? []).filter(({ at }) => at >= built);
  const dawn = dawns.at(-1);
  return {
    ...named,
    week: whole.length === 0 ? null : totalOf(whole),
    nights: ends(whole),
    missing: whole.at(-1)?.missing.heat,
    core: dawn === undefined ? null : { trend: coreTrend(dawns), last: dawn },
  };
}

/** When each heap was built last, epoch ms by its source: dawns from before are another heap's. */
async function builtLast(holding: Holding): Promise<Map<string, number>> {
  const rows = await holding.db
    .select({ sourceId: heapEntry.sourceId, at: max(heapEntry.at) })
    .from(heapEntry)
    .where(and(eq(heapEntry.holdingId, holding.id), eq(heapEntry.kind, 'built')))
    .groupBy(heapEntry.sourceId);
  return new Map(
    rows.flatMap(({ sourceId, at }) => (at === null ? [] : [[sourceId, at.getTime()] as const])),
  );
}

/** Nights of the whole holding by source, ascending, without what only an opened night shows. */
async function lightNights(holding: Holding, from: string): Promise<Map<string, NightSummary[]>> {
  const rows = await holding.db
    .select({
      sourceId: nightTable.sourceId,
      body: sql<Record<string, unknown>>`${nightTable.body} - 'draws' - 'rests'`,
    })
    .from(nightTable)
    .where(
      and(
        eq(nightTable.holdingId, holding.id),
        gte(nightTable.night, from),
        sql`(${nightTable.body}->>'version')::int = ${SUMMARY_VERSION}`,
      ),
    )
    .orderBy(asc(nightTable.night));
  const nights = new Map<string, NightSummary[]>();
  for (const { sourceId, body } of rows) {
    // written by listNights' maker and nowhere else, in this shape when the version agrees
    const summary = { draws: [], rests: [], ...body } as unknown as NightSummary;
    nights.set(sourceId, [...(nights.get(sourceId) ?? []), summary]);
  }
  return nights;
}
