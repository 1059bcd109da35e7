/** What the first lines of a logger's file say about it. All of it is shown and can be corrected; nothing is decided here. */
import { type FileUnitKey, fileUnitsOf, unitInHead } from '@/lib/units/file-units';
import { cellNumber, DELIMITERS, type Delimiter, type Encoding, type FileLayout } from './logger-layout';
import { LineReader } from './logger-lines';
import { DATE_ORDERS, type DateOrder, readTime } from './logger-time';

export interface GuessedColumn {
  column: number;
  head: string;
  /** Cells of the first lines. */
  sample: string[];
  unit: FileUnitKey | null;
  isTime: boolean;
}

export interface Guess {
  layout: FileLayout;
  columns: GuessedColumn[];
  /** What a person must look at, in words. */
  doubts: string[];
}

/** By the byte order mark, else by what the bytes can be. `bytes` are the file's first. */
export function encodingOf(bytes: Uint8Array): Encoding {
  const [first, second] = bytes;
  if (first === 0xff && second === 0xfe) return 'utf-16le';
  if (first === 0xfe && second === 0xff) return 'utf-16be';
  const zeros = [0, 0];
  bytes.forEach((byte, place) => {
    if (byte === 0) zeros[place % 2] = (zeros[place % 2] ?? 0) + 1;
  });
  const many = bytes.length / 8;
  if ((zeros[1] ?? 0) > many) return 'utf-16le';
  if ((zeros[0] ?? 0) > many) return 'utf-16be';
  try {
    // as a stream, since the first bytes may end within a letter
    new TextDecoder('utf-8', { fatal: true }).decode(bytes, { stream: true });
    return 'utf-8';
  } catch {
    return 'windows-1252';
  }
}

interface Table {
  delimiter: Delimiter;
  rows: string[][];
}

function tableOf(text: string, delimiter: Delimiter): Table {
  const reader = new LineReader(delimiter);
  // the last line may be cut off
  return { delimiter, rows: reader.push(text).map((line) => line.cells ?? []) };
}

/** A time in one column, or a date and a time of day in two that stand side by side. */
function timeIn(cells: readonly string[], order: DateOrder): number[] | null {
  for (let at = 0; at < Math.min(cells.length, 12); at += 1) {
    const cell = cells[at] ?? '';
    const isNumber = order === 'seconds' || order === 'milliseconds';
    if (isNumber && !(order === 'seconds' ? /^\d{9,10}(\.\d+)?$/ : /^\d{12,13}$/).test(cell.trim())) continue;
    if (readTime(cell, order) === null) continue;
    const next = cells[at + 1] ?? '';
    const isSplit = !isNumber && !cell.includes(':') && /^\s*\d{1,2}[:.]\d{2}/.test(next);
    return isSplit && readTime(`${cell} ${next}`, order) !== null ? [at, at + 1] : [at];
  }
  return null;
}

interface Timed {
  table: Table;
  order: DateOrder;
  columns: number[];
  first: number;
  /** Rows with a time in these columns. */
  rows: number;
  /** Of them, how many do not go back in time. */
  forward: number;
}

function timed(table: Table, order: DateOrder): Timed | null {
  const first = table.rows.findIndex((cells) => cells.length > 1 && timeIn(cells, order) !== null);
  const columns = timeIn(table.rows[first] ?? [], order);
  if (columns === null) return null;
  let rows = 0;
  let forward = 0;
  let last = Number.NEGATIVE_INFINITY;
  for (const cells of table.rows.slice(first)) {
    const read = readTime(columns.map((column) => cells[column] ?? '').join(' '), order);
    if (read === null) continue;
    const at = 'wall' in read ? read.wall : read.instant;
    rows += 1;
    // a step of over a month between two lines is a day taken for a month
    if (at >= last && at - last < 28 * 86_400_000) forward += 1;
    last = at;
  }
  return { table, order, columns, first, rows, forward };
}

/**
 * @param text the file's beginning, decoded
 * @param zone of the house, in which times without an offset are read unless somebody says otherwise
 * @param given what a person chose instead; then only heads and samples are looked for
 * @returns null where no line begins with a time
 */
export function guessLayout(
  text: string,
  encoding: Encoding,
  zone: string,
  given?: FileLayout,
): Guess | null {
  if (given !== undefined) {
    const { rows } = tableOf(text, given.delimiter);
    const data = rows.slice(given.headLines).filter((cells) => cells.length > 1);
    const columns = columnsOf(rows, given.headLines, data, given.timeColumns);
    return { layout: given, columns, doubts: [] };
  }
  const found = DELIMITERS.flatMap((delimiter) => {
    const table = tableOf(text, delimiter);
    return DATE_ORDERS.flatMap((order) => timed(table, order) ?? []);
  }).sort((a, b) => b.rows - a.rows || b.forward - a.forward || widthOf(b) - widthOf(a));
  const [best] = found;
  if (best === undefined) return null;
  const { table, order, columns: timeColumns, first } = best;
  const data = table.rows.slice(first).filter((cells) => cells.length > 1);
  const values = data.flatMap((cells) => cells.filter((_, column) => !timeColumns.includes(column)));
  const commas = values.filter((cell) => /^\s*[-−]?\d+,\d+\s*$/.test(cell)).length;
  const points = values.filter((cell) => /^\s*[-−]?\d+\.\d+\s*$/.test(cell)).length;
  const decimal = table.delimiter !== ',' && commas > points ? ',' : '.';
  const rival = found.find(
    (one) =>
      one.table === table && one.order !== order && one.rows === best.rows && one.forward === best.forward,
  );
  return {
    layout: {
      ...{ encoding, delimiter: table.delimiter, decimal, headLines: first, timeColumns },
      time: { order, zone, twice: 'by-order', skipped: 'before-gap' },
      columns: [],
    },
    columns: columnsOf(table.rows, first, data, timeColumns),
    doubts:
      rival === undefined
        ? []
        : ['The dates can be read with the day first or the month first; look at the times below.'],
  };
}

const widthOf = ({ table, first }: Timed) => table.rows[first]?.length ?? 0;

function columnsOf(
  rows: readonly string[][],
  first: number,
  data: readonly string[][],
  timeColumns: readonly number[],
): GuessedColumn[] {
  const width = Math.max(0, ...data.slice(0, 50).map((cells) => cells.length));
  // names, and often a line of units under them; what stands above is the logger's own story
  const heads = rows.slice(Math.max(0, first - 3), first).filter((cells) => cells.length >= width - 1);
  return Array.from({ length: width }, (_, column) => {
    const head = heads
      .map((cells) => (cells[column] ?? '').trim())
      .filter((text) => text !== '')
      .join(' ');
    const unit =
      unitInHead(head) ?? heads.map((cells) => unitInHead(`(${(cells[column] ?? '').trim()})`)).find(Boolean);
    return {
      ...{ column, head: head.replace(/^\uFEFF/, '').slice(0, 120) },
      sample: data.slice(0, 8).map((cells) => (cells[column] ?? '').slice(0, 60)),
      unit: unit ?? null,
      isTime: timeColumns.includes(column),
    };
  });
}

/**
 * Columns put to points where that is plain: the head is the point's key or name, with or without its unit, and the unit is
 * named and fits. Everything else is left out until somebody chooses.
 */
export function matchColumns(
  columns: readonly GuessedColumn[],
  points: readonly { key: string; name: string; unit: string }[],
): FileLayout['columns'] {
  const plain = (text: string) =>
    text
      .toLowerCase()
      .replace(/[([{].*$/, '')
      .replace(/[^\p{L}\p{N}]/gu, '');
  const taken = new Set<string>();
  return columns.flatMap(({ column, head, unit, isTime }) => {
    if (isTime) return [];
    // the last word is often the unit, from a line of its own
    const named = [head, head.replace(/\s\S+$/, '')].map(plain).filter((text) => text !== '');
    const point = points.find(
      (one) => !taken.has(one.key) && [one.key, one.name].some((text) => named.includes(plain(text))),
    );
    if (point === undefined || unit === null || !fileUnitsOf(point.unit).includes(unit)) return [];
    taken.add(point.key);
    return [{ column, point: point.key, unit }];
  });
}

/** How many cells of a column are numbers, of those that say anything: tells text columns apart. */
export function isNumeric(column: GuessedColumn, decimal: '.' | ','): boolean {
  const read = column.sample.map((cell) => cellNumber(cell, decimal)).filter((value) => value !== null);
  return read.length === 0 || read.some((value) => !Number.isNaN(value));
}
