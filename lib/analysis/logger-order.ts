/** Which columns of a table hold the time, and in what order its parts stand: each is tried, and the lines decide. */
import type { Delimiter } from './logger-layout';
import { headOf, headRows, saysTime, saysTimeOfDay } from './logger-heads';
import { DATE_ORDERS, type DateOrder, readTime } from './logger-time';

export interface Table {
  delimiter: Delimiter;
  rows: string[][];
}

export interface Timed {
  table: Table;
  order: DateOrder;
  columns: number[];
  /** The row of the first reading. */
  first: number;
  /** Of the rows with a time in these columns, epoch ms; on the wall as if it were UTC. */
  times: number[];
  /** How many steps from line to line go one way, of the way that more go. */
  steady: number;
}

const DAY_MS = 86_400_000;
/** The time may stand behind others, such as a number of the line. */
const LOOKED_AT = 12;
/** Lines in which the column of the time is looked for. */
const SAMPLED = 1200;
const COUNTED: Partial<Record<DateOrder, RegExp>> = {
  // of 2001 and later: shorter ones are other figures
  seconds: /^\d{10}(\.\d+)?$/,
  milliseconds: /^\d{13}$/,
};

const timeOf = (text: string, order: DateOrder) => {
  const read = readTime(text, order);
  return read === null ? null : 'wall' in read ? read.wall : read.instant;
};

/** Where the times of one column begin, of the first lines. */
interface Place {
  column: number;
  first: number;
  many: number;
}

/**
 * The leftmost column with a time in at least half as many lines as the column with most of them, so that a date in the
 * logger's own story is not taken for the first reading's. Of days counted by a spreadsheet only one whose head says so:
 * lux are such figures too.
 */
function placeOf(table: Table, order: DateOrder): Place | null {
  const rows = table.rows.slice(0, SAMPLED);
  const isTime = (cell: string) =>
    (COUNTED[order]?.test(cell.trim()) ?? true) && timeOf(cell, order) !== null;
  const places = Array.from({ length: LOOKED_AT }, (_, column): Place => {
    const timed = [...rows.keys()].filter((row) => {
      const cells = rows[row] ?? [];
      return cells.length > 1 && isTime(cells[column] ?? '');
    });
    const widths = timed.map((row) => rows[row]?.length ?? 0).sort((a, b) => a - b);
    const usual = widths[Math.floor(widths.length / 2)] ?? 0;
    const first = timed.find((row) => (rows[row]?.length ?? 0) >= usual) ?? 0;
    const isSaid = () => saysTime(headOf(headRows(rows, first, usual + 1), column));
    return { column, first, many: order === 'serial' && !isSaid() ? 0 : timed.length };
  });
  const most = Math.max(...places.map(({ many }) => many));
  return most === 0 ? null : (places.find(({ many }) => many * 2 >= most) ?? null);
}

/**
 * Whether the column beside a date is the time of day. With colons it is; with points it may be values, so then every line
 * must be a time, and the head must say that it is one, or, where there is none, the lines must run on through the day.
 */
function isTimeOfDay(table: Table, first: number, date: number, order: DateOrder): boolean {
  const rows = table.rows.slice(first).filter((cells) => timeOf(cells[date] ?? '', order) !== null);
  const dates = rows.map((cells) => cells[date] ?? '');
  const clocks = rows.map((cells) => (cells[date + 1] ?? '').trim());
  const times = rows.map((_, row) => timeOf(`${dates[row] ?? ''} ${clocks[row] ?? ''}`, order));
  if (dates[0]?.includes(':') === true || times[0] === null) return false;
  if (/^\d{1,2}:\d{2}/.test(clocks[0] ?? '')) return true;
  if (!clocks.every((clock) => /^\d{1,2}\.\d{2}(\.\d{2})?$/.test(clock))) return false;
  const known = times.filter((time) => time !== null);
  if (known.length < rows.length) return false;
  const head = headOf(headRows(table.rows, first, table.rows[first]?.length ?? 0), date + 1);
  if (head !== '') return saysTimeOfDay(head);
  const steps = known.slice(1).map((time, row) => Math.sign(time - (known[row] ?? 0)));
  return steps.length > 1 && new Set(dates).size < rows.length && new Set(steps).size === 1 && steps[0] !== 0;
}

/** A time of day that stands before its date: with colons alone, since anything may stand there. */
function isDayBefore({ rows }: Table, { column, first }: Place, order: DateOrder): boolean {
  const [clock = '', date = ''] = [rows[first]?.[column - 1]?.trim(), rows[first]?.[column]];
  return /^\d{1,2}:\d{2}/.test(clock) && timeOf(`${date} ${clock}`, order) !== null;
}

function timeColumnsOf(table: Table, place: Place, order: DateOrder): number[] {
  const { column, first } = place;
  if (COUNTED[order] !== undefined || order === 'serial') return [column];
  if (isTimeOfDay(table, first, column, order)) return [column, column + 1];
  return isDayBefore(table, place, order) ? [column, column - 1] : [column];
}

function timed(table: Table, order: DateOrder): Timed | null {
  const place = placeOf(table, order);
  if (place === null) return null;
  const { first } = place;
  const columns = timeColumnsOf(table, place, order);
  const times = table.rows.slice(first).flatMap((cells) => {
    return timeOf(columns.map((column) => cells[column] ?? '').join(' '), order) ?? [];
  });
  // a step of over a month between two lines is a day taken for a month
  const steps = times.slice(1).map((time, row) => time - (times[row] ?? 0));
  const forward = steps.filter((step) => step >= 0 && step < 28 * DAY_MS).length;
  const back = steps.filter((step) => step <= 0 && step > -28 * DAY_MS).length;
  return { table, order, columns, first, times, steady: Math.max(forward, back) };
}

/** What is taken only where nothing else fits as well: a year of two digits in front, and days counted from 1900. */
function isUnlikely({ table, order, first, columns }: Timed): boolean {
  const date = (table.rows[first]?.[columns[0] ?? 0] ?? '').trim();
  return order === 'serial' || (order === 'ymd' && !/^\d{4}/.test(date));
}

const widthOf = ({ table, first }: Timed) => table.rows[first]?.length ?? 0;

/** The likeliest reading first. */
export function timedTables(tables: readonly Table[]): Timed[] {
  return tables
    .flatMap((table) => DATE_ORDERS.flatMap((order) => timed(table, order) ?? []))
    .sort(
      (a, b) =>
        b.times.length - a.times.length ||
        b.steady - a.steady ||
        widthOf(b) - widthOf(a) ||
        Number(isUnlikely(a)) - Number(isUnlikely(b)),
    );
}

const FIRST_PART: Partial<Record<DateOrder, string>> = { dmy: 'the day', mdy: 'the month', ymd: 'the year' };

/** What a person must look at, in words. @param found as `timedTables` gives them; @param isLong several lines may have one time */
export function timeDoubts(found: readonly Timed[], isLong: boolean): string[] {
  const [best] = found;
  if (best === undefined) return [];
  const { table, columns, first, times, steady } = best;
  const doubts: string[] = [];
  const orders = found
    .filter(
      (one) =>
        one === best ||
        (one.table === table &&
          one.times.length === times.length &&
          one.steady === steady &&
          one.times.some((time, row) => time !== times[row])),
    )
    .flatMap(({ order }) => FIRST_PART[order] ?? []);
  if (orders.length > 1)
    doubts.push(
      `The dates can be read with ${orders.slice(0, -1).join(', ')} or ${orders.at(-1) ?? ''} first; look at the times below.`,
    );
  const [date = 0, ofDay] = columns;
  const clock = table.rows[first]?.[ofDay ?? date] ?? '';
  if (ofDay !== undefined && !clock.includes(':') && headRows(table.rows, first, widthOf(best)).length === 0)
    doubts.push(
      `Column ${ofDay + 1} is taken for the time of day, ${clock.trim()} as ${clock.trim().replaceAll('.', ':')}; if it holds values, choose column ${date + 1} alone for the time.`,
    );
  const isDates = times.every((time) => time % DAY_MS === 0);
  if (!isLong && isDates && new Set(times).size < times.length)
    doubts.push(
      'Several lines tell the same day and no time of day, so one reading a day would come in; choose the column with the time of day.',
    );
  return doubts;
}
