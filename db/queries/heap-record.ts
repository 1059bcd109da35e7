/** Everything that is known of one heap, for its page, its findings and the interface: looked up once, the same for all. */
import 'server-only';
import { and, asc, desc, eq, isNull } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { source } from '@/db/schema/channel';
import { calibration, point } from '@/db/schema/node';
import { reading } from '@/db/series';
import { coreTrend, type CoreTrend, type Dawn } from '@/lib/analysis/core';
import type { Findings, HeapFacts } from '@/lib/analysis/heap-facts';
import { heapFindings } from '@/lib/analysis/heap-findings';
import type { HeatStep } from '@/lib/analysis/hot-spells';
import { heatRecord, type HeatRecord } from '@/lib/analysis/hygiene';
import { heapMix, type HeapMix } from '@/lib/analysis/material-book';
import { probeSummary } from '@/lib/analysis/probe-section';
import type { HeapEntry } from '@/lib/schema/heap-view';
import type { Material } from '@/lib/schema/material';
import type { ProbeSet } from '@/lib/schema/probe-set';
import { listDismissals } from './finding-dismissal';
import { listHeapEntries } from './heap-entry';
import { recoveryOfHeap } from './heap-recovery';
import { listMaterials } from './material';
import { listNights } from './night';
import { listProbeSets } from './probe-set';
import { correct, readSeries } from './reading';

export type HeapRow = typeof source.$inferSelect;

export interface HeapRecord {
  hasCorePoint: boolean;
  /** The newest good reading, if it is no older than a quarter of an hour. */
  core: { value: number; at: number } | null;
  trend: CoreTrend | null;
  /** Newest first. */
  entries: HeapEntry[];
  /** Newest first. */
  rounds: ProbeSet[];
  /** Means of an hour since it was built, or over the last 60 days. */
  curve: { at: number; value: number }[];
  materials: Material[];
  /** Of what went in since it was last built; null where that is not in the book. */
  mix: HeapMix | null;
  heat: HeatRecord | null;
  findings: Findings;
}

const DAY_MS = 86_400_000;
const FRESH_MS = 15 * 60_000;
const HEAT_STEP_S = 300;
const MOST_ENTRIES = 500;
const MOST_ROUNDS = 100;

/** Heaps of a house in the order in which they were entered. */
export async function heapRows(holding: Holding, houseId: string): Promise<HeapRow[]> {
  return holding.db
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
}

export async function readHeapRecord(
  holding: Holding,
  houseId: string,
  row: HeapRow,
  nowMs: number,
): Promise<HeapRecord> {
  const page = { limit: MOST_ENTRIES, source: row.id };
  const entries = (await listHeapEntries(holding, houseId, page)).items;
  const rounds = (await listProbeSets(holding, houseId, { limit: MOST_ROUNDS, source: row.id })).items;
  const materials = await listMaterials(holding);
  const built = entries.find((entry) => entry.kind === 'built');
  const went = built === undefined ? [] : entries.filter((entry) => entry.at >= built.at);
  const mix = went.length === 0 ? null : heapMix(went, materials);
  const measured = await readCore(holding, houseId, row, built, entries, nowMs);
  const facts = factsOf({ now: nowMs, ...measured, mix, entries, rounds });
  const since = built === undefined ? null : Date.parse(built.at);
  const recovery = await recoveryOfHeap(holding, houseId, { slug: row.slug, since }, nowMs);
  const dismissals = await listDismissals(holding, houseId, row.id);
  const findings = heapFindings(
    { ...facts, recovery },
    dismissals.map((one) => ({ ...one, at: Date.parse(one.at) })),
  );
  return { ...measured, entries, rounds, materials, mix, findings };
}

function factsOf(known: {
  now: number;
  core: HeapRecord['core'];
  trend: CoreTrend | null;
  dawns: Dawn[];
  mix: HeapMix | null;
  entries: readonly HeapEntry[];
  rounds: readonly ProbeSet[];
}): Omit<HeapFacts, 'recovery'> {
  const { now, core, trend, dawns, mix } = known;
  const round = known.rounds[0];
  const summary = round === undefined ? null : probeSummary(round.places);
  return {
    ...{ now, core, trend, dawns, mix },
    entries: known.entries.map(({ id, at, kind, smell, squeeze }) => ({
      ...{ id, kind, smell, squeeze },
      at: Date.parse(at),
    })),
    probes:
      round === undefined || summary === null
        ? null
        : {
            ...{ id: round.id, at: Date.parse(round.at) },
            ...{ hottestC: summary.hottest.celsius, coldestC: summary.coldest.celsius },
          },
  };
}

async function readCore(
  holding: Holding,
  houseId: string,
  row: HeapRow,
  built: HeapEntry | undefined,
  entries: readonly HeapEntry[],
  nowMs: number,
) {
  const none = { core: null, trend: null, dawns: [], curve: [], heat: null };
  const core = row.corePointId === null ? null : await corePoint(holding, row.corePointId);
  if (core === null) return { hasCorePoint: false, ...none };
  // a day before: what the probe read while the heap went up belongs to its curve
  const begin = built === undefined ? nowMs - 60 * DAY_MS : Date.parse(built.at) - DAY_MS;
  const from = Math.max(begin, nowMs - 400 * DAY_MS);
  const hours = (await readSeries(holding, [core.number], from, nowMs, 3600)).get(core.number);
  const nights = await listNights(holding, houseId, { sources: [row.slug], limit: 10 }, nowMs);
  const dawns = nights.flatMap((night) => night.coreAtDawn ?? []).reverse();
  const turned = entries.filter((entry) => entry.kind === 'turned').map((entry) => Date.parse(entry.at));
  const steps = await heatSteps(
    holding,
    core.number,
    built === undefined ? from : Date.parse(built.at),
    nowMs,
  );
  return {
    hasCorePoint: true,
    core: await newest(holding, core, nowMs),
    ...{ trend: coreTrend(dawns), dawns },
    curve: (hours?.at ?? []).map((at, i) => ({ at, value: hours?.mean[i] ?? 0 })),
    heat: heatRecord(steps, turned),
  };
}

async function heatSteps(holding: Holding, number: number, from: number, to: number): Promise<HeatStep[]> {
  const series = (await readSeries(holding, [number], from, to, HEAT_STEP_S)).get(number);
  return (series?.at ?? []).map((at, i) => ({
    from: at,
    to: Math.min(at + HEAT_STEP_S * 1000, to),
    least: series?.least[i] ?? 0,
    greatest: series?.greatest[i] ?? 0,
  }));
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
