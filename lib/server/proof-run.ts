/** What is known of the runs of a proof: from what the node reported, from readings, and from how the house stands. */
import 'server-only';
import type { Holding } from '@/db/client';
import { listLoops } from '@/db/queries/loop';
import { leaseTrip, nodeBoot } from '@/db/queries/proof-evidence';
import type { KeptProof } from '@/db/queries/proof';
import { listPoints, pointNumbers } from '@/db/queries/point';
import { readRawSeries } from '@/db/queries/reading';
import { listRelayReports, readMemory } from '@/db/queries/running';
import { gainOfRun, type LoopEnd } from '@/lib/analysis/gain-run';
import { RUN_KINDS } from '@/lib/analysis/proof';
import { CALIBRATED_SD_K, classSd } from '@/lib/analysis/sensor-class';
import type { ProofRun, RunSeen } from '@/lib/schema/proof';
import type { Channel, House, Point } from '@/lib/schema/yard-view';

/** A report may come this long after what it tells of, and a node be away this long. */
const LATE_MS = 30_000;
const AWAY_MS = 3_600_000;
/** A pulse that ends by itself is reported off within this; anything else dropped the coil. */
const OWN_END_MS = 5000;

interface Ask {
  house: House;
  channel: Channel;
  now: number;
}

/** The last run of each kind, as it went. */
export async function runsSeen(holding: Holding, ask: Ask, proof: KeptProof): Promise<RunSeen[]> {
  const seen: RunSeen[] = [];
  for (const kind of RUN_KINDS) {
    const place = proof.runs.findLastIndex((one) => one.kind === kind);
    const run = proof.runs[place];
    if (run === undefined) continue;
    const next = proof.runs[place + 1];
    seen.push(await runSeen(holding, ask, run, next === undefined ? Infinity : Date.parse(next.at)));
  }
  return seen;
}

async function runSeen(holding: Holding, ask: Ask, run: ProofRun, nextAt: number): Promise<RunSeen> {
  const { channel, now } = ask;
  const at = Date.parse(run.at);
  const ends = Date.parse(run.stoppedAt ?? run.until);
  const isOver = now >= ends;
  const until = Math.min(ends + (run.kind === 'unplug' ? AWAY_MS : LATE_MS), nextAt);
  const reports = (await listRelayReports(holding, [channel.id], at, until)).filter((one) => one.at >= at);
  const startedAt = reports.find((one) => one.state === 'on')?.at ?? null;
  const endedAt =
    startedAt === null
      ? null
      : (reports.find((one) => one.state === 'off' && one.at >= startedAt)?.at ?? null);
  const iso = (instant: number | null) => (instant === null ? null : new Date(instant).toISOString());
  const ran = startedAt === null ? null : { from: startedAt, to: Math.min(endedAt ?? now, now) };
  return {
    ...{
      kind: run.kind,
      by: run.by,
      at: run.at,
      seconds: run.seconds,
      until: iso(ends) ?? run.until,
      isOver,
    },
    ...{ startedAt: iso(startedAt), endedAt: iso(endedAt) },
    heldBy: isOver || run.number === null ? null : await heldBy(holding, ask, run.number),
    shown: await shownBy(holding, ask, ran),
    gain: run.kind === 'gain' && ran !== null ? await gainOf(holding, ask, ran) : null,
    fell: run.kind === 'unplug' ? await fellOf(holding, ask, run, { at, ends, offAt: endedAt }) : null,
  };
}

/** The claim that decides though a run was ordered; null where the run decides, or the order is still under way. */
async function heldBy(holding: Holding, { house, channel }: Ask, number: number): Promise<string | null> {
  const kept = await readMemory(holding, house.id);
  if (kept === null || kept.taken < number) return null;
  const claim = kept.state?.channels.find((one) => one.key === channel.key)?.claim ?? null;
  return claim === 'proving' ? null : claim;
}

interface Ran {
  from: number;
  to: number;
}

async function shownBy(
  holding: Holding,
  { house, channel }: Ask,
  ran: Ran | null,
): Promise<RunSeen['shown']> {
  const { runProof } = channel;
  if (runProof === null) return null;
  const point = (await listPoints(holding, house.id)).find((one) => one.key === runProof.point);
  const values = ran === null || point === undefined ? [] : await goodOf(holding, house, point, ran);
  return {
    ...{ point: runProof.point, unit: point?.unit ?? '', above: runProof.above },
    readings: values.length,
    greatest: values.length === 0 ? null : Math.max(...values.map((one) => one.value)),
  };
}

/** Readings strictly within a run: one of the instant of its start was taken before it. Bad ones are left out. */
async function goodOf(holding: Holding, house: House, point: Point, ran: Ran) {
  const number = (await pointNumbers(holding, house.id)).get(point.key)?.number;
  if (number === undefined) return [];
  const series = (await readRawSeries(holding, [number], ran.from + 1, ran.to + 1)).get(number);
  return (series?.at ?? []).flatMap((at, place) => {
    const value = series?.value[place];
    return value === undefined || series?.quality[place] === 2 ? [] : [{ at, value }];
  });
}

async function gainOf(holding: Holding, { house, channel }: Ask, ran: Ran): Promise<RunSeen['gain']> {
  const loop = (await listLoops(holding, house.id)).find((one) => one.channel === channel.key);
  const points = await listPoints(holding, house.id);
  const end = async (key: string | undefined): Promise<LoopEnd | null> => {
    const point = points.find((one) => one.key === key);
    if (point === undefined) return null;
    const readings = await goodOf(holding, house, point, ran);
    const isCalibrated = point.offset !== 0 || point.gain !== 1;
    const sd = isCalibrated ? CALIBRATED_SD_K : classSd(point.sensor, readings.at(-1)?.value ?? 10);
    return { readings, sd };
  };
  const intake = await end(loop?.intake);
  const back = await end(loop?.return);
  return intake === null || back === null ? null : gainOfRun(intake, back, ran.from, ran.to);
}

/**
 * How the coil fell while nobody commanded the node: its own count of trips says that the lease did it; a node that lost its
 * power too comes back with another start, and its coil off.
 */
async function fellOf(
  holding: Holding,
  { house, channel }: Ask,
  run: ProofRun,
  { at, ends, offAt }: { at: number; ends: number; offAt: number | null },
): Promise<RunSeen['fell']> {
  const trip = await leaseTrip(holding, channel.id, at, at + AWAY_MS);
  if (trip !== null) {
    const { renewedAt = null, toldAt = 0 } = trip.lease ?? {};
    const awayS = renewedAt === null ? null : (toldAt - renewedAt) / 1000;
    return { how: 'lease', at: new Date(trip.at).toISOString(), awayS };
  }
  const boot = await nodeBoot(holding, house.id, channel.node);
  const isRestarted = run.boot !== null && boot !== null && boot !== run.boot;
  const isOwnEnd = offAt !== null && Math.abs(offAt - ends) <= OWN_END_MS;
  if (!isRestarted || offAt === null || isOwnEnd) return null;
  return { how: 'restart', at: new Date(offAt).toISOString(), awayS: null };
}
