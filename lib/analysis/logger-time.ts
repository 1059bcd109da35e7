/**
 * Times as loggers write them. A time without an offset is read in a zone, and there two kinds of it are doubtful: one that
 * comes twice when the clock goes back, and one that the clock skips in spring. Neither is decided in silence.
 */
import { fixedOffset } from './logger-clock';

export const DATE_ORDERS = ['ymd', 'dmy', 'mdy', 'seconds', 'milliseconds', 'serial'] as const;
export type DateOrder = (typeof DATE_ORDERS)[number];
/** How a time that comes twice is read: by the order of the lines, always the one, or not at all. */
export const TWICE = ['by-order', 'first', 'second', 'leave-out'] as const;
export type Twice = (typeof TWICE)[number];
/** A skipped time is read with the offset before the gap (RFC 5545), or not at all. */
export const SKIPPED = ['before-gap', 'leave-out'] as const;
export type Skipped = (typeof SKIPPED)[number];

export interface TimeLayout {
  order: DateOrder;
  /** IANA name, or the fixed offset of a clock that no summer moves: `UTC-07:00`. */
  zone: string;
  twice: Twice;
  skipped: Skipped;
}

/** What a clock on the wall showed, as if it were UTC, epoch ms; or the instant itself where the text told its offset. */
export type ReadTime = { wall: number } | { instant: number } | null;

const MONTHS = 'jan feb mar apr may jun jul aug sep oct nov dec'.split(' ');
const WEEKDAY = /(?:(?:mon|tue|wed|thu|fri|sat|sun)[a-z]{0,6}[.,]{0,2} +)?/;
const DATE = /(\d{1,4}|[a-z]{3,9})[-/. ]{1,2}(\d{1,2}|[a-z]{3,9})(?:[-/. ]{1,2}|, ?)(\d{1,4})/;
const CLOCK = /(\d{1,2})[:.](\d{2})(?:[:.](\d{2})(?:[.,](\d{1,9}))?)?/;
const HALF = /(?:\s*([ap])\.?\s*(?:m\.?)?)?/;
const OFFSET = /(?:\s*(z|utc|gmt|(?:utc|gmt)?[+-]\d{1,2}(?::?\d{2})?))?/;
const DATED = new RegExp(
  `^${WEEKDAY.source}${DATE.source}(?:[t, ]+${CLOCK.source}${HALF.source}${OFFSET.source})?$`,
  'i',
);
/** ISO 8601's basic form: no marks in the date, and in the time of day none or colons. */
const UNMARKED = /^((?:19|20)\d{2})(\d{2})(\d{2})(?:[t ]*(\d{2})(\d{2})(\d{2})?(?![\d:.]))?/i;

/** Days since 1899-12-30 as spreadsheets count them (from March 1900 on); the bounds are of 1954 and 2119. */
const FIRST_SERIAL = 20_000;
const LAST_SERIAL = 80_000;
const SERIAL_OF_1970 = 25_569;

/** @example readTime('26.11.2026 02:30', 'dmy') */
export function readTime(text: string, order: DateOrder): ReadTime {
  const said = text.trim();
  if (order === 'serial') return ofSerial(said);
  if (order === 'seconds' || order === 'milliseconds') {
    if (!/^\d{1,13}(\.\d{1,9})?$/.test(said)) return null;
    return { instant: Math.round(Number(said) * (order === 'seconds' ? 1000 : 1)) };
  }
  const found = DATED.exec(said) ?? (order === 'ymd' ? DATED.exec(marked(said)) : null);
  if (found === null) return null;
  const [, first = '', middle = '', last = '', hour, minute, second, part, half, offset] = found;
  const [year, month, day] =
    order === 'ymd' ? [first, middle, last] : order === 'dmy' ? [last, middle, first] : [last, first, middle];
  // nobody writes 26-Nov-05 for the 5th
  if (order === 'ymd' && year.length < 4 && !/^\d/.test(month)) return null;
  const wall = wallOf(
    yearOf(year),
    monthOf(month),
    Number(day),
    hourOf(Number(hour ?? 0), half?.toLowerCase()),
    Number(minute ?? 0),
    Number(second ?? 0) * 1000 + Number((part ?? '').padEnd(3, '0').slice(0, 3)),
  );
  if (wall === null) return null;
  return offset === undefined ? { wall } : { instant: wall - (fixedOffset(offset) ?? 0) * 60_000 };
}

/** A spreadsheet keeps five to ten places of a day: whole seconds are what they can tell. */
function ofSerial(said: string): ReadTime {
  if (!/^\d{5}([.,]\d{1,15})?$/.test(said)) return null;
  const days = Number(said.replace(',', '.'));
  if (days < FIRST_SERIAL || days > LAST_SERIAL) return null;
  return { wall: Math.round((days - SERIAL_OF_1970) * 86_400) * 1000 };
}

function marked(said: string): string {
  return said.replace(UNMARKED, (_, year: string, month: string, day: string, ...rest: unknown[]) => {
    const clock = rest.slice(0, 3).filter((part) => typeof part === 'string');
    return `${year}-${month}-${day}${clock.length === 0 ? '' : ` ${clock.join(':')}`}`;
  });
}

function yearOf(text: string): number {
  return text.length === 4 ? Number(text) : text.length === 2 ? 2000 + Number(text) : Number.NaN;
}

function monthOf(text: string): number {
  return /^\d/.test(text) ? Number(text) : MONTHS.indexOf(text.slice(0, 3).toLowerCase()) + 1;
}

function hourOf(hour: number, half: string | undefined): number {
  if (half === undefined) return hour;
  return hour < 1 || hour > 12 ? Number.NaN : (hour % 12) + (half === 'p' ? 12 : 0);
}

function wallOf(year: number, month: number, day: number, hour: number, minute: number, ms: number) {
  if (!(month >= 1 && month <= 12 && day >= 1 && day <= 31 && minute <= 59 && ms < 60_000)) return null;
  // midnight at a day's end is written 24:00 by some
  if (!(hour <= 23 || (hour === 24 && minute === 0 && ms === 0))) return null;
  const length = [31, isLeap(year) ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][month - 1] ?? 0;
  const date = Date.UTC(year, month - 1, day);
  if (Number.isNaN(date) || day > length) return null;
  return date + hour * 3_600_000 + minute * 60_000 + ms;
}

const isLeap = (year: number) => (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
