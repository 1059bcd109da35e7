/** Days of jobs: dates without a time, so no zone moves them. On Date.UTC alone, as the browser needs them too. */

const MONTHS = 'January February March April May June July August September October November December'.split(
  ' ',
);
const partsOf = (day: string) => day.split('-').map(Number);

function dayNumber(day: string): number {
  const [year = 1970, month = 1, date = 1] = partsOf(day);
  return Date.UTC(year, month - 1, date) / 86_400_000;
}

/** @example dueWord('2027-04-20') === '20 April 2027' */
export function dueWord(day: string): string {
  const [year = 1970, month = 1, date = 1] = partsOf(day);
  return `${date} ${MONTHS[month - 1] ?? ''} ${year}`;
}

/** @example daysWord('2026-12-03', '2026-12-01') === 'in 2 days' */
export function daysWord(day: string, today: string): string {
  const days = dayNumber(day) - dayNumber(today);
  if (days === 0) return 'today';
  if (days < 0) return days === -1 ? 'due since yesterday' : `due for ${-days} days`;
  if (days === 1) return 'tomorrow';
  return days < 60 ? `in ${days} days` : `in ${Math.round(days / 30.44)} months`;
}
