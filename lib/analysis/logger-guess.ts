/** What the first lines of a logger's file say about it. All of it is shown and can be corrected; nothing is decided here. */
import { columnsOf, type GuessedColumn } from './logger-columns';
import { headOf, headRows, zoneInHeads } from './logger-heads';
import { type Delimiter, DELIMITERS, type Encoding, type FileLayout } from './logger-layout';
import { LineReader } from './logger-lines';
import { type Table, timeDoubts, timedTables } from './logger-order';
import { sensorColumnOf } from './logger-sensors';

export interface Guess {
  layout: FileLayout;
  columns: GuessedColumn[];
  /** Of every column of the file. */
  heads: string[];
  /** What a person must look at, in words. */
  doubts: string[];
}

/** By the byte order mark, else by what the bytes can be. `bytes` are the file's first. */
export function encodingOf(bytes: Uint8Array): Encoding {
  const [first, second] = bytes;
  if (first === 0xff && second === 0xfe) return 'utf-16le';
  if (first === 0xfe && second === 0xff) return 'utf-16be';
  const zeros = [0, 0];
  bytes.forEach((byte, place) => {
    if (byte === 0) zeros[place % 2] = (zeros[place % 2] ?? 0) + 1;
  });
  const many = bytes.length / 8;
  if ((zeros[1] ?? 0) > many) return 'utf-16le';
  if ((zeros[0] ?? 0) > many) return 'utf-16be';
  try {
    // as a stream, since the first bytes may end within a letter
    new TextDecoder('utf-8', { fatal: true }).decode(bytes, { stream: true });
    return 'utf-8';
  } catch {
    return 'windows-1252';
  }
}

function tableOf(text: string, delimiter: Delimiter): Table {
  const reader = new LineReader(delimiter);
  // the last line may be cut off
  return { delimiter, rows: reader.push(text).map((line) => line.cells ?? []) };
}

const THOUSANDS = /^[-−]?[1-9]\d{0,2}(,\d{3})+$/;

/** Between commas a decimal comma stands in quotation marks, and so does one that parts thousands. */
function decimalOf(
  delimiter: Delimiter,
  values: readonly string[],
): { decimal: '.' | ','; doubts: string[] } {
  const commas = values.filter((cell) => /^[-−]?\d+,\d+$/.test(cell));
  const points = values.filter((cell) => /^[-−]?\d+\.\d+$/.test(cell));
  if (delimiter !== ',') return { decimal: commas.length > points.length ? ',' : '.', doubts: [] };
  if (commas.length === 0 || points.length > 0) return { decimal: '.', doubts: [] };
  const isEither = commas.every((cell) => THOUSANDS.test(cell));
  const [one = ''] = commas;
  return {
    decimal: ',',
    doubts: isEither
      ? [
          `${one} is read as ${one.replace(',', '.')}. If its comma parts thousands, save the file again without such commas.`,
        ]
      : [],
  };
}

/**
 * @param text the file's beginning, decoded
 * @param zone of the house, in which times without an offset are read unless the head or somebody says otherwise
 * @param given what a person chose instead; then only heads and samples are looked for
 * @returns null where no line begins with a time
 */
export function guessLayout(
  text: string,
  encoding: Encoding,
  zone: string,
  given?: FileLayout,
): Guess | null {
  if (given !== undefined) {
    const { rows } = tableOf(text, given.delimiter);
    const columns = columnsOf(rows, given.headLines, given.timeColumns, given.sensorColumn);
    return { layout: given, columns, heads: headsOf(rows, given.headLines), doubts: [] };
  }
  const found = timedTables(DELIMITERS.map((delimiter) => tableOf(text, delimiter)));
  const [best] = found;
  if (best === undefined) return null;
  const { table, order, columns: timeColumns, first } = best;
  const { rows, delimiter } = table;
  const heads = headRows(rows, first, rows[first]?.length ?? 0);
  const values = rows
    .slice(first)
    .flatMap((cells) =>
      cells.filter((_, column) => !timeColumns.includes(column)).map((cell) => cell.trim()),
    );
  const { decimal, doubts } = decimalOf(delimiter, values);
  const sensorColumn = sensorColumnOf(rows, first, timeColumns);
  const names = sensorColumn === undefined ? [] : [longTable(sensorColumn, headOf(heads, sensorColumn))];
  const ownZone = zoneInHeads(rows, first, heads, timeColumns) ?? zone;
  return {
    layout: {
      ...{ encoding, delimiter, decimal, headLines: first, timeColumns },
      time: { order, zone: ownZone, twice: 'by-order', skipped: 'before-gap' },
      ...(sensorColumn === undefined ? {} : { sensorColumn }),
      columns: [],
    },
    columns: columnsOf(rows, first, timeColumns, sensorColumn),
    heads: headsOf(rows, first),
    doubts: [...timeDoubts(found, sensorColumn !== undefined), ...doubts, ...names],
  };
}

function headsOf(rows: readonly string[][], first: number): string[] {
  const width = rows[first]?.length ?? 0;
  const heads = headRows(rows, first, width);
  return Array.from({ length: width }, (_, column) => headOf(heads, column).slice(0, 120));
}

const longTable = (column: number, head: string) =>
  `Column ${column + 1}${head === '' ? '' : ` (${head.slice(0, 40)})`} seems to be what names the sensor: each line is read as one sensor’s. If it is not, say below that no column names it.`;
