/** Season and daily hours in words. */
import type { Preferences } from '@/lib/units/preferences';
import { dayTime } from '@/lib/units/time';
import { exactly } from './settings';

const months = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];
const days = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'];

/** 1 is January. */
export function monthName(month: number): string {
  return months[month - 1] ?? `month ${month}`;
}

/** 1 is Monday. */
export function dayName(day: number): string {
  return days[day - 1] ?? `day ${day}`;
}

/** `MM-DD`. @example monthDayWords('10-01') === '1 October' */
export function monthDayWords(monthDay: string): string {
  return `${Number(monthDay.slice(3))} ${monthName(Number(monthDay.slice(0, 2)))}`;
}

export type DayMark = { at: 'clock'; time: string } | { at: 'sunrise' | 'sunset'; offsetMin: number };

/** Takes `HH:MM`, `sunset`, `sunset-01:00` … apart; null where it is none of these. */
export function dayMark(text: string): DayMark | null {
  if (/^([01]\d|2[0-3]):[0-5]\d$/.test(text)) return { at: 'clock', time: text };
  const sun = /^(sunrise|sunset)(?:([+-])(0\d|1[0-2]):([0-5]\d))?$/.exec(text);
  if (!sun) return null;
  const offset = Number(sun[3] ?? 0) * 60 + Number(sun[4] ?? 0);
  return { at: sun[1] === 'sunrise' ? 'sunrise' : 'sunset', offsetMin: sun[2] === '-' ? -offset : offset };
}

/** @example dayTimeWords('sunset-01:00', USUAL) === '1 h before sunset' */
export function dayTimeWords(text: string, preferences: Preferences): string {
  const mark = dayMark(text);
  if (!mark) return text;
  if (mark.at === 'clock') return dayTime(mark.time, preferences);
  if (mark.offsetMin === 0) return mark.at;
  const much = Math.abs(mark.offsetMin);
  const away = much % 60 === 0 ? `${much / 60}\u00a0h` : exactly(much * 60);
  return `${away} ${mark.offsetMin < 0 ? 'before' : 'after'} ${mark.at}`;
}

export interface When {
  season?: { from: string; to: string } | undefined;
  hours?: { from: string; to: string } | undefined;
}

/** "Only from 1 October to 30 April, between 18:00 and 08:00." Empty where nothing bounds the rule. */
export function whenWords(when: When, preferences: Preferences): string {
  const season = when.season && `from ${monthDayWords(when.season.from)} to ${monthDayWords(when.season.to)}`;
  const hours =
    when.hours &&
    `between ${dayTimeWords(when.hours.from, preferences)} and ${dayTimeWords(when.hours.to, preferences)}`;
  const both = [season, hours].filter(Boolean).join(', ');
  return both === '' ? '' : `Only ${both}.`;
}
