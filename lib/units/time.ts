/**
 * Durations, ages and clock times as they are read, in the house's zone. No clock: every instant is handed in. Watch
 * needs this in the browser, so it stands on Intl alone; luxon would be 23 kB of script for one page.
 */
import type { Preferences } from './preferences';

const space = '\u00a0';
// spelt out: "Sep" and "Sept" differ between browsers, and the server's page must equal the browser's
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/**
 * A span of time rounded to what matters: seconds under one minute, then whole minutes, then hours and minutes, from
 * two days on days. Where a setting must lose nothing, lib/wording has its own.
 * @example duration(2400) === '40 min', duration(3900) === '1 h 05 min', duration(45) === '45 s'
 */
export function duration(seconds: number): string {
  const whole = Math.max(0, Math.round(seconds));
  if (whole < 60) return `${whole}${space}s`;
  const minutes = Math.round(whole / 60);
  if (minutes < 60) return `${minutes}${space}min`;
  const hours = Math.floor(minutes / 60);
  if (hours >= 48) return `${Math.round(hours / 24)}${space}days`;
  const rest = minutes % 60;
  return rest === 0
    ? `${hours}${space}h`
    : `${hours}${space}h${space}${String(rest).padStart(2, '0')}${space}min`;
}

/** @example age(3000) === '3 s ago'; what is not past yet is "just now". */
export function age(milliseconds: number): string {
  return milliseconds < 1000 ? 'just now' : `${duration(milliseconds / 1000)} ago`;
}

const formats = new Map<string, Intl.DateTimeFormat>();

/** Year, month, day, hour and minute that a clock on the wall shows; making a format costs more than using it. */
function wall(at: number, zone: string): { year: number; month: number; day: number; time: string } {
  let format = formats.get(zone);
  if (format === undefined) {
    format = new Intl.DateTimeFormat('en-GB', {
      timeZone: zone,
      calendar: 'iso8601',
      year: 'numeric',
      month: 'numeric',
      day: 'numeric',
      hour: '2-digit',
      minute: '2-digit',
      hourCycle: 'h23',
    });
    formats.set(zone, format);
  }
  const parts = new Map(format.formatToParts(at).map((part) => [part.type, part.value]));
  const number = (type: Intl.DateTimeFormatPartTypes) => Number(parts.get(type) ?? 0);
  return {
    year: number('year'),
    month: number('month'),
    day: number('day'),
    time: `${(parts.get('hour') ?? '').padStart(2, '0')}:${(parts.get('minute') ?? '').padStart(2, '0')}`,
  };
}

/** @example clock(at, 'Europe/London', USUAL) === '02:14', '2:14 am' for a reader of twelve hours */
export function clock(at: number, zone: string, preferences: Preferences): string {
  return dayTime(wall(at, zone).time, preferences);
}

/** @example day(at, zone) === '26 Nov' */
export function day(at: number, zone: string): string {
  const there = wall(at, zone);
  return `${there.day} ${MONTHS[there.month - 1] ?? ''}`;
}

/**
 * A night by its evening's date. Its name says all of that: a format of Intl, only to take it apart, would cost a phone more
 * than a table of nights. @example nightLabel('2026-11-26') === '26 Nov'
 */
export function nightLabel(night: string): string {
  return `${Number(night.slice(8, 10))} ${MONTHS[Number(night.slice(5, 7)) - 1] ?? ''}`;
}

/** A clock time with as much of the date as makes it plain beside `now`. */
export function moment(at: number, now: number, zone: string, preferences: Preferences): string {
  const time = clock(at, zone, preferences);
  // half a day either way cannot be mistaken: 22:10 read at 03:00 is last night's
  if (Math.abs(now - at) < 12 * 3_600_000) return time;
  const dayOf = (instant: number) => {
    const there = wall(instant, zone);
    return Date.UTC(there.year, there.month - 1, there.day) / 86_400_000;
  };
  const days = dayOf(now) - dayOf(at);
  if (days === 0) return time;
  if (days === 1) return `yesterday ${time}`;
  if (days === -1) return `tomorrow ${time}`;
  return `${day(at, zone)}, ${time}`;
}

/** A time of a rule, `HH:MM` or the sun with its offset. @example dayTime('sunset-01:00', USUAL) === '1 h before sunset' */
export function dayTime(value: string, preferences: Preferences): string {
  const sun = /^(sunrise|sunset)(?:([+-])(\d\d):(\d\d))?$/.exec(value);
  if (sun) {
    const seconds = Number(sun[3] ?? 0) * 3600 + Number(sun[4] ?? 0) * 60;
    const name = sun[1] ?? value;
    return seconds === 0 ? name : `${duration(seconds)} ${sun[2] === '-' ? 'before' : 'after'} ${name}`;
  }
  const [hours, minutes] = value.split(':').map(Number);
  if (preferences.clock === 24 || hours === undefined || minutes === undefined) return value;
  return `${hours % 12 === 0 ? 12 : hours % 12}:${String(minutes).padStart(2, '0')}${space}${hours < 12 ? 'am' : 'pm'}`;
}
