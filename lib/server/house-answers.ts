import 'server-only';
import type { Holding } from '@/db/client';
import { recordsOf } from '@/db/queries/channel-records';
import { pointNumbers } from '@/db/queries/point';
import { readSeries } from '@/db/queries/reading';
import { liftOf } from '@/lib/analysis/lift';
import { responseOf } from '@/lib/analysis/response';
import { runsOf, type Stepped } from '@/lib/analysis/runs';
import { channelSpans } from '@/lib/analysis/spans';
import { compileTimeFacts, place } from '@/lib/control/calendar';
import type { HouseConfig } from '@/lib/control/types';
import type { Channel } from '@/lib/schema/yard-view';

/** What the house's own readings say of a channel and the point that a rule goes by. Null: not known yet. */
export interface HouseAnswers {
  liftK: number | null;
  response: { tauS: number; riseK: number } | null;
  /** °C; null until most of a year is kept, since what an autumn has seen is not what a winter brings. */
  coldestOutdoors: number | null;
}

type MeasuredChannel = Pick<Channel, 'id' | 'key' | 'node' | 'contact'>;

const DAY_MS = 86_400_000;
const NIGHTS_MS = 14 * DAY_MS;
/** Many a draw lasts a quarter of an hour: five-minute means would see little of it. */
const STEP_S = 60;
const YEAR_MS = 400 * DAY_MS;
const LEAST_OF_YEAR_MS = 300 * DAY_MS;

export const NOTHING: HouseAnswers = { liftK: null, response: null, coldestOutdoors: null };

/** A check is asked at every pause in typing, and two weeks of readings do not change meanwhile. */
const KEPT_MS = 15 * 60_000;
const MOST_KEPT = 200;
const kept = new Map<string, { at: number; answers: HouseAnswers }>();

export async function answersOf(
  holding: Holding,
  config: HouseConfig,
  channel: MeasuredChannel,
  pointKey: string,
  nowMs: number,
): Promise<HouseAnswers> {
  const name = [holding.id, channel.id, pointKey].join(' ');
  const known = kept.get(name);
  if (known !== undefined && Math.abs(nowMs - known.at) < KEPT_MS) return known.answers;
  const answers = await measure(holding, config, channel, pointKey, nowMs);
  if (kept.size >= MOST_KEPT) kept.clear();
  kept.set(name, { at: nowMs, answers });
  return answers;
}

async function measure(
  holding: Holding,
  config: HouseConfig,
  channel: MeasuredChannel,
  pointKey: string,
  nowMs: number,
): Promise<HouseAnswers> {
  const { house } = config;
  const outdoorsKey = config.points.find((one) => one.role === 'outdoors' && one.derived === null)?.key;
  const numbers = await pointNumbers(holding, house.id);
  const [point, outdoors] = [numbers.get(pointKey)?.number, numbers.get(outdoorsKey ?? '')?.number];
  if (point === undefined) return NOTHING;
  const from = nowMs - NIGHTS_MS;
  const safe = channel.contact === 'NC' ? 'on' : 'off';
  const recorded = { id: channel.id, key: channel.key, nodeKey: channel.node, safe } as const;
  const record = (await recordsOf(holding, house.id, [recorded], from, nowMs)).get(channel.id);
  if (record === undefined) return NOTHING;
  const runs = runsOf(channelSpans(record, from, nowMs));
  const wanted = outdoors === undefined ? [point] : [point, outdoors];
  const series = await readSeries(holding, wanted, from, nowMs, STEP_S);
  const steps = (number: number | undefined): Stepped => {
    const one = number === undefined ? undefined : series.get(number);
    return { stepMs: STEP_S * 1000, at: one?.at ?? [], mean: one?.mean ?? [] };
  };
  const facts = compileTimeFacts(place(house));
  const isDark = (at: number) => !facts(at).sunUp;
  return {
    liftK: liftOf(runs, steps(point), steps(outdoors), isDark),
    response: responseOf(runs, steps(point), isDark),
    coldestOutdoors: outdoors === undefined ? null : await coldestOf(holding, outdoors, nowMs),
  };
}

async function coldestOf(holding: Holding, outdoors: number, nowMs: number): Promise<number | null> {
  const year = (await readSeries(holding, [outdoors], nowMs - YEAR_MS, nowMs, 3600)).get(outdoors);
  const first = year?.at[0];
  if (year === undefined || first === undefined || nowMs - first < LEAST_OF_YEAR_MS) return null;
  return year.least.reduce((least, value) => Math.min(least, value), Infinity);
}
