/**
 * Times as loggers write them. A time without an offset is read in a zone, and there two kinds of it are doubtful: one that
 * comes twice when the clock goes back, and one that the clock skips in spring. Neither is decided in silence.
 */
import { IANAZone } from 'luxon';

export const DATE_ORDERS = ['ymd', 'dmy', 'mdy', 'seconds', 'milliseconds'] as const;
export type DateOrder = (typeof DATE_ORDERS)[number];
/** How a time that comes twice is read: by the order of the lines, always the one, or not at all. */
export const TWICE = ['by-order', 'first', 'second', 'leave-out'] as const;
export type Twice = (typeof TWICE)[number];
/** A skipped time is read with the offset before the gap (RFC 5545), or not at all. */
export const SKIPPED = ['before-gap', 'leave-out'] as const;
export type Skipped = (typeof SKIPPED)[number];

export interface TimeLayout {
  order: DateOrder;
  zone: string;
  twice: Twice;
  skipped: Skipped;
}

/** What a clock on the wall showed, as if it were UTC, epoch ms; or the instant itself where the text told its offset. */
export type ReadTime = { wall: number } | { instant: number } | null;

const MONTHS = 'jan feb mar apr may jun jul aug sep oct nov dec'.split(' ');
const DATED =
  /^(\d{1,4})[-/. ]{1,2}(\d{1,2}|[a-z]{3,9})[-/. ]{1,2}(\d{1,4})(?:[t, ]+(\d{1,2})[:.](\d{2})(?:[:.](\d{2})(?:[.,](\d{1,9}))?)?)?\s*([ap])?\.?(?:m\.?)?\s*(z|utc|gmt|[+-]\d{2}:?\d{2})?$/i;

/** @example readTime('26.11.2026 02:30', 'dmy') */
export function readTime(text: string, order: DateOrder): ReadTime {
  const said = text.trim();
  if (order === 'seconds' || order === 'milliseconds') {
    if (!/^\d{1,13}(\.\d{1,9})?$/.test(said)) return null;
    return { instant: Math.round(Number(said) * (order === 'seconds' ? 1000 : 1)) };
  }
  const found = DATED.exec(said);
  if (found === null) return null;
  const [, first = '', middle = '', last = '', hour, minute, second, part, half, offset] = found;
  const [year, month, day] =
    order === 'ymd' ? [first, middle, last] : order === 'dmy' ? [last, middle, first] : [last, first, middle];
  const wall = wallOf(
    yearOf(year),
    monthOf(month),
    Number(day),
    hourOf(Number(hour ?? 0), half?.toLowerCase()),
    Number(minute ?? 0),
    Number(second ?? 0) * 1000 + Number((part ?? '').padEnd(3, '0').slice(0, 3)),
  );
  if (wall === null) return null;
  return offset === undefined ? { wall } : { instant: wall - offsetMs(offset) };
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

function offsetMs(text: string): number {
  const found = /^([+-])(\d{2}):?(\d{2})$/.exec(text);
  if (found === null) return 0;
  return (found[1] === '-' ? -1 : 1) * (Number(found[2]) * 60 + Number(found[3])) * 60_000;
}

const QUARTER_MS = 900_000;
const DAY_MS = 86_400_000;

/** Times on the wall of one zone as instants. Offsets change at quarters of an hour only, so one look a quarter is enough. */
export class ZoneClock {
  private readonly zone: IANAZone;
  private readonly offsets = new Map<number, number[]>();
  private last = { quarter: Number.NaN, offsets: [0] };

  constructor(zone: string) {
    this.zone = IANAZone.create(zone);
  }

  /** Instants at which the wall shows this, the earlier first: one, two where it comes twice, none where it is skipped. */
  instantsOf(wall: number): number[] {
    return this.offsetsAt(wall).map((offset) => wall - offset);
  }

  /** A skipped time with the offset before the gap. */
  beforeGap(wall: number): number {
    return wall - this.zone.offset(wall - DAY_MS) * 60_000;
  }

  private offsetsAt(wall: number): number[] {
    const quarter = Math.floor(wall / QUARTER_MS);
    if (quarter === this.last.quarter) return this.last.offsets;
    let offsets = this.offsets.get(quarter);
    if (offsets === undefined) {
      const about = [wall - DAY_MS, wall + DAY_MS].map((at) => this.zone.offset(at) * 60_000);
      offsets = [...new Set(about)]
        .filter((offset) => this.zone.offset(wall - offset) * 60_000 === offset)
        .sort((a, b) => b - a);
      this.offsets.set(quarter, offsets);
    }
    this.last = { quarter, offsets };
    return offsets;
  }
}
