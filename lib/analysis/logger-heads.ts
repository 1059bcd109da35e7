/** The lines above a logger's readings: names, often units under them, and at times what the clock was set by. */
import { fixedOffset, zoneOfOffset } from './logger-clock';

const OFFSET_CELL = /^\s*(?:utc|gmt)\s*[+\-−–]\s*\d{1,2}(?::?\d{2})?\s*$/i;

/** The three lines above the first reading that are about as wide as it; what stands higher is the logger's own story. */
export function headRows(rows: readonly string[][], first: number, width: number): string[][] {
  return rows
    .slice(Math.max(0, first - 3), first)
    .filter((cells, k, near) => cells.length >= width - 1 && (k === near.length - 1 || !isPaddedStory(cells)))
    .map((cells) => joined(cells, width));
}

/** "Logger 7;;": a spreadsheet fills every line up to the table's width, the story's too. */
const isPaddedStory = (cells: readonly string[]): boolean =>
  cells.length > 2 && cells.filter((cell) => cell.trim() !== '').length < 2;

/** "Date Time, GMT-07:00" is parted by its comma where nobody quoted it, and every head behind it is a column off. */
function joined(cells: string[], width: number): string[] {
  const at = cells.length > width ? cells.findIndex((cell) => OFFSET_CELL.test(cell)) : -1;
  return at < 1
    ? cells
    : [
        ...cells.slice(0, at - 1),
        `${cells[at - 1] ?? ''}, ${(cells[at] ?? '').trim()}`,
        ...cells.slice(at + 1),
      ];
}

export function headOf(heads: readonly string[][], column: number): string {
  return heads
    .map((cells) => (cells[column] ?? '').trim())
    .filter((text) => text !== '')
    .join(' ')
    .replace(/^\uFEFF/, '');
}

const TIME_OF_DAY =
  /\b(time|clock|hours?\b|zeit|uhr|heure|hora\b|ora\b|ore\b|tids?\b|tidspunkt|tijd|klo|kl\b)/i;
const DATE = /\b(date|datum|dato\b|fecha|day\b|tag\b|dag\b|jour\b)/i;

export const saysTimeOfDay = (head: string): boolean => TIME_OF_DAY.test(head);
export const saysTime = (head: string): boolean => DATE.test(head) || TIME_OF_DAY.test(head);

// "GMT Standard Time" is what some systems call London's clock, which does change
const NAMED =
  /(?<![\p{L}\d])(?:utc|gmt)(?![\p{L}\d]| standard| daylight)(?:\s*[+\-−–]\s*\d{1,2}(?::?[0-5]\d)?(?![\d.,:]))?/iu;
const BRACKETED = /[([]\s*([+\-−–]\d{2}:?\d{2})\s*[)\]]/;

/** The fixed offset that a text names, as a layout's zone. @example zoneInText('Date Time, GMT-07:00') === 'UTC-07:00' */
export function zoneInText(text: string): string | null {
  const said = BRACKETED.exec(text)?.[1] ?? NAMED.exec(text)?.[0];
  if (said === undefined) return null;
  const offset = /^(utc|gmt)$/i.test(said) ? 0 : fixedOffset(said);
  return offset === null ? null : zoneOfOffset(offset);
}

const ABOUT_ZONE = /time ?zone|zeitzone|fuseau|tidszon|utc.?offset/i;

/** That of the time's own head; else that of a line above which is about the zone. */
export function zoneInHeads(
  rows: readonly string[][],
  first: number,
  heads: readonly string[][],
  timeColumns: readonly number[],
): string | null {
  const own = timeColumns.map((column) => zoneInText(headOf(heads, column))).find((zone) => zone !== null);
  if (own !== undefined) return own;
  const story = rows.slice(0, first).find((cells) => ABOUT_ZONE.test(cells.join(' ')));
  return story === undefined ? null : zoneInText(story.join(' '));
}
