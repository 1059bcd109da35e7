/** Long tables: each line holds what one sensor told, and a column names the sensor. */
import { type FileUnitKey, unitInHead } from '@/lib/units/file-units';
import { headOf, headRows } from './logger-heads';
import { cellNumber } from './logger-layout';

const MOST_SENSORS = 200;
const NAMES =
  /\b(sensor|probe|channel|device|logger|node|tag|name|point|fühler|sonde|kanal|gerät|capteur|appareil)/i;

const nameIn = (cells: readonly string[], column: number) => (cells[column] ?? '').trim();
const isNumber = (cell: string) =>
  (['.', ','] as const).some((decimal) => Number.isFinite(cellNumber(cell, decimal) ?? Number.NaN));
const isUnit = (cell: string) => unitInHead(`(${cell})`) !== null;

/**
 * The column that names the sensor; undefined where each sensor has a column of its own. A sensor tells a time once, so that
 * no name comes twice at one time; and either several lines have one time, or the head says that it names something.
 * @param first row of the first reading
 */
export function sensorColumnOf(
  rows: readonly string[][],
  first: number,
  timeColumns: readonly number[],
): number | undefined {
  const data = rows.slice(first).filter((cells) => cells.length > 2);
  const width = rows[first]?.length ?? 0;
  const heads = headRows(rows, first, width);
  const times = data.map((cells) => timeColumns.map((column) => nameIn(cells, column)).join(' '));
  const isShared = new Set(times).size * 4 <= data.length * 3;
  const found = Array.from({ length: width }, (_, column) => column).flatMap((column) => {
    const names = data.map((cells) => nameIn(cells, column));
    const different = new Set(names);
    const isNamed = NAMES.test(headOf(heads, column));
    const pairs = new Set(names.map((name, row) => `${times[row] ?? ''}\n${name}`));
    const isOut =
      timeColumns.includes(column) ||
      different.has('') ||
      different.size < 2 ||
      different.size > Math.min(MOST_SENSORS, data.length / 2) ||
      pairs.size < data.length * 0.95 ||
      [...different].every(isUnit) ||
      !(isNamed || (isShared && names.every((name) => !isNumber(name))));
    return isOut ? [] : [{ column, isNamed, many: different.size }];
  });
  return found.sort((a, b) => Number(b.isNamed) - Number(a.isNamed) || b.many - a.many)[0]?.column;
}

export interface SensorValue {
  column: number;
  sensor: string;
  head: string;
  sample: string[];
  unit: FileUnitKey | null;
}

/** What each sensor tells, a row for each of its columns of values; the unit by its name, a cell beside it, or the column's head. */
export function sensorValues(
  data: readonly string[][],
  heads: readonly string[][],
  timeColumns: readonly number[],
  sensorColumn: number,
): SensorValue[] {
  const bySensor = new Map<string, string[][]>();
  for (const cells of data) {
    const name = nameIn(cells, sensorColumn);
    const own = bySensor.get(name);
    if (own !== undefined) own.push(cells);
    else if (name !== '' && bySensor.size < MOST_SENSORS) bySensor.set(name, [cells]);
  }
  const width = Math.max(0, ...data.slice(0, 50).map((cells) => cells.length));
  const values = Array.from({ length: width }, (_, column) => column).filter(
    (column) =>
      column !== sensorColumn &&
      !timeColumns.includes(column) &&
      !(column < (timeColumns[0] ?? 0) && isCount(data, column)) &&
      data.some((cells) => isNumber(nameIn(cells, column))),
  );
  return [...bySensor].flatMap(([sensor, own]) => {
    const beside = own[0]?.find((cell, column) => column !== sensorColumn && isUnit(cell.trim()));
    return values.map((column) => {
      const head = headOf(heads, column);
      return {
        ...{ column, sensor, head: values.length === 1 ? sensor : `${sensor}, ${head}` },
        sample: own.slice(0, 8).map((cells) => (cells[column] ?? '').slice(0, 60)),
        unit:
          unitInHead(sensor) ??
          (beside === undefined ? null : unitInHead(`(${beside.trim()})`)) ??
          unitInHead(head),
      };
    });
  });
}

/** A number of the line, before its time, that rises by one from each to the next. */
function isCount(data: readonly string[][], column: number): boolean {
  const numbers = data.map((cells) => Number(nameIn(cells, column)));
  return numbers.length > 1 && numbers.slice(1).every((number, row) => number - (numbers[row] ?? 0) === 1);
}
