/** Days of jobs: dates without a time, so no zone moves them. */
import { DateTime } from 'luxon';

const dayOf = (day: string) => DateTime.fromISO(day, { zone: 'utc', locale: 'en-GB' });

/** @example dueWord('2027-04-20') === '20 April 2027' */
export function dueWord(day: string): string {
  return dayOf(day).toFormat('d LLLL yyyy');
}

/** @example daysWord('2026-12-03', '2026-12-01') === 'in 2 days' */
export function daysWord(day: string, today: string): string {
  const days = Math.round(dayOf(day).diff(dayOf(today), 'days').days);
  if (days === 0) return 'today';
  if (days < 0) return days === -1 ? 'due since yesterday' : `due for ${-days} days`;
  if (days === 1) return 'tomorrow';
  return days < 60 ? `in ${days} days` : `in ${Math.round(days / 30.44)} months`;
}
