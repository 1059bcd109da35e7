/**
 * Clock times of a place as instants, across changes of its clock. Local dates are day numbers: whole days of the
 * wall clock since 1970-01-01, so that tomorrow is one more and never "now + 86 400 s".
 */
import { IANAZone } from 'luxon';
import { sunOfDay, type SunDay } from './sun';

const DAY = 86_400_000;
const QUARTER = 900_000;
const MINUTE = 60_000;

export interface Place {
  zone: IANAZone;
  latitude: number;
  longitude: number;
  /** Sun by day number, kept: it is asked several times a day and costs some 50 µs. */
  sun: Map<number, SunDay>;
  /** Minutes from UTC by quarter of an hour, kept likewise: zones change on quarters. */
  offsets: Map<number, number>;
}

export function place(house: { zone: string; latitude: number; longitude: number }): Place {
  return {
    zone: IANAZone.create(house.zone),
    latitude: house.latitude,
    longitude: house.longitude,
    sun: new Map(),
    offsets: new Map(),
  };
}

function offsetAt({ zone, offsets }: Place, at: number): number {
  const quarter = Math.floor(at / QUARTER);
  let offset = offsets.get(quarter);
  if (offset === undefined) {
    if (offsets.size > 2000) offsets.clear();
    offset = zone.offset(quarter * QUARTER);
    offsets.set(quarter, offset);
  }
  return offset;
}

/** What the wall clock shows at an instant, as if it were UTC, ms. */
export const wallAt = (where: Place, at: number): number => at + offsetAt(where, at) * MINUTE;

export const dayNumber = (where: Place, at: number): number => Math.floor(wallAt(where, at) / DAY);

/** `MM-DD` of a day number. */
export const monthDay = (day: number): string => new Date(day * DAY).toISOString().slice(5, 10);

/**
 * The instant at which the wall clock of `day` shows `minutes` after midnight. A time that comes twice: the first
 * time. A time that is skipped: the first instant that reads at least it (RFC 5545 would read 02:30 as 03:30; here a
 * period that should have begun in the gap begins when the gap does).
 */
export function wallInstant(where: Place, day: number, minutes: number): number {
  const wall = day * DAY + minutes * MINUTE;
  // a zone changes at most once in two days, so the offsets a day before and after are all that can hold
  const before = wall - offsetAt(where, wall - DAY) * MINUTE;
  const after = wall - offsetAt(where, wall + DAY) * MINUTE;
  const readsRight = [before, after].filter((instant) => wallAt(where, instant) === wall);
  if (readsRight.length > 0) return Math.min(...readsRight);
  let low = Math.min(before, after) - DAY / 4;
  let high = Math.max(before, after) + DAY / 4;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (wallAt(where, middle) >= wall) high = middle;
    else low = middle;
  }
  return high;
}

export function sunOn(where: Place, day: number): SunDay {
  let sun = where.sun.get(day);
  if (sun === undefined) {
    if (where.sun.size > 400) where.sun.clear();
    sun = sunOfDay(wallInstant(where, day, 720), where.latitude, where.longitude);
    where.sun.set(day, sun);
  }
  return sun;
}

export type DayTimeOf = { kind: 'clock'; minutes: number } | { kind: 'sunrise' | 'sunset'; offsetMs: number };

/** `HH:MM`, `sunset-01:00`, `sunrise` … as validated by lib/schema. */
export function parseDayTime(text: string): DayTimeOf {
  if (!text.startsWith('sun')) return { kind: 'clock', minutes: minutesOf(text) };
  const kind = text.startsWith('sunrise') ? 'sunrise' : 'sunset';
  const rest = text.slice(kind.length);
  if (rest === '') return { kind, offsetMs: 0 };
  return { kind, offsetMs: (rest.startsWith('-') ? -1 : 1) * minutesOf(rest.slice(1)) * MINUTE };
}

const minutesOf = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3, 5));

/** The instant of a time of day on a local date; null where the sun does not do it that day. */
export function instantOf(where: Place, day: number, time: DayTimeOf): number | null {
  if (time.kind === 'clock') return wallInstant(where, day, time.minutes);
  const event = sunOn(where, day)[time.kind];
  return event === null ? null : event + time.offsetMs;
}
