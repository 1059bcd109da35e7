/** What a night is made of: the house's parts as they stand, and what was kept of readings, decisions and reports. */
import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { AnyPgColumn } from 'drizzle-orm/pg-core';
import type { Holding } from '@/db/client';
import { channel, loop, source } from '@/db/schema/channel';
import { house } from '@/db/schema/house';
import { calibration, node, point } from '@/db/schema/node';
import type { NightChannel, NightInput } from '@/lib/analysis/nights';
import { CALIBRATED_SD_K, classSd } from '@/lib/analysis/sensor-class';
import type { HouseNightInput } from '@/lib/analysis/house-night';
import type { Night } from '@/lib/analysis/night';
import type { Series } from '@/lib/analysis/series';
import { readingsOf } from '@/lib/analysis/summarise';
import { recordsOf } from './channel-records';
import type { Calibration } from './plan';
import { correct } from './reading';

export interface YardOfNights {
  house: HouseNightInput['house'] & { id: string };
  sources: (NightInput['source'] & { id: string })[];
  points: PointOfNights[];
  channels: ChannelOfNights[];
}

interface PointOfNights {
  number: number;
  key: string;
  name: string;
  role: string;
  holdS: number;
  /** By its sensor's class; a calibration in force goes first. */
  sensor: string | null;
  calibrations: Calibration[];
}

interface ChannelOfNights extends Omit<NightChannel, 'record'> {
  id: string;
  key: string;
  /** Null for what draws on nothing. */
  sourceId: string | null;
  nodeKey: string;
  safe: 'on' | 'off';
  removedAt: number | null;
}

/** Twice a missed report still counts as read; the third makes the point silent, as control counts it. */
const REPORTS_HELD = 3;
/** Readings so long before the noon hold into the night at least. */
const LEAD_MS = 15 * 60_000;

/** Parts of a house that nights are made of, those taken out of use included: what they did stays. Null: no such house. */
export async function yardOfNights(holding: Holding, houseId: string): Promise<YardOfNights | null> {
  const { db } = holding;
  const [head] = await db
    .select()
    .from(house)
    .where(and(eq(house.holdingId, holding.id), eq(house.id, houseId)));
  if (head === undefined) return null;
  const of = (table: { holdingId: AnyPgColumn; houseId: AnyPgColumn }) =>
    and(eq(table.holdingId, holding.id), eq(table.houseId, houseId));
  const nodes = new Map((await db.select().from(node).where(of(node))).map((row) => [row.id, row]));
  const points = await db.select().from(point).where(of(point)).orderBy(asc(point.number));
  const keys = new Map(points.map((row) => [row.id, row.key]));
  const keyOf = (id: string | null) => (id === null ? null : (keys.get(id) ?? null));
  const corrections = await calibrationsOf(
    holding,
    points.map((row) => row.id),
  );
  const loops = await db
    .select()
    .from(loop)
    .where(and(of(loop), isNull(loop.removedAt)));
  const sources = await db
    .select()
    .from(source)
    .where(and(of(source), isNull(source.removedAt)))
    .orderBy(asc(source.id));
  const channels = await db.select().from(channel).where(of(channel)).orderBy(asc(channel.number));
  const { zone, latitude, longitude } = head;
  return {
    house: {
      ...{ id: head.id, zone, latitude, longitude, altitudeM: head.altitude },
      ...{ frostLimitC: head.frostLimit, frostAlarmC: head.frostAlarm },
    },
    sources: sources.map((row) => ({
      id: row.id,
      slug: row.slug,
      core: keyOf(row.corePointId),
      base: keyOf(row.basePointId),
    })),
    points: points.map((row) => ({
      number: row.number,
      key: row.key,
      name: row.name,
      role: row.role,
      holdS: row.staleAfterS ?? REPORTS_HELD * (nodes.get(row.nodeId ?? '')?.reportEveryS ?? 30),
      sensor: row.sensor,
      calibrations: corrections.get(row.id) ?? [],
    })),
    channels: channels.map((row): ChannelOfNights => {
      const own = loops.find((one) => one.channelId === row.id && one.sourceId === row.sourceId);
      const [intake, back] = [keyOf(own?.intakePointId ?? null), keyOf(own?.returnPointId ?? null)];
      return {
        id: row.id,
        key: row.key,
        sourceId: row.sourceId,
        number: row.number,
        label: row.label,
        powerW: row.load.watts ?? null,
        flow:
          row.flow === null
            ? null
            : {
                m3PerS: row.flow.litresPerSecond / 1000,
                sdM3PerS: row.flow.sd === undefined ? null : row.flow.sd / 1000,
                from: row.flow.from,
              },
        runProof: row.runProof,
        loop: intake === null || back === null ? null : { intake, return: back },
        nodeKey: nodes.get(row.nodeId)?.key ?? '',
        safe: row.contact === 'NC' ? 'on' : 'off',
        removedAt: row.removedAt?.getTime() ?? null,
      };
    }),
  };
}

async function calibrationsOf(holding: Holding, pointIds: string[]): Promise<Map<string, Calibration[]>> {
  const found = new Map<string, Calibration[]>();
  if (pointIds.length === 0) return found;
  const rows = await holding.db
    .select()
    .from(calibration)
    .where(and(eq(calibration.holdingId, holding.id), inArray(calibration.pointId, pointIds)))
    .orderBy(asc(calibration.from));
  for (const row of rows) {
    const list = found.get(row.pointId) ?? [];
    list.push({ from: row.from.getTime(), offset: row.offset, gain: row.gain });
    found.set(row.pointId, list);
  }
  return found;
}

export interface InputsOfNight {
  house: HouseNightInput;
  /** By the source's id. */
  sources: Map<string, NightInput>;
  /** Good readings that were looked at, those behind its second noon included: where more are kept by now, it is due. */
  seen: number;
}

/** One night of a house and of every source of it, ready to be summed up. */
export async function nightInputs(
  holding: Holding,
  yard: YardOfNights,
  night: Night,
  nowMs: number,
): Promise<InputsOfNight> {
  const to = Math.min(night.to, nowMs);
  const channels = yard.channels.filter((one) => one.removedAt === null || one.removedAt > night.from);
  const records = await recordsOf(holding, yard.house.id, channels, night.from, to);
  const reach = reachOf(yard);
  // the line over the second noon ends at the first reading behind it; whatever is summed up is cut at the night's end
  const until = Math.min(night.to + reach, nowMs);
  const points = await seriesOf(holding, yard, { from: night.from - reach, to, until });
  const recorded = channels.flatMap((one) => {
    const record = records.get(one.id);
    return record === undefined ? [] : [{ ...one, record }];
  });
  const common = { night, nowMs, house: yard.house, points };
  const sources = yard.sources.map(({ id, ...source }) => {
    const own = recorded.filter((one) => one.sourceId === id);
    return [id, { ...common, source, channels: own }] as const;
  });
  const seen = readingsOf(points, night.from, until);
  return { house: { ...common, channels: recorded }, sources: new Map(sources), seen };
}

/** How far before and after a night its readings reach into it, ms: the longest that one of its points is believed. */
function reachOf(yard: YardOfNights): number {
  return Math.max(LEAD_MS, ...pointsOfNights(yard).map((one) => one.holdS * 1000));
}

const ROLES_OF_EVERY_NIGHT = ['house-air', 'bench', 'outdoors', 'humidity'];

function pointsOfNights(yard: YardOfNights): PointOfNights[] {
  const named = new Set([
    ...yard.sources.flatMap((one) => [one.core, one.base]),
    ...yard.channels.flatMap((one) => [one.loop?.intake, one.loop?.return, one.runProof?.point]),
  ]);
  return yard.points.filter((one) => ROLES_OF_EVERY_NIGHT.includes(one.role) || named.has(one.key));
}

function numbersOf(points: readonly PointOfNights[]) {
  return sql.join(
    points.map((one) => sql`${one.number}`),
    sql`, `,
  );
}

/** Where a class depends on the temperature: between house air and what comes back from a heap, °C. */
const USUAL_C = 20;

function calibratedBy({ calibrations }: PointOfNights, at: number): boolean {
  const inForce = calibrations.findLast((one) => one.from < at);
  return inForce !== undefined && (inForce.offset !== 0 || inForce.gain !== 1);
}

/** How many good readings a night that has ended would look at by now. */
export async function countReadings(
  holding: Holding,
  yard: YardOfNights,
  night: Night,
  nowMs: number,
): Promise<number> {
  const points = pointsOfNights(yard);
  if (points.length === 0) return 0;
  const until = Math.min(night.to + reachOf(yard), nowMs);
  const { rows } = await holding.db.execute<{ count: number }>(sql`
    select count(*)::int as count from reading
    where point in (${numbersOf(points)}) and at >= ${new Date(night.from)} and at < ${new Date(until)}
      and quality = 0`);
  return rows[0]?.count ?? 0;
}

/** Good readings of the points that nights need, corrected. Plain rows: a night of a house has some 30 000. */
async function seriesOf(
  holding: Holding,
  yard: YardOfNights,
  { from, to, until }: { from: number; to: number; until: number },
): Promise<Map<string, Series>> {
  const wanted = pointsOfNights(yard);
  const series = new Map<number, { from: PointOfNights; line: Series }>(
    wanted.map((one) => {
      const { key, name, role, holdS } = one;
      const sd = calibratedBy(one, to) ? CALIBRATED_SD_K : classSd(one.sensor, USUAL_C);
      return [one.number, { from: one, line: { key, name, role, holdS, sd, good: [] } }];
    }),
  );
  if (wanted.length > 0) {
    const { rows } = await holding.db.execute<{ point: string; at: number; value: number }>(sql`
      select point, (extract(epoch from at) * 1000)::float8 as at, value from reading
      where point in (${numbersOf(wanted)}) and at >= ${new Date(from)} and at < ${new Date(until)}
        and quality = 0
      order by point, at`);
    for (const row of rows) {
      const one = series.get(Number(row.point));
      one?.line.good.push({ at: row.at, value: correct(one.from.calibrations, row.at, row.value) });
    }
  }
  return new Map([...series.values()].map(({ line }) => [line.key, line]));
}

/**
 * Epoch ms of the first thing that is known of each source of a house: a decision of a channel of its own, or a reading of
 * its core or base. Sources of which nothing is known are absent: they have no nights yet.
 */
export async function firstKnown(holding: Holding, houseId: string): Promise<Map<string, number>> {
  const { rows } = await holding.db.execute<{ id: string; at: number | null }>(sql`
    select s.id, (extract(epoch from least(
      (select min(first.at) from channel c cross join lateral
        (select at from decision where channel_id = c.id order by at limit 1) first
        where c.holding_id = s.holding_id and c.source_id = s.id),
      (select min(first.at) from point p cross join lateral
        (select at from reading where point = p.number order by at limit 1) first
        where p.holding_id = s.holding_id and p.id in (s.core_point_id, s.base_point_id))
    )) * 1000)::float8 as at
    from source s
    where s.holding_id = ${holding.id} and s.house_id = ${houseId} and s.removed_at is null`);
  return new Map(rows.flatMap((row) => (row.at === null ? [] : [[row.id, row.at] as const])));
}

/** Epoch ms of the first reading of a house; null without any. */
export async function firstReading(holding: Holding, houseId: string): Promise<number | null> {
  const { rows } = await holding.db.execute<{ at: number | null }>(sql`
    select (extract(epoch from min(first.at)) * 1000)::float8 as at
    from point p cross join lateral
      (select at from reading where point = p.number order by at limit 1) first
    where p.holding_id = ${holding.id} and p.house_id = ${houseId}`);
  return rows[0]?.at ?? null;
}
