/** What a rule asks of the calendar: season, hours, and the band's period, each with the instant of its next change. */
import { dayNumber, instantOf, monthDay, parseDayTime, place, sunOn, wallAt, wallInstant } from './local-day';
import type { DayTimeOf, Place } from './local-day';
import { DateTime } from 'luxon';
import type { RuleBody } from './types';

export { place, type Place };

export interface RuleCalendar {
  /** Holds from `from` up to, not at, `until`. */
  from: number;
  until: number;
  inSeason: boolean;
  inHours: boolean;
  low: number;
  high: number;
}

export interface TimeFacts {
  from: number;
  until: number;
  hour: number;
  month: number;
  /** 1 is Monday. */
  weekday: number;
  sunUp: boolean;
}

const REMEMBERED = 8;

/**
 * Remembers its last answers: a step asks the same stretch of time again and again, and a look ahead goes through a
 * day of them and comes back.
 */
function remembering<T extends { from: number; until: number }>(ask: (at: number) => T): (at: number) => T {
  const kept: T[] = [];
  let last: T | null = null;
  return (at) => {
    if (last !== null && at >= last.from && at < last.until) return last;
    let found = kept.find((one) => at >= one.from && at < one.until);
    if (found === undefined) {
      found = ask(at);
      if (kept.length >= REMEMBERED) kept.shift();
      kept.push(found);
    }
    last = found;
    return found;
  };
}

export function compileCalendar(body: RuleBody, where: Place): (at: number) => RuleCalendar {
  // two that the same gap of the clock begins go by their times, not by how they were written down
  const periods = body.band
    .map((period) => ({ ...period, time: parseDayTime(period.from) }))
    .sort((a, b) => clockOf(a.time) - clockOf(b.time));
  const hours =
    body.hours === undefined
      ? null
      : { from: parseDayTime(body.hours.from), to: parseDayTime(body.hours.to) };
  return remembering((at) => {
    const day = dayNumber(where, at);
    const edges = [wallInstant(where, day + 1, 0)];
    const period = periodAt(where, day, at, periods, edges);
    const inHours = hours === null || withinHours(where, day, at, hours, edges);
    const until = Math.min(...edges.filter((edge) => edge > at));
    const inSeason = body.season === undefined || withinSeason(monthDay(day), body.season);
    return { from: at, until, inSeason, inHours, low: period.low, high: period.high };
  });
}

const clockOf = (time: DayTimeOf): number => (time.kind === 'clock' ? time.minutes : -1);

/** Both days belong to the season; it may run over new year. */
export function withinSeason(today: string, season: { from: string; to: string }): boolean {
  return season.from <= season.to
    ? today >= season.from && today <= season.to
    : today >= season.from || today <= season.to;
}

interface Period {
  low: number;
  high: number;
  time: DayTimeOf;
}

/** The period begun last; before the first of a day the last of the day before holds. */
function periodAt(
  where: Place,
  day: number,
  at: number,
  periods: Period[],
  edges: number[],
): { low: number; high: number } {
  const only = periods[0];
  if (only === undefined) throw new Error('A rule without a band cannot be compiled.');
  if (periods.length === 1) return only;
  let current: Period | null = null;
  let begun = -Infinity;
  for (const date of [day - 2, day - 1, day, day + 1]) {
    for (const period of periods) {
      const begins = instantOf(where, date, period.time);
      if (begins === null) continue;
      edges.push(begins);
      if (begins <= at && begins >= begun) {
        begun = begins;
        current = period;
      }
    }
  }
  if (current !== null) return current;
  // only the sun's periods, and the sun has done nothing for days: day's period under the midnight sun, else night's
  const wanted = sunOn(where, day).polar === 'up' ? 'sunrise' : 'sunset';
  return periods.find((period) => period.time.kind === wanted) ?? only;
}

function withinHours(
  where: Place,
  day: number,
  at: number,
  hours: { from: DayTimeOf; to: DayTimeOf },
  edges: number[],
): boolean {
  for (const date of [day - 1, day, day + 1]) {
    const span = spanOf(where, date, hours);
    if (span === null) continue;
    edges.push(span[0], span[1]);
    if (at >= span[0] && at < span[1]) return true;
  }
  return false;
}

/** The hours that begin on a date, as instants. */
function spanOf(
  where: Place,
  day: number,
  hours: { from: DayTimeOf; to: DayTimeOf },
): [number, number] | null {
  const { polar } = sunOn(where, day);
  const bySun = hours.from.kind !== 'clock' && hours.to.kind !== 'clock';
  if (bySun && polar !== null) {
    const darkHours = hours.from.kind === 'sunset' && hours.to.kind === 'sunrise';
    const lightHours = hours.from.kind === 'sunrise' && hours.to.kind === 'sunset';
    const midnight = wallInstant(where, day + 1, 0);
    // the night before the sun's first rise belongs to it: after a polar night all of it, after a polar day from midnight
    const rise = darkHours ? instantOf(where, day + 1, hours.to) : null;
    if (polar === 'up' && darkHours) return rise === null ? null : [midnight, rise];
    const always = polar === 'down' ? darkHours : lightHours;
    return always ? [wallInstant(where, day, 0), rise ?? midnight] : null;
  }
  const begins = eventOf(where, day, hours.from);
  const endsToday = eventOf(where, day, hours.to);
  if (!runOverMidnight(hours, endsToday <= begins)) return begins < endsToday ? [begins, endsToday] : null;
  const next = instantOf(where, day + 1, hours.to);
  // tomorrow the sun does not do it: these hours end with today, and tomorrow's polar day or night speaks for itself
  return [
    begins,
    bySun && next === null ? wallInstant(where, day + 1, 0) : eventOf(where, day + 1, hours.to),
  ];
}

/**
 * Whether hours end on the next date: a change of the clock or a short day may bring both ends together or turn them round,
 * and hours of the clock, of a night or of a day stay what they are all the same.
 * @param turned the end of that date is not after the beginning, which decides where clock and sun are mixed
 */
function runOverMidnight({ from, to }: { from: DayTimeOf; to: DayTimeOf }, turned: boolean): boolean {
  if (from.kind === 'clock' && to.kind === 'clock') return to.minutes <= from.minutes;
  if (from.kind === 'sunset' && to.kind === 'sunrise') return true;
  if (from.kind === 'sunrise' && to.kind === 'sunset') return false;
  return turned;
}

/** Where the sun does nothing: a night of 24 h begins and ends at noon, one of none at midnight. */
function eventOf(where: Place, day: number, time: DayTimeOf): number {
  const event = instantOf(where, day, time);
  if (event !== null) return event;
  if (sunOn(where, day).polar !== 'up') return wallInstant(where, day, 720);
  return wallInstant(where, time.kind === 'sunrise' ? day : day + 1, 0);
}

const QUARTER_MS = 900_000;

/** time.hour, time.month, time.weekday and time.sunUp of a place. */
export function compileTimeFacts(where: Place): (at: number) => TimeFacts {
  return remembering((at) => {
    const wall = shownOn(where, at);
    const day = dayNumber(where, at);
    const edges = [hourEnds(where, at, wall.hour)];
    const sunUp = isSunUp(where, day, at, edges);
    const until = Math.min(...edges.filter((edge) => edge > at));
    return { from: at, until, hour: wall.hour, month: wall.month, weekday: wall.weekday, sunUp };
  });
}

const shownOn = (where: Place, at: number) => DateTime.fromMillis(wallAt(where, at), { zone: 'utc' });

/** A change of the clock may cut an hour at any quarter, or show it once more: each is looked at till another hour shows. */
function hourEnds(where: Place, at: number, hour: number): number {
  let edge = at + QUARTER_MS - (at % QUARTER_MS);
  while (shownOn(where, edge).hour === hour) edge += QUARTER_MS;
  return edge;
}

/** In a northern June the sun of one date may set after midnight, so the days beside it are asked too. */
function isSunUp(where: Place, day: number, at: number, edges: number[]): boolean {
  if (sunOn(where, day).polar === 'up') return true;
  return [day - 1, day, day + 1].some((date) => {
    const { sunrise, sunset } = sunOn(where, date);
    if (sunrise === null || sunset === null) return false;
    edges.push(sunrise, sunset);
    return at >= sunrise && at < sunset;
  });
}
