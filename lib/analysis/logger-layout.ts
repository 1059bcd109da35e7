/** What is understood of a logger's file: made from its first lines, corrected by a person, then read by. */
import type { FileUnitKey } from '@/lib/units/file-units';
import type { TimeLayout } from './logger-time';

export const ENCODINGS = ['utf-8', 'utf-16le', 'utf-16be', 'windows-1252'] as const;
export type Encoding = (typeof ENCODINGS)[number];
export const DELIMITERS = [',', ';', '\t', '|'] as const;
export type Delimiter = (typeof DELIMITERS)[number];

export interface ColumnLayout {
  /** From 0. */
  column: number;
  /** Key of the point that its values go to. */
  point: string;
  unit: FileUnitKey;
  /** Of a long table: the sensor whose lines are meant. */
  sensor?: string | undefined;
}

export interface FileLayout {
  encoding: Encoding;
  delimiter: Delimiter;
  decimal: '.' | ',';
  /** Lines before the first one of readings. */
  headLines: number;
  /** One column with the whole time, or the date's and the time of day's. */
  timeColumns: number[];
  /** Of a long table: the column that names the sensor; left out where each sensor has a column of its own. */
  sensorColumn?: number | undefined;
  time: TimeLayout;
  columns: ColumnLayout[];
}

/** What stands in a cell of which a logger had no value. Compared without capitals. */
const NOTHING = new Set(['', '-', '--', '---', 'nan', 'n/a', 'na', 'null', 'none', '#n/a', 'no data']);

/** Null where the cell says that there is no value; NaN where it is no number. @example cellNumber('−4,5', ',') === -4.5 */
export function cellNumber(cell: string, decimal: '.' | ','): number | null {
  const plain = cell.trim();
  // where the comma parts decimals a point parts thousands, and 1.234 would be read as another number than it is
  if (decimal === ',' && plain.includes('.')) return NOTHING.has(plain.toLowerCase()) ? null : Number.NaN;
  const point = decimal === ',' ? plain.replace(',', '.') : plain;
  // a plain number is by far the commonest, and Number alone takes spaces, hexadecimals and Infinity too
  if (/^-?\d+(\.\d+)?$/.test(point)) return Number(point);
  if (NOTHING.has(plain.toLowerCase())) return null;
  const signed = point.replace(/^[−–]/, '-');
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d{1,3})?$/i.test(signed) ? Number(signed) : Number.NaN;
}
