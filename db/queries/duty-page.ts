/** What the page Duty shows: the nights of one source, and the one that is opened. */
import { and, asc, eq, gte, inArray, isNull, lt } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { heapEntry } from '@/db/schema/heap';
import { channel, source } from '@/db/schema/channel';
import { nightNamed } from '@/lib/analysis/night';
import type { NightSummary } from '@/lib/analysis/nights';
import type { State } from '@/lib/control/types';
import { listNights, nightsKept } from './night';
import { listDecisions } from './decision';

export interface DutyAsk {
  /** Slug; left out or unknown, the first source of the house. */
  source?: string | undefined;
  /** How many of the newest nights. */
  nights: number;
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

export interface OpenedDecision {
  channel: string;
  key: string;
  at: number;
  state: State;
  claim: string;
}

export interface DutyData {
  sources: DutySource[];
  /** Null in a house without any. */
  source: DutySource | null;
  kept: { first: string; last: string; count: number } | null;
  /** Ascending. */
  nights: NightSummary[];
  marks: HeapMark[];
  opened: { summary: NightSummary; decisions: OpenedDecision[] } | null;
}

/** A page never shows more: past a year a line a night is no longer read, and the export has them all. */
export const MOST_NIGHTS = 400;

export async function readDuty(
  holding: Holding,
  house: { id: string; zone: string },
  ask: DutyAsk,
  nowMs: number,
): Promise<DutyData> {
  const sources = await sourcesOf(holding, house.id);
  const shown = sources.find((one) => one.slug === ask.source) ?? sources[0] ?? null;
  if (shown === null) return { sources, source: null, kept: null, nights: [], marks: [], opened: null };
  const limit = Math.min(Math.max(1, ask.nights), MOST_NIGHTS);
  const nights = (await listNights(holding, house.id, { sources: [shown.slug], limit }, nowMs)).reverse();
  const first = nights[0];
  return {
    sources,
    source: shown,
    kept: await nightsKept(holding, shown.id),
    nights,
    marks: first === undefined ? [] : await marksOf(holding, shown.id, first.from),
    opened: await open(holding, house, shown, ask.night, nights, nowMs),
  };
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
  house: { id: string; zone: string },
  shown: DutySource,
  name: string | undefined,
  nights: readonly NightSummary[],
  nowMs: number,
): Promise<DutyData['opened']> {
  if (name === undefined || !isNight(name, house.zone)) return null;
  const [summary] =
    nights.filter((night) => night.night === name).length > 0
      ? nights.filter((night) => night.night === name)
      : await listNights(holding, house.id, { sources: [shown.slug], from: name, to: name, limit: 1 }, nowMs);
  if (summary === undefined) return null;
  const channels = await holding.db
    .select({ id: channel.id, key: channel.key, label: channel.label })
    .from(channel)
    .where(
      and(
        eq(channel.holdingId, holding.id),
        eq(channel.sourceId, shown.id),
        lt(channel.createdAt, new Date(summary.to)),
      ),
    )
    .orderBy(asc(channel.number));
  const named = new Map(channels.map((row) => [row.id, row]));
  const decisions = await listDecisions(holding, [...named.keys()], summary.from, summary.to);
  return {
    summary,
    decisions: decisions.map(({ channelId, at, state, claim }) => ({
      channel: named.get(channelId)?.label ?? '',
      key: named.get(channelId)?.key ?? '',
      at,
      state,
      claim,
    })),
  };
}

function isNight(name: string, zone: string): boolean {
  try {
    return nightNamed(name, zone).to > 0;
  } catch {
    return false;
  }
}
