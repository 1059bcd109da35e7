/** One night opened whole: its lines and strips, every decision, what rang, and what was done to the heap. */
import { and, asc, eq, gt, gte, isNull, lt, or } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { heapEntry } from '@/db/schema/heap';
import { alarm } from '@/db/schema/watch';
import type { NightSummary } from '@/lib/analysis/nights';
import type { State } from '@/lib/control/types';
import type { WatchBand, WatchLine, WatchLoop, WatchStrip } from '@/lib/schema/watch-view';
import type { Alarm } from './alarm';
import { alarmNames, type AlarmNames } from './alarms-page';
import { loadHouse } from './plan';
import { listDecisions } from './decision';
import { readBands } from './watch-bands';
import { readLines, readStrips, whileRunning } from './watch-lines';

export interface OpenedDecision {
  channel: string;
  key: string;
  at: number;
  state: State;
  claim: string;
}

export interface OpenedNightData {
  summary: NightSummary;
  lines: WatchLine[];
  strips: WatchStrip[];
  bands: WatchBand[];
  /** Of the channels that draw on the source, ascending, led by what stood at the first noon. */
  decisions: OpenedDecision[];
  /** That stood in some part of the night, in the order in which they began. */
  alarms: Pick<Alarm, 'id' | 'kind' | 'about' | 'data' | 'raisedAt' | 'clearedAt'>[];
  entries: { id: string; at: number; kind: string; text: string; by: string }[];
  names: AlarmNames;
}

interface Where {
  id: string;
  zone: string;
  latitude: number;
  longitude: number;
}

/** @returns null where the house was taken out of use meanwhile */
export async function openNight(
  holding: Holding,
  house: Where,
  source: { id: string; slug: string },
  summary: NightSummary,
  nowMs: number,
): Promise<OpenedNightData | null> {
  const record = await loadHouse(holding, house.id);
  if (record === null) return null;
  const night = { night: summary.night, from: summary.from, to: summary.ends };
  const now = Math.min(nowMs, night.to);
  const strips = await readStrips(holding, record, night, now);
  const lines = await readLines(holding, record, night, now, null);
  const labels = new Map(record.channels.map(({ id, label }) => [id, label]));
  const keys = new Map(record.channels.map(({ id, key }) => [id, key]));
  const drawing = new Set(summary.channels.map((one) => one.number));
  const ids = record.channels.filter((one) => drawing.has(one.number)).map((one) => one.id);
  const decisions = await listDecisions(holding, ids, summary.from, summary.to);
  return {
    summary,
    lines: whileRunning(lines, loopsOf(record.config.loops), strips),
    strips,
    bands: await readBands(holding, house, night, labels),
    decisions: decisions.map(({ channelId, ...rest }) => ({
      ...rest,
      channel: labels.get(channelId) ?? '',
      key: keys.get(channelId) ?? '',
    })),
    alarms: await alarmsIn(holding, house.id, summary.from, summary.to),
    entries: await entriesIn(holding, source.id, summary.from, summary.to),
    names: await alarmNames(holding, house.id),
  };
}

type ConfigLoop = Pick<WatchLoop, 'source' | 'channel' | 'intake' | 'return'>;

function loopsOf(loops: readonly ConfigLoop[]) {
  return loops.map(({ source, channel, intake, return: back }) => ({
    ...{ source, channel, intake, return: back },
    wattPerK: null,
  }));
}

/** Alarms of the house, and of the whole holding, that stood in some part of [from, to), epoch ms; oldest first. */
export async function alarmsIn(holding: Holding, houseId: string, from: number, to: number) {
  const rows = await holding.db
    .select()
    .from(alarm)
    .where(
      and(
        eq(alarm.holdingId, holding.id),
        or(eq(alarm.houseId, houseId), isNull(alarm.houseId)),
        lt(alarm.raisedAt, new Date(to)),
        or(isNull(alarm.clearedAt), gt(alarm.clearedAt, new Date(from))),
      ),
    )
    .orderBy(asc(alarm.raisedAt), asc(alarm.id));
  return rows.map(({ id, kind, about, data, raisedAt, clearedAt }) => ({
    ...{ id, kind, about, data },
    raisedAt: raisedAt.getTime(),
    clearedAt: clearedAt?.getTime() ?? null,
  }));
}

/** Entries of a source's book in [from, to), epoch ms; oldest first. */
export async function entriesIn(holding: Holding, sourceId: string, from: number, to: number) {
  const rows = await holding.db
    .select({
      id: heapEntry.id,
      at: heapEntry.at,
      kind: heapEntry.kind,
      text: heapEntry.text,
      by: heapEntry.by,
    })
    .from(heapEntry)
    .where(
      and(
        eq(heapEntry.holdingId, holding.id),
        eq(heapEntry.sourceId, sourceId),
        gte(heapEntry.at, new Date(from)),
        lt(heapEntry.at, new Date(to)),
      ),
    )
    .orderBy(asc(heapEntry.at), asc(heapEntry.id));
  return rows.map((row) => ({ ...row, at: row.at.getTime() }));
}
