import 'server-only';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import * as imports from '@/db/queries/import';
import { listPoints } from '@/db/queries/point';
import { Refusal } from '@/db/queries/refusal';
import { isNumeric, matchColumns } from '@/lib/analysis/logger-columns';
import { encodingOf, guessLayout } from '@/lib/analysis/logger-guess';
import { LoggerReader } from '@/lib/analysis/logger-reader';
import type { Import, ImportCreate, ImportLayout, ImportPreview, ImportState } from '@/lib/schema/import';
import type { House, Point } from '@/lib/schema/yard-view';
import { fileUnitsOf } from '@/lib/units/file-units';
import { Problem } from './errors';
import { decoderOf, dropAll, firstBytes, importFile, writePiece } from './import-file';
import { isoIn } from './wire';

const DAY_MS = 86_400_000;
const MOST_UNFINISHED = 4;
const PREVIEW_BYTES = 256 * 1024;
const SHOWN = 8;

interface Act {
  by: string;
  now: Date;
}

export async function beginImport(
  holding: Holding,
  house: House,
  given: z.output<typeof ImportCreate>,
  act: Act,
): Promise<Import> {
  for (const id of await imports.forgetUnfinished(holding, new Date(act.now.getTime() - DAY_MS)))
    await dropAll(id);
  if ((await imports.countUnfinished(holding)) >= MOST_UNFINISHED)
    throw new Problem('conflict', {
      detail: 'Four files are under way already; finish or drop one of them.',
    });
  return imports.createImport(holding, house.id, { ...given, ...act });
}

/** A piece that was written before is written again at its place, so that sending it twice does no harm. */
export async function takePiece(
  holding: Holding,
  house: House,
  one: Import,
  from: number,
  bytes: Uint8Array,
): Promise<Import | null> {
  refuseUnless(one, ['receiving'], 'The file is here already.');
  if (bytes.length === 0 || from + bytes.length > one.bytes)
    throw new Refusal('from', `This piece lies outside the ${one.bytes} bytes that were announced.`);
  // what was written before may be sent again; a piece further on would leave a hole
  const received = from > one.received ? null : await writePiece(importFile(one.id), from, bytes);
  if (received === null) throw new Refusal('from', `The piece that begins at ${one.received} comes next.`);
  await imports.noteReceived(holding, one.id, received);
  return imports.findImport(holding, house.id, one.id);
}

function refuseUnless(one: Import, states: readonly ImportState[], detail: string): void {
  if (!states.includes(one.state)) throw new Problem('conflict', { detail });
}

const measured = (points: readonly Point[]) => points.filter((point) => point.derived === null);

/** The first lines as they are understood, or as `given` would have them. */
export async function previewImport(
  holding: Holding,
  house: House,
  one: Import,
  given: ImportPreview['layout'] | undefined,
  now: Date,
): Promise<ImportPreview> {
  refuseUnless(one, ['received', 'checked'], 'The file is not here whole, or is being read.');
  const bytes = await firstBytes(one.id, PREVIEW_BYTES);
  const encoding = given?.encoding ?? encodingOf(bytes);
  // a line end at the close, so that a file of few lines has a last one too
  const text =
    decoderOf(encoding).decode(bytes, { stream: true }) + (bytes.length < PREVIEW_BYTES ? '\n' : '');
  const guess = guessLayout(text, encoding, house.zone, given);
  if (guess === null)
    throw new Refusal(
      null,
      'No line of this file’s beginning starts with a date or time, so it cannot be read. Save it as CSV with a column for the time.',
    );
  const points = measured(await listPoints(holding, house.id));
  const columns = guess.columns.filter((column) => column.isTime || isNumeric(column, guess.layout.decimal));
  const layout = { ...guess.layout, columns: given?.columns ?? matchColumns(columns, points) };
  // what is looked at is the times, so while no column is put to a point any column of numbers will do
  const numbers = columns.find((column) => !column.isTime);
  const first = layout.columns[0] ?? {
    ...{ column: numbers?.column ?? 0, point: numbers?.head ?? '', unit: 'Cel' as const },
    ...(numbers === undefined || numbers.sensor === null ? {} : { sensor: numbers.sensor }),
  };
  const target = { key: first.point, number: 0, unit: '', min: null, max: null };
  // any number of a point will do: what is looked at is the times
  const reader = new LoggerReader(
    { ...layout, columns: [first] },
    new Map([[first.point, target]]),
    now.getTime(),
  );
  reader.push(text);
  reader.settle();
  const times = [...new Set(reader.readings.map((reading) => reading.at))].slice(0, SHOWN);
  return {
    ...{ layout, columns, heads: guess.heads, doubts: guess.doubts },
    times: times.map((at) => isoIn(house.zone, at)),
    faults: reader.faults.slice(0, SHOWN),
  };
}

/** @throws Refusal at the path of what does not fit the house */
export async function checkLayout(holding: Holding, house: House, layout: ImportLayout): Promise<void> {
  const points = new Map(measured(await listPoints(holding, house.id)).map((point) => [point.key, point]));
  const taken = new Set<string>();
  layout.columns.forEach(({ point: key, unit, column, sensor }, at) => {
    const point = points.get(key);
    if (point === undefined)
      throw new Refusal(`columns.${at}.point`, `This house has no measured point ${JSON.stringify(key)}.`);
    if (taken.has(key)) throw new Refusal(`columns.${at}.point`, `Two columns go to ${key}; leave one out.`);
    if (!fileUnitsOf(point.unit).includes(unit))
      throw new Refusal(
        `columns.${at}.unit`,
        `${key} is kept in ${point.unit}; its column cannot be in ${unit}.`,
      );
    if (layout.timeColumns.includes(column))
      throw new Refusal(`columns.${at}.column`, 'This column holds the time.');
    if (column === layout.sensorColumn)
      throw new Refusal(`columns.${at}.column`, 'This column names the sensor.');
    if ((sensor === undefined) !== (layout.sensorColumn === undefined))
      throw new Refusal(
        `columns.${at}.sensor`,
        sensor === undefined
          ? 'A column of this file names the sensor; say whose lines go to this point.'
          : 'No column of this file names a sensor; leave it out.',
      );
    taken.add(key);
  });
}

/** Moves it on, or says what it must be first. */
export async function moveOn(
  holding: Holding,
  house: House,
  one: Import,
  move: { from: readonly ImportState[]; to: ImportState; layout?: ImportLayout; else: string },
): Promise<Import | null> {
  const isMoved = await imports.moveImport(holding, one.id, move.from, move.to, move.layout);
  if (!isMoved) throw new Problem('conflict', { detail: move.else });
  return imports.findImport(holding, house.id, one.id);
}

/** What has written nothing is dropped with its file; what has is taken back by the worker. */
export async function takeBack(holding: Holding, house: House, one: Import): Promise<Import | null> {
  if (['to-bring', 'done', 'failed'].includes(one.state))
    return moveOn(holding, house, one, {
      ...{ from: ['to-bring', 'done', 'failed'], to: 'to-undo' },
      else: 'It is being taken back already.',
    });
  refuseUnless(one, ['receiving', 'received', 'to-check', 'checked'], 'This import was taken back already.');
  await imports.removeImport(holding, one.id);
  await dropAll(one.id);
  return null;
}
