import 'server-only';
import type { z } from 'zod';
import { inHolding, type Holding } from '@/db/client';
import { channelNumbers } from '@/db/queries/channel-numbers';
import { listPoints, pointNumbers } from '@/db/queries/point';
import { readRawSeries } from '@/db/queries/reading';
import { Refusal } from '@/db/queries/refusal';
import { listSwitchings, type Switching } from '@/db/queries/running';
import type { ReadingsExport, SwitchingsExport } from '@/lib/schema/export';
import type { House } from '@/lib/schema/yard-view';
import { csvLine, type CsvCell } from '@/lib/units/csv';
import { csvFile } from './csv-file';
import type { Answer } from './guard';
import { runParts } from './runs-file';
import { isoIn } from './wire';

const DAY_MS = 86_400_000;
/** Four points at a reading a second fill this in some 350 000 cells. */
const SLICE_MS = DAY_MS / 4;
const LONGEST_DAYS = 4000;
const MOST_POINTS = 50;
const ROWS_A_PAGE = 500;
const QUALITIES = ['good', 'uncertain', 'bad'] as const;

function spanOf(query: { from: string; to: string }): { from: number; to: number } {
  const [from, to] = [Date.parse(query.from), Date.parse(query.to)];
  if (from >= to) throw new Refusal('from', 'The beginning must lie before the end.');
  if (to - from > LONGEST_DAYS * DAY_MS)
    throw new Refusal('from', `At most ${LONGEST_DAYS} days in one file.`);
  return { from, to };
}

/**
 * A line a time, a column a point with its unit in the head and one with its quality; a cell is empty where the point has
 * no reading of that time. Values are told as control sees them: corrected by the calibration in force at their time.
 * @throws Refusal at `points` or `from`
 */
export async function readingsFile(
  holding: Holding,
  house: House,
  query: z.output<typeof ReadingsExport>,
): Promise<Answer> {
  const { from, to } = spanOf(query);
  const known = await pointNumbers(holding, house.id);
  const units = new Map((await listPoints(holding, house.id)).map((point) => [point.key, point.unit]));
  if (query.points.length > MOST_POINTS)
    throw new Refusal('points', `At most ${MOST_POINTS} points in one file.`);
  const points = [...new Set(query.points)].map((ref) => {
    const one = known.get(ref);
    if (one === undefined) throw new Refusal('points', `This house has no point ${JSON.stringify(ref)}.`);
    return { ...one, unit: units.get(one.key) ?? '' };
  });
  return csvFile(house, 'readings', readingParts(holding.id, house.zone, points, from, to));
}

async function* readingParts(
  holdingId: string,
  zone: string,
  points: readonly { key: string; number: number; unit: string }[],
  from: number,
  to: number,
): AsyncGenerator<string> {
  yield csvLine(['at', ...points.flatMap(({ key, unit }) => [`${key}_${unit}`, `${key}_quality`])]);
  const numbers = points.map((point) => point.number);
  for (let begin = from; begin < to; begin += SLICE_MS) {
    const end = Math.min(begin + SLICE_MS, to);
    const series = await inHolding(holdingId, (holding) =>
      readRawSeries(holding, numbers, begin, end, SLICE_MS),
    );
    const rows = new Map<number, CsvCell[]>();
    numbers.forEach((number, place) => {
      const { at, value, quality } = series.get(number) ?? { at: [], value: [], quality: [] };
      at.forEach((time, index) => {
        let row = rows.get(time);
        if (row === undefined) rows.set(time, (row = new Array<CsvCell>(points.length * 2).fill(null)));
        row[place * 2] = value[index] ?? null;
        row[place * 2 + 1] = QUALITIES[quality[index] ?? 2] ?? 'bad';
      });
    });
    const lines = [...rows].sort(([a], [b]) => a - b).map(([at, row]) => csvLine([isoIn(zone, at), ...row]));
    if (lines.length > 0) yield lines.join('');
  }
}

/** Newest first, as the list is. */
export async function switchingsFile(
  holding: Holding,
  house: House,
  query: z.output<typeof SwitchingsExport>,
): Promise<Answer> {
  const { from, to } = spanOf(query);
  const numbers = await channelNumbers(holding, house.id);
  return csvFile(house, 'switchings', switchingParts(holding.id, house, numbers, from, to));
}

async function* switchingParts(
  holdingId: string,
  house: House,
  numbers: ReadonlyMap<string, number>,
  from: number,
  to: number,
): AsyncGenerator<string> {
  yield csvLine(['at', 'channel', 'from', 'to', 'claim', 'command', 'rule_version']);
  let before: Switching | undefined;
  for (;;) {
    const rows = await inHolding(holdingId, (holding) =>
      listSwitchings(holding, house.id, {
        ...{ from, to, limit: ROWS_A_PAGE },
        ...(before === undefined ? {} : { before: { at: before.at, id: before.id } }),
      }),
    );
    before = rows.at(-1);
    if (before === undefined) return;
    yield rows
      .map((row) =>
        csvLine([
          isoIn(house.zone, row.at),
          numbers.get(row.channelId) ?? null,
          ...[row.from, row.to, row.claim, row.number, row.version],
        ]),
      )
      .join('');
    if (rows.length < ROWS_A_PAGE) return;
  }
}

/** Until `to`, but no further than now: nobody knows yet what a load will have done. */
export function runsFile(
  holding: Holding,
  house: House,
  query: z.output<typeof SwitchingsExport>,
  now: Date,
): Answer {
  const { from, to } = spanOf(query);
  return csvFile(house, 'runs', runParts(holding.id, house, from, Math.min(to, now.getTime())));
}
