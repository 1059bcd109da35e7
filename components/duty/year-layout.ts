/** A year of nights as a calendar: a column a week, a row a day of the week. Pure. */

/** What is not known, or not so, is left out: it would be sent for every night of a year. */
export interface YearDay {
  night: string;
  /** Share of the night that the source ran, 0 to 1. */
  ran: number;
  kWh?: number;
  /** °C */
  lowest?: number;
  /** Under the frost limit at some time. */
  isCold?: true;
  /** Under 90 % was read. */
  isThin?: true;
}

export interface YearCell {
  /** Column and row, from 0. */
  week: number;
  weekday: number;
}

export interface YearLayout {
  weeks: number;
  /** In the order of the days. */
  cells: YearCell[];
  /** Cells of one unit: outlines of all, and of what ran a square within as large as it ran. */
  frames: string;
  fills: string;
  /** Under the frost limit. */
  cold: string;
  months: { week: number; label: string }[];
}

/** A cell is so wide; the rest of its unit is the gap to the next. */
const CELL = 0.86;
const DAY_MS = 86_400_000;
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

const dayOf = (night: string) => Math.round(Date.parse(`${night}T00:00:00Z`) / DAY_MS);
/** Monday is 0: 1 January 1970 was a Thursday. */
const weekdayOf = (day: number) => (((day + 3) % 7) + 7) % 7;

/** @param days ascending; nights that are not there leave their place empty */
export function yearLayout(days: readonly YearDay[]): YearLayout {
  const first = days[0];
  if (first === undefined) return { weeks: 0, cells: [], frames: '', fills: '', cold: '', months: [] };
  const monday = dayOf(first.night) - weekdayOf(dayOf(first.night));
  const cells = days.map(({ night }): YearCell => {
    const since = dayOf(night) - monday;
    return { week: Math.floor(since / 7), weekday: since % 7 };
  });
  const most = Math.max(...days.map((one) => one.ran), 1e-6);
  const square = ({ week, weekday }: YearCell, side: number) => {
    const inset = (CELL - side) / 2;
    const [x, y, s] = [week + inset, weekday + inset, side].map((value) => Number(value.toFixed(2)));
    return `M${x} ${y}h${s}v${s}h-${s}z`;
  };
  const of = (draw: (day: YearDay, cell: YearCell) => string) =>
    days.map((day, place) => draw(day, cells[place] ?? { week: 0, weekday: 0 })).join('');
  return {
    weeks: (cells.at(-1)?.week ?? 0) + 1,
    cells,
    frames: of((_, cell) => square(cell, CELL)),
    // the area says how long it ran, so the side is its root
    fills: of((day, cell) => (day.ran <= 0 ? '' : square(cell, CELL * Math.sqrt(day.ran / most)))),
    cold: of((day, cell) => (day.isCold === true ? square(cell, CELL + 0.06) : '')),
    months: monthsOf(days, cells),
  };
}

/** A month's name stands over the week of its first; the first week's only where there is room before the next. */
function monthsOf(days: readonly YearDay[], cells: readonly YearCell[]): YearLayout['months'] {
  const firsts = days.flatMap(({ night }, place) =>
    place === 0 || night.endsWith('-01')
      ? [{ week: cells[place]?.week ?? 0, label: MONTHS[Number(night.slice(5, 7)) - 1] ?? '' }]
      : [],
  );
  return firsts.filter((one, place) => (firsts[place + 1]?.week ?? Infinity) - one.week >= 3);
}

/** The day in a cell, for a pointer; null where no night stands. */
export function dayAt(layout: YearLayout, week: number, weekday: number): number | null {
  const place = layout.cells.findIndex((cell) => cell.week === week && cell.weekday === weekday);
  return place < 0 ? null : place;
}

/** Where an arrow leads: up and down a day, left and right a week; null for another key. */
export function arrowStep(key: string): number | null {
  return { ArrowUp: -1, ArrowDown: 1, ArrowLeft: -7, ArrowRight: 7 }[key] ?? null;
}
