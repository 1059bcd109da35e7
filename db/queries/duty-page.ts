/** What the page Duty shows: the nights of one source, those that are chosen among them, and what they are compared with. */
import { and, asc, eq, gte, inArray, isNull } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { heapEntry } from '@/db/schema/heap';
import { source } from '@/db/schema/channel';
import { nightBefore, nightNamed, nightOf } from '@/lib/analysis/night';
import type { NightSummary } from '@/lib/analysis/nights';
import { openNight, type OpenedNightData } from './duty-night';
import { type Against, type Place, placesOf, readOther, type Other } from './duty-other';
import { listNights, nightsKept } from './night';
import { type DutyRecovery, readRecovery } from './duty-recovery';
import { type NightDay, readDays } from './night-days';

export interface DutyAsk {
  /** Slug; left out or unknown, the first source of the house. */
  source?: string | undefined;
  /** How many of the newest nights. */
  nights: number;
  /** Names of the nights chosen among those, both included; all of them where left out. */
  from?: string | undefined;
  to?: string | undefined;
  /** Name of the night that is opened. */
  night?: string | undefined;
}

export interface DutySource {
  id: string;
  slug: string;
  name: string;
  kind: string;
}

export interface HeapMark {
  at: number;
  kind: string;
}

export interface DutyData {
  sources: DutySource[];
  /** Null in a house without any. */
  source: DutySource | null;
  kept: { first: string; last: string; count: number } | null;
  /** Ascending, of all that may be chosen. */
  nights: NightSummary[];
  /** Of these, those that are. */
  chosen: NightSummary[];
  marks: HeapMark[];
  opened: OpenedNightData | null;
  /** Houses of the holding with their sources, for the choice of what to compare with. */
  places: Place[];
  other: Other | null;
  /** Null for what is no store: a heater does not come back. */
  recovery: DutyRecovery | null;
  /** A year of the source's nights, ascending. */
  year: NightDay[];
}

/** A page never shows more: past a year a line a night is no longer read, and the export has them all. */
export const MOST_NIGHTS = 400;
/** Kinds of source that come back by themselves. */
const STORES: ReadonlySet<string> = new Set(['heap', 'ground']);
/** Whole weeks, so that the first column is no stump. */
const YEAR = 53 * 7;

interface HouseOfDuty {
  id: string;
  slug: string;
  zone: string;
  latitude: number;
  longitude: number;
}

export async function readDuty(
  holding: Holding,
  house: HouseOfDuty,
  ask: DutyAsk,
  against: Against | null,
  nowMs: number,
): Promise<DutyData> {
  const sources = await sourcesOf(holding, house.id);
  const shown = sources.find((one) => one.slug === ask.source) ?? sources[0] ?? null;
  const empty = {
    kept: null,
    nights: [],
    chosen: [],
    marks: [],
    opened: null,
    places: [],
    other: null,
    recovery: null,
    year: [],
  };
  if (shown === null) return { sources, source: null, ...empty };
  const nights = await nightsOf(holding, house, shown, ask, nowMs);
  const chosen = chosenOf(nights, ask);
  const first = chosen[0];
  const places = await placesOf(holding);
  const marks = first === undefined ? [] : await marksOf(holding, shown.id, first.from);
  return {
    sources,
    source: shown,
    kept: await nightsKept(holding, shown.id),
    nights,
    chosen,
    marks,
    opened: await open(holding, house, shown, ask.night, nights, nowMs),
    places,
    other:
      against === null || first === undefined
        ? null
        : await readOther(holding, { house, source: shown, chosen, places }, against, nowMs),
    recovery: STORES.has(shown.kind) ? await readRecovery(holding, shown.id, chosen, marks) : null,
    year: await readDays(holding, shown.id, nightBefore(nightOf(nowMs, house.zone).night, YEAR - 1)),
  };
}

/** The newest that were asked for; more where what is chosen began before them. */
async function nightsOf(
  holding: Holding,
  house: HouseOfDuty,
  shown: DutySource,
  ask: DutyAsk,
  nowMs: number,
): Promise<NightSummary[]> {
  const limit = Math.min(Math.max(1, ask.nights), MOST_NIGHTS);
  const last = nightOf(nowMs, house.zone).night;
  const from = ask.from !== undefined && ask.from < nightBefore(last, limit - 1) ? ask.from : undefined;
  const wanted = {
    sources: [shown.slug],
    ...(from === undefined ? { limit } : { from, limit: MOST_NIGHTS }),
  };
  return (await listNights(holding, house.id, wanted, nowMs)).reverse();
}

/** An address that was kept may name nights that are none of these; all are shown then. */
function chosenOf(nights: NightSummary[], { from, to }: DutyAsk): NightSummary[] {
  if (from === undefined || to === undefined) return nights;
  const chosen = nights.filter(({ night }) => night >= from && night <= to);
  return chosen.length === 0 ? nights : chosen;
}

async function sourcesOf(holding: Holding, houseId: string): Promise<DutySource[]> {
  return holding.db
    .select({ id: source.id, slug: source.slug, name: source.name, kind: source.kind })
    .from(source)
    .where(and(eq(source.holdingId, holding.id), eq(source.houseId, houseId), isNull(source.removedAt)))
    .orderBy(asc(source.createdAt), asc(source.id));
}

async function marksOf(holding: Holding, sourceId: string, from: number): Promise<HeapMark[]> {
  const rows = await holding.db
    .select({ at: heapEntry.at, kind: heapEntry.kind })
    .from(heapEntry)
    .where(
      and(
        eq(heapEntry.holdingId, holding.id),
        eq(heapEntry.sourceId, sourceId),
        gte(heapEntry.at, new Date(from)),
        inArray(heapEntry.kind, ['built', 'fed', 'watered', 'turned', 'covered']),
      ),
    )
    .orderBy(asc(heapEntry.at));
  return rows.map((row) => ({ at: row.at.getTime(), kind: row.kind }));
}

async function open(
  holding: Holding,
  house: HouseOfDuty,
  shown: DutySource,
  name: string | undefined,
  nights: readonly NightSummary[],
  nowMs: number,
): Promise<OpenedNightData | null> {
  if (name === undefined || !isNight(name, house.zone)) return null;
  const wanted = { sources: [shown.slug], from: name, to: name, limit: 1 };
  const summary =
    nights.find(({ night }) => night === name) ?? (await listNights(holding, house.id, wanted, nowMs))[0];
  return summary === undefined ? null : openNight(holding, house, shown, summary, nowMs);
}

function isNight(name: string, zone: string): boolean {
  try {
    return nightNamed(name, zone).to > 0;
  } catch {
    return false;
  }
}
