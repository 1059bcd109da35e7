/** Columns of a logger's file as they are shown, and the points to which they plainly go. */
import { type FileUnitKey, fileUnitsOf, unitInHead } from '@/lib/units/file-units';
import { headOf, headRows } from './logger-heads';
import { cellNumber, type FileLayout } from './logger-layout';
import { sensorValues } from './logger-sensors';

export interface GuessedColumn {
  column: number;
  head: string;
  /** Cells of the first lines. */
  sample: string[];
  unit: FileUnitKey | null;
  isTime: boolean;
  /** Of a long table: whose lines these are; null of any other. */
  sensor: string | null;
}

/** @param first row of the first reading; @param sensorColumn of a long table, that has a row here for each sensor */
export function columnsOf(
  rows: readonly string[][],
  first: number,
  timeColumns: readonly number[],
  sensorColumn?: number,
): GuessedColumn[] {
  const data = rows.slice(first).filter((cells) => cells.length > 1);
  const width = Math.max(0, ...data.slice(0, 50).map((cells) => cells.length));
  const heads = headRows(rows, first, width);
  const columns = Array.from({ length: width }, (_, column): GuessedColumn => {
    const head = headOf(heads, column);
    const unit =
      unitInHead(head) ?? heads.map((cells) => unitInHead(`(${(cells[column] ?? '').trim()})`)).find(Boolean);
    return {
      ...{ column, head: head.slice(0, 120) },
      sample: data.slice(0, 8).map((cells) => (cells[column] ?? '').slice(0, 60)),
      unit: unit ?? null,
      isTime: timeColumns.includes(column),
      sensor: null,
    };
  });
  if (sensorColumn === undefined) return columns;
  return [
    ...columns.filter((one) => one.isTime),
    ...sensorValues(data, heads, timeColumns, sensorColumn).map((one) => ({ ...one, isTime: false })),
  ];
}

/**
 * Columns put to points where that is plain: the head is the point's key or name, with or without its unit, and the unit is
 * named and fits. Everything else is left out until somebody chooses.
 */
export function matchColumns(
  columns: readonly GuessedColumn[],
  points: readonly { key: string; name: string; unit: string }[],
): FileLayout['columns'] {
  const plain = (text: string) =>
    text
      .toLowerCase()
      .replace(/[([{].*$/, '')
      .replace(/[^\p{L}\p{N}]/gu, '');
  const taken = new Set<string>();
  return columns.flatMap(({ column, head, unit, isTime, sensor }) => {
    if (isTime) return [];
    // the last word is often the unit, from a line of its own
    const named = [head, head.replace(/\s\S+$/, '')].map(plain).filter((text) => text !== '');
    const point = points.find(
      (one) => !taken.has(one.key) && [one.key, one.name].some((text) => named.includes(plain(text))),
    );
    if (point === undefined || unit === null || !fileUnitsOf(point.unit).includes(unit)) return [];
    taken.add(point.key);
    return [{ column, point: point.key, unit, ...(sensor === null ? {} : { sensor }) }];
  });
}

/** How many cells of a column are numbers, of those that say anything: tells text columns apart. */
export function isNumeric(column: GuessedColumn, decimal: '.' | ','): boolean {
  const read = column.sample.map((cell) => cellNumber(cell, decimal)).filter((value) => value !== null);
  return read.length === 0 || read.some((value) => !Number.isNaN(value));
}
