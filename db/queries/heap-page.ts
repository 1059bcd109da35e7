/** What the page Heap book shows: one heap, what was done to it, and how its core went. */
import { and, asc, desc, eq, isNull } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { source } from '@/db/schema/channel';
import { calibration, point } from '@/db/schema/node';
import { reading } from '@/db/series';
import { coreTrend, type CoreTrend } from '@/lib/analysis/core';
import type { HeapEntry } from '@/lib/schema/heap-view';
import { listHeapEntries } from './heap-entry';
import { listNights } from './night';
import { correct, readSeries } from './reading';

export interface Heap {
  id: string;
  slug: string;
  name: string;
}

export interface HeapPage {
  heaps: Heap[];
  /** Null in a house without a heap. */
  heap: Heap | null;
  coreFloor: number | null;
  hasCorePoint: boolean;
  /** The newest good reading, if it is no older than a quarter of an hour. */
  core: { value: number; at: number } | null;
  trend: CoreTrend | null;
  /** Newest first. */
  entries: HeapEntry[];
  /** Means of an hour since it was built, or over the last 60 days. */
  curve: { at: number; value: number }[];
}

const DAY_MS = 86_400_000;
const FRESH_MS = 15 * 60_000;
const MOST_ENTRIES = 500;

export async function readHeapBook(
  holding: Holding,
  houseId: string,
  ask: { heap?: string | undefined },
  nowMs: number,
): Promise<HeapPage> {
  const rows = await holding.db
    .select()
    .from(source)
    .where(
      and(
        eq(source.holdingId, holding.id),
        eq(source.houseId, houseId),
        eq(source.kind, 'heap'),
        isNull(source.removedAt),
      ),
    )
    .orderBy(asc(source.createdAt), asc(source.id));
  const heaps = rows.map(({ id, slug, name }) => ({ id, slug, name }));
  const row = rows.find((one) => one.slug === ask.heap) ?? rows[0];
  const empty = { core: null, trend: null, entries: [], curve: [] };
  if (row === undefined) return { heaps, heap: null, coreFloor: null, hasCorePoint: false, ...empty };
  const { id, slug, name, coreFloor } = row;
  const page = { limit: MOST_ENTRIES, source: id };
  const entries = (await listHeapEntries(holding, houseId, page)).items;
  const head = { heaps, heap: { id, slug, name }, coreFloor };
  const core = row.corePointId === null ? null : await corePoint(holding, row.corePointId);
  if (core === null) return { ...head, hasCorePoint: false, ...empty, entries };
  const built = entries.find((entry) => entry.kind === 'built');
  // a day before: what the probe read while the heap went up belongs to its curve
  const begin = built === undefined ? nowMs - 60 * DAY_MS : Date.parse(built.at) - DAY_MS;
  const from = Math.max(begin, nowMs - 400 * DAY_MS);
  const series = (await readSeries(holding, [core.number], from, nowMs, 3600)).get(core.number);
  const nights = await listNights(holding, houseId, { sources: [slug], limit: 10 }, nowMs);
  return {
    ...head,
    hasCorePoint: true,
    core: await newest(holding, core, nowMs),
    trend: coreTrend(nights.flatMap((night) => night.coreAtDawn ?? []).reverse()),
    entries,
    curve: (series?.at ?? []).map((at, i) => ({ at, value: series?.mean[i] ?? 0 })),
  };
}

async function corePoint(holding: Holding, id: string): Promise<{ id: string; number: number } | null> {
  const [row] = await holding.db
    .select({ id: point.id, number: point.number })
    .from(point)
    .where(and(eq(point.holdingId, holding.id), eq(point.id, id), isNull(point.removedAt)));
  return row ?? null;
}

async function newest(holding: Holding, core: { id: string; number: number }, nowMs: number) {
  const [row] = await holding.db
    .select({ at: reading.at, value: reading.value })
    .from(reading)
    .where(and(eq(reading.point, core.number), eq(reading.quality, 0)))
    .orderBy(desc(reading.at))
    .limit(1);
  if (row === undefined || nowMs - row.at.getTime() > FRESH_MS) return null;
  const rows = await holding.db
    .select()
    .from(calibration)
    .where(and(eq(calibration.holdingId, holding.id), eq(calibration.pointId, core.id)))
    .orderBy(asc(calibration.from));
  const calibrations = rows.map((one) => ({ from: one.from.getTime(), offset: one.offset, gain: one.gain }));
  const at = row.at.getTime();
  return { at, value: correct(calibrations, at, row.value) };
}
