import 'server-only';
import { and, asc, count, eq, isNull, ne } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { controlMemory } from '@/db/schema/running';
import { alarm } from '@/db/schema/watch';
import { channel } from '@/db/schema/channel';
import { house as houseTable } from '@/db/schema/house';
import { nightOf } from '@/lib/analysis/night';
import type { HouseConfig } from '@/lib/control/types';
import type { HouseState } from '@/lib/schema/house-state';
import type { WatchCard, WatchView } from '@/lib/schema/watch-view';
import { heatCapacityFlow, pressureAtAltitude } from '@/lib/physics/air';
import type { House } from '@/lib/schema/yard-view';
import { listAlarms } from './alarm';
import { readLeader } from './leader';
import { nightSoFar } from './night';
import { loadHouse } from './plan';
import { readMemory } from './running';
import { readAlone } from './watch-alone';
import { readBands } from './watch-bands';
import { readLines, readStrips, whileRunning } from './watch-lines';

/** A heart that has not beaten for this long, ms of real time, has stopped; it beats every few seconds. */
const HEART_STOPPED_MS = 12_000;
const MOST_ALARMS = 50;
const INSIDE = ['house-air', 'bench'];
/** Where the intake is not read: 10 K more or less change a watt per kelvin by 3 in 100. */
const USUAL_INTAKE_C = 8;

/**
 * All of Watch at once.
 * @param clock app time (epoch ms) and its rate; `realAt` is real time, which heartbeats are kept in
 * @returns null where the house was taken out of use meanwhile
 */
export async function readWatch(
  holding: Holding,
  house: House,
  clock: { now: number; rate: number; realAt: number },
): Promise<WatchView | null> {
  const { now, rate } = clock;
  const record = await loadHouse(holding, house.id);
  if (record === null) return null;
  const night = nightOf(now, house.zone);
  const state = (await readMemory(holding, house.id))?.state ?? null;
  const strips = await readStrips(holding, record, night, now);
  const loops = await readLoops(holding, record.config, state);
  const labels = new Map(record.channels.map((channel) => [channel.id, channel.label]));
  const { id, slug, name, zone, frostLimit, frostAlarm } = house;
  return {
    house: { id, slug, name, zone, frostLimit, frostAlarm },
    ...{ now, rate, night, state, strips, loops },
    control: await controlOf(holding, clock.realAt),
    ...partsOf(record.config),
    bands: await readBands(holding, house, night, labels),
    lines: whileRunning(await readLines(holding, record, night, now, state), loops, strips),
    alarms: (await listAlarms(holding, { state: 'active', houseId: house.id, limit: MOST_ALARMS })).map(
      ({ id: alarmId, kind, about, data, raisedAt, acknowledgedAt, acknowledgedBy }) => ({
        ...{ id: alarmId, kind, about, data, raisedAt, acknowledgedAt, acknowledgedBy },
      }),
    ),
    nights: await nightSoFar(holding, house.id, now),
    alone: await readAlone(holding, record, night.from, Math.min(now, night.to)),
    others: await readCards(holding, house.id),
  };
}

function partsOf(config: HouseConfig): Pick<WatchView, 'points' | 'channels' | 'sources'> {
  return {
    points: config.points.map(({ key, name, role, unit }) => ({ key, name, role, unit })),
    channels: config.channels.map((one) => ({
      ...{ number: one.number, key: one.key, label: one.label, loadKind: one.loadKind, watts: one.loadW },
      ...{ contact: one.contact, source: one.source, frostHelp: one.frostHelp, minOnS: one.minOnS },
    })),
    sources: config.sources.map((one) => ({
      ...{ slug: one.slug, name: one.name, kind: one.kind, coreFloor: one.coreFloor },
      ...{ core: one.corePoint, base: one.basePoint },
    })),
  };
}

/** Loops with the heat that a degree between their ends is worth, so that the browser need not know any physics. */
async function readLoops(
  holding: Holding,
  config: HouseConfig,
  state: HouseState | null,
): Promise<WatchView['loops']> {
  const flows = await holding.db
    .select({ key: channel.key, flow: channel.flow })
    .from(channel)
    .where(
      and(eq(channel.holdingId, holding.id), eq(channel.houseId, config.house.id), isNull(channel.removedAt)),
    );
  const pressure = pressureAtAltitude(config.house.altitude);
  return config.loops.map((loop) => {
    const flow = flows.find((one) => one.key === loop.channel)?.flow ?? null;
    const intake = state?.points.find((point) => point.key === loop.intake)?.value ?? USUAL_INTAKE_C;
    const { source, channel: key, intake: from, return: back } = loop;
    return {
      ...{ source, channel: key, intake: from, return: back },
      wattPerK: flow === null ? null : heatCapacityFlow(flow.litresPerSecond / 1000, intake, pressure),
    };
  });
}

async function controlOf(holding: Holding, realAt: number): Promise<WatchView['control']> {
  const leader = await readLeader(holding.db);
  if (leader === null) return { runs: false, silentS: null };
  const silentMs = Math.max(0, realAt - leader.heartbeat);
  return {
    runs: leader.holder !== null && silentMs < HEART_STOPPED_MS,
    silentS: Math.round(silentMs / 1000),
  };
}

/** The houses of the holding in one line each, all or all but one. */
export async function readCards(holding: Holding, butHouseId: string | null): Promise<WatchCard[]> {
  const rows = await holding.db
    .select({ house: houseTable, state: controlMemory.state, stateAt: controlMemory.stateAt })
    .from(houseTable)
    .leftJoin(
      controlMemory,
      and(eq(controlMemory.holdingId, houseTable.holdingId), eq(controlMemory.houseId, houseTable.id)),
    )
    .where(
      and(
        eq(houseTable.holdingId, holding.id),
        isNull(houseTable.removedAt),
        butHouseId === null ? undefined : ne(houseTable.id, butHouseId),
      ),
    )
    .orderBy(asc(houseTable.id));
  const alarms = await holding.db
    .select({ houseId: alarm.houseId, many: count() })
    .from(alarm)
    .where(and(eq(alarm.holdingId, holding.id), isNull(alarm.clearedAt)))
    .groupBy(alarm.houseId);
  return rows.map(({ house, state, stateAt }) => {
    // written by the worker in this very shape, and by nobody else
    const stood = state as HouseState | null;
    const inside = (stood?.points ?? []).filter(
      (point) => INSIDE.includes(point.role) && point.quality !== 'bad' && point.value !== null,
    );
    const { slug, name, zone, frostLimit } = house;
    return {
      ...{ slug, name, zone, frostLimit },
      coldest: inside.length === 0 ? null : Math.min(...inside.map((point) => point.value ?? Infinity)),
      alarms: alarms.find((row) => row.houseId === house.id)?.many ?? 0,
      running: (stood?.channels ?? []).filter((one) => one.state === 'on').map((one) => one.label),
      at: stateAt?.getTime() ?? null,
      isLaidUp: house.laidUpAt !== null,
    };
  });
}
