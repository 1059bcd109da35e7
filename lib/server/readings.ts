import 'server-only';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { pointNumbers } from '@/db/queries/point';
import { readRawSeries, readSeries } from '@/db/queries/reading';
import { Refusal } from '@/db/queries/refusal';
import type { Readings, ReadingsQuery } from '@/lib/schema/running';
import type { House } from '@/lib/schema/yard-view';
import { isoIn } from './wire';

const DAY_MS = 86_400_000;
const MOST_POINTS = 20;
const STEP_S = { '1m': 60, '5m': 300, '1h': 3600 } as const;
/** Longest span of each step, so that one question cannot ask for a winter of raw readings. */
const LONGEST_DAYS = { raw: 7, '1m': 31, '5m': 400, '1h': 4000 } as const;
const QUALITIES = ['good', 'uncertain', 'bad'] as const;

/** @throws Refusal at `points`, `from` or `to` */
export async function readingsAnswer(
  holding: Holding,
  house: House,
  query: z.output<typeof ReadingsQuery>,
  now: Date,
): Promise<z.infer<typeof Readings>> {
  const to = query.to === undefined ? now.getTime() : Date.parse(query.to);
  const from = query.from === undefined ? to - DAY_MS : Date.parse(query.from);
  if (from >= to) throw new Refusal('from', 'The beginning must lie before the end.');
  const days = LONGEST_DAYS[query.step];
  if (to - from > days * DAY_MS)
    throw new Refusal('from', `At most ${days} days at this step; take a longer one.`);
  if (query.points.length > MOST_POINTS)
    throw new Refusal('points', `At most ${MOST_POINTS} points at a time.`);
  const known = await pointNumbers(holding, house.id);
  const asked = query.points.map((ref) => {
    const one = known.get(ref);
    if (one === undefined) throw new Refusal('points', `This house has no point ${JSON.stringify(ref)}.`);
    return one;
  });
  const numbers = asked.map((one) => one.number);
  const iso = (times: number[]) => times.map((at) => isoIn(house.zone, at));
  if (query.step === 'raw') {
    const series = await readRawSeries(holding, numbers, from, to);
    return {
      points: Object.fromEntries(
        asked.map(({ key, number }) => {
          const { at, value, quality } = series.get(number) ?? { at: [], value: [], quality: [] };
          return [key, { at: iso(at), value, quality: quality.map((one) => QUALITIES[one] ?? 'bad') }];
        }),
      ),
    };
  }
  const series = await readSeries(holding, numbers, from, to, STEP_S[query.step]);
  return {
    points: Object.fromEntries(
      asked.map(({ key, number }) => {
        const one = series.get(number) ?? { at: [], least: [], mean: [], greatest: [] };
        return [key, { ...one, at: iso(one.at) }];
      }),
    ),
  };
}
