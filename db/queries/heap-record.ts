/** Everything that is known of one heap, for its page, its findings and the interface: looked up once, the same for all. */
import 'server-only';
import { and, asc, desc, eq, isNull } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { source } from '@/db/schema/channel';
import { point } from '@/db/schema/node';
import { reading } from '@/db/series';
import { coreTrend, type CoreTrend, type Dawn } from '@/lib/analysis/core';
import { type HeapFacts, sinceBuilt } from '@/lib/analysis/heap-facts';
import { heapFindings } from '@/lib/analysis/heap-findings';
import { heatRecord } from '@/lib/analysis/hygiene';
import { heapMix, type HeapMix } from '@/lib/analysis/material-book';
import { probeSummary } from '@/lib/analysis/probe-section';
import type { HeapRecord } from '@/lib/schema/heap-record';
import type { HeapEntry } from '@/lib/schema/heap-view';
import type { ProbeSet } from '@/lib/schema/probe-set';
import { listDismissals } from './finding-dismissal';
import { listHeapEntries } from './heap-entry';
import { calibrationsOfPoint, type CorePoint, heatSteps } from './heap-record-heat';
import { recoveryOfHeap } from './heap-recovery';
import { listMaterials } from './material';
import { listNights } from './night';
import { listProbeSets } from './probe-set';
import { correct, readSeries } from './reading';

export type HeapRow = typeof source.$inferSelect;

const DAY_MS = 86_400_000;
const FRESH_MS = 15 * 60_000;
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
  const own = sinceBuilt(entries);
  const built = own.find((entry) => entry.kind === 'built');
  const mix = built === undefined ? null : heapMix(own, materials);
  const since = built === undefined ? null : Date.parse(built.at);
  const measured = await readCore(holding, houseId, row, { since, entries: own }, nowMs);
  const ownRounds = rounds.filter((round) => since === null || Date.parse(round.at) >= since);
  const facts = factsOf({ now: nowMs, ...measured, mix, entries: own, rounds: ownRounds });
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
  { since, entries }: { since: number | null; entries: readonly HeapEntry[] },
  nowMs: number,
) {
  const none = { core: null, trend: null, dawns: [], curve: [], heat: null };
  const core = row.corePointId === null ? null : await corePoint(holding, row.corePointId);
  if (core === null) return { hasCorePoint: false, ...none };
  // a day before: what the probe read while the heap went up belongs to its curve
  const begin = since === null ? nowMs - 60 * DAY_MS : since - DAY_MS;
  const from = Math.max(begin, nowMs - 400 * DAY_MS);
  const hours = (await readSeries(holding, [core.number], from, nowMs, 3600)).get(core.number);
  const nights = await listNights(holding, houseId, { sources: [row.slug], limit: 10 }, nowMs);
  const dawns = nights
    .flatMap((night) => night.coreAtDawn ?? [])
    .filter((dawn) => dawn.at >= (since ?? 0))
    .reverse();
  const turned = entries.filter((entry) => entry.kind === 'turned').map((entry) => Date.parse(entry.at));
  const steps = await heatSteps(holding, core, since ?? from, nowMs);
  return {
    hasCorePoint: true,
    core: await newest(holding, core, nowMs),
    ...{ trend: coreTrend(dawns), dawns },
    curve: (hours?.at ?? []).map((at, i) => ({ at, value: hours?.mean[i] ?? 0 })),
    heat: heatRecord(steps, turned),
  };
}

async function corePoint(holding: Holding, id: string): Promise<CorePoint | null> {
  const [row] = await holding.db
    .select({ id: point.id, number: point.number })
    .from(point)
    .where(and(eq(point.holdingId, holding.id), eq(point.id, id), isNull(point.removedAt)));
  return row ?? null;
}

async function newest(holding: Holding, core: CorePoint, nowMs: number) {
  const [row] = await holding.db
    .select({ at: reading.at, value: reading.value })
    .from(reading)
    .where(and(eq(reading.point, core.number), eq(reading.quality, 0)))
    .orderBy(desc(reading.at))
    .limit(1);
  if (row === undefined || nowMs - row.at.getTime() > FRESH_MS) return null;
  const calibrations = await calibrationsOfPoint(holding, core.id);
  const at = row.at.getTime();
  return { at, value: correct(calibrations, at, row.value) };
}
