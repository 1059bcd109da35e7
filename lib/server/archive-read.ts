/** An archive from its first row to its last, in the order in which it is put in: the same for looking and for bringing. */
import 'server-only';
import type { ReadingRow } from '@/db/queries/reading-write';
import { ArchiveRows, readPerson, RowFault, type ArchiveRow } from '@/db/queries/archive-rows';
import { ARCHIVE_TABLES, type ArchiveTable } from '@/db/queries/archive-tables';
import { monthAfter } from '@/db/queries/archive-out';
import {
  type ArchiveFound,
  type ManifestFile,
  PEOPLE,
  photographPath,
  QUALITIES,
  READINGS_HEAD,
  readingsPath,
  tablePath,
} from '@/lib/schema/archive';
import { ArchiveFault, monthsOf, type OpenArchive } from './archive-file';
import { eachLine, MADE_WRONG, wholeFile } from './archive-lines';
import { Problem } from './errors';
import { madeBefore } from './photograph';

export interface ArchiveSink {
  rows: (one: ArchiveTable, rows: readonly ArchiveRow[]) => Promise<void>;
  photograph: (
    one: ArchiveTable,
    row: ArchiveRow,
    made: Awaited<ReturnType<typeof madeBefore>>,
  ) => Promise<void>;
  readings: (rows: readonly ReadingRow[]) => Promise<void>;
  monthEnds: (month: string) => Promise<void>;
  /** Readings later than this would be taken for news by whoever drives the house later; epoch ms. */
  newest: number;
  /** Told how far it is, of how many bytes; throws where it is not wanted any more. */
  step: (done: number, of: number) => Promise<void>;
  /** Tables that are only there to be read are passed over. */
  skips: (one: ArchiveTable) => boolean;
}

const ROWS_A_PART = 500;
/** Numbers of points keep their order only where all go in at once. */
const MOST_POINTS = 20_000;
const MOST_PEOPLE = 10_000;

/** @throws ArchiveFault */
export async function readArchive(
  open: OpenArchive,
  isOlder: boolean,
  sink: ArchiveSink,
): Promise<ArchiveFound> {
  const { manifest } = open;
  const files = new Map(manifest.files.map((file) => [file.path, file]));
  const of = manifest.files.reduce((sum, file) => sum + file.bytes, 0);
  let done = 0;
  const step = async (bytes: number) => sink.step((done += bytes), of);
  const rows = new ArchiveRows(isOlder);
  const found: ArchiveFound = {
    ...{ holding: manifest.holding.name, madeAt: manifest.madeAt, schema: manifest.schema },
    ...{ houses: [], rows: {}, readings: 0, months: null, photographs: 0, people: [] },
  };
  const people = files.get(PEOPLE);
  if (people !== undefined) await readPeople(open, people, found, step);
  const pictures = new Set(
    manifest.files.flatMap(({ path }) => (path.startsWith('photographs/') ? [path] : [])),
  );
  for (const one of ARCHIVE_TABLES) {
    const file = files.get(tablePath(one.name));
    if (file === undefined || sink.skips(one)) continue;
    const takeRows = async (taken: readonly ArchiveRow[]) => {
      found.rows[one.name] = (found.rows[one.name] ?? 0) + taken.length;
      if (one.name === 'house') found.houses.push(...namesInUse(taken));
      if (one.name !== 'attachment') return sink.rows(one, taken);
      for (const row of taken) {
        const path = photographPath(String(row['id']));
        pictures.delete(path);
        await sink.photograph(one, row, await pictureOf(open, path, files.get(path)));
        await step(files.get(path)?.bytes ?? 0);
      }
    };
    await readTable(open, one, file, rows, takeRows, step);
  }
  for (const path of pictures)
    throw new ArchiveFault(`${path} belongs to no row of ${tablePath('attachment')}.`);
  found.photographs = found.rows['attachment'] ?? 0;
  const months = monthsOf(manifest);
  for (const month of months) {
    const file = files.get(readingsPath(month));
    if (file === undefined) continue;
    await readReadings(open, month, file, rows.points, sink, step);
    await sink.monthEnds(month);
    found.readings += file.rows ?? 0;
  }
  const [from, to] = [months[0], months.at(-1)];
  if (from !== undefined && to !== undefined) found.months = { from, to };
  return found;
}

const namesInUse = (rows: readonly ArchiveRow[]) =>
  rows.flatMap((row) => (row['removed_at'] === null ? [String(row['name'])] : []));

async function readPeople(
  open: OpenArchive,
  file: ManifestFile,
  found: ArchiveFound,
  step: (bytes: number) => Promise<void>,
): Promise<void> {
  const take = async (lines: readonly string[], at: { line: number }) => {
    for (const line of lines) {
      if (found.people.length >= MOST_PEOPLE) throw new RowFault('So many people belong to no holding.');
      found.people.push(readPerson(line));
      at.line += 1;
    }
    return Promise.resolve();
  };
  await eachLine(open, file, take, step);
  sameCount(file, found.people.length);
}

async function readTable(
  open: OpenArchive,
  one: ArchiveTable,
  file: ManifestFile,
  reader: ArchiveRows,
  takeRows: (rows: readonly ArchiveRow[]) => Promise<void>,
  step: (bytes: number) => Promise<void>,
): Promise<void> {
  let rows: ArchiveRow[] = [];
  let shape = '';
  let count = 0;
  const most = one.name === 'point' ? MOST_POINTS : ROWS_A_PART;
  const give = async () => {
    const given = rows;
    rows = [];
    if (given.length > 0) await takeRows(given);
  };
  await eachLine(
    open,
    file,
    async (lines, at) => {
      for (const line of lines) {
        const row = reader.read(one.name, line);
        // rows of an earlier schema may lack a column that others have
        const columns = Object.keys(row).join();
        if (rows.length >= most || (rows.length > 0 && columns !== shape)) await give();
        shape = columns;
        rows.push(row);
        count += 1;
        at.line += 1;
      }
    },
    step,
  );
  try {
    await give();
  } catch (error) {
    if (error instanceof RowFault)
      throw new ArchiveFault(`${file.path}, line ${count}: ${error.message} ${MADE_WRONG}`);
    throw error;
  }
  sameCount(file, count);
}

const READING_TIME = /^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d(\.\d{1,3})?Z$/;
const QUALITY_NUMBERS = new Map<string, 0 | 1 | 2>([
  [QUALITIES[0], 0],
  [QUALITIES[1], 1],
  [QUALITIES[2], 2],
]);
const READINGS_A_PART = 10_000;

async function readReadings(
  open: OpenArchive,
  month: string,
  file: ManifestFile,
  points: ReadonlySet<number>,
  sink: ArchiveSink,
  step: (bytes: number) => Promise<void>,
): Promise<void> {
  const begin = Date.parse(`${month}-01T00:00:00Z`);
  const end = monthAfter(begin);
  let last = { point: -Infinity, at: 0 };
  let rows: ReadingRow[] = [];
  let count = -1;
  const give = async () => {
    const given = rows;
    rows = [];
    await sink.readings(given);
  };
  const one = (line: string): ReadingRow => {
    const cells = line.split(',');
    const [number = '', time = '', text = '', word = ''] = cells;
    const quality = QUALITY_NUMBERS.get(word);
    if (cells.length !== 4 || quality === undefined)
      throw new RowFault('A reading has four cells: point, at, value and good, uncertain or bad.');
    const [point, at, value] = [
      Number(number),
      READING_TIME.test(time) ? Date.parse(time) : NaN,
      Number(text),
    ];
    if (!points.has(point))
      throw new RowFault(`point ${shown(number)} is no number of ${tablePath('point')}.`);
    if (!(at >= begin && at < end)) throw new RowFault(`at must be a time in UTC within ${month}.`);
    if (at > sink.newest) throw new RowFault('at lies ahead of the clock of this installation.');
    if (text === '' || !Number.isFinite(value)) throw new RowFault(`value ${shown(text)} is no number.`);
    if (point < last.point || (point === last.point && at <= last.at))
      throw new RowFault('Readings must be in the order of point and time, each once.');
    last = { point, at };
    return { point, at, value, quality };
  };
  await eachLine(
    open,
    file,
    async (lines, at) => {
      for (const line of lines) {
        if (count < 0) {
          if (line !== READINGS_HEAD) throw new RowFault(`The head must be ${READINGS_HEAD}.`);
        } else rows.push(one(line));
        count += 1;
        at.line += 1;
        if (rows.length >= READINGS_A_PART) await give();
      }
    },
    step,
  );
  await give();
  sameCount(file, count);
}

const shown = (text: string) => JSON.stringify(text.slice(0, 40));

function sameCount(file: ManifestFile, count: number): void {
  if (file.rows === count) return;
  throw new ArchiveFault(
    `${file.path} has ${count} rows; the manifest says ${String(file.rows)}. ${MADE_WRONG}`,
  );
}

async function pictureOf(open: OpenArchive, path: string, file: ManifestFile | undefined) {
  if (file === undefined)
    throw new ArchiveFault(`${path} is missing, though ${tablePath('attachment')} tells of it.`);
  try {
    return await madeBefore(await wholeFile(open, file));
  } catch (error) {
    if (error instanceof Problem)
      throw new ArchiveFault(`${path}: ${error.more.errors?.[0]?.message ?? 'This is no picture.'}`);
    throw error;
  }
}
