/**
 * Reads a logger's file by its layout: pieces of text in, readings out, with a word for each line that could not be read.
 * What it holds does not grow with the file: whoever feeds it takes out what has come before giving more.
 */
import { FILE_UNITS, keptValue } from '@/lib/units/file-units';
import { cellNumber, type ColumnLayout, type FileLayout } from './logger-layout';
import { type FileLine, LineReader } from './logger-lines';
import { ZoneClock } from './logger-clock';
import { isFirstPass, runsBackward } from './logger-direction';
import { readTime } from './logger-time';

export interface FileReading {
  /** The point's number. */
  point: number;
  /** Epoch ms. */
  at: number;
  /** In the point's unit, before its calibration. */
  value: number;
  /** 0 good, 2 outside what the point can show. */
  quality: 0 | 2;
}

export interface FileFault {
  line: number;
  text: string;
  why: string;
}

/** A line whose time the zone has twice or not at all. */
export interface FileDoubt {
  line: number;
  text: string;
  kind: 'twice' | 'skipped';
  /** Epoch ms; null where it is left out. */
  readAs: number | null;
}

export interface TargetPoint {
  number: number;
  key: string;
  unit: string;
  min: number | null;
  max: number | null;
}

interface Column extends ColumnLayout {
  target: TargetPoint;
}

/** A logger whose battery died begins again at 1970 or 2000: those times are no readings' times. */
const EARLIEST = Date.UTC(2000, 0, 2);
/** Lines that are looked at to tell whether the oldest or the newest comes first. */
const LOOKED_AT = 64;

export class LoggerReader {
  readings: FileReading[] = [];
  faults: FileFault[] = [];
  doubts: FileDoubt[] = [];
  /** Lines taken, the head among them. */
  lines = 0;
  private readonly lineReader: LineReader;
  private readonly clock: ZoneClock;
  /** By the sensor that a line names; all under one where none is named. */
  private readonly columns = new Map<string | undefined, Column[]>();
  /** Of each sensor by itself: in a long table one's second pass may stand beside another's first. */
  private readonly lastAt = new Map<string | undefined, number>();
  private isBackward = false;
  /** Lines held back until their direction is told; null from then on. */
  private held: FileLine[] | null = [];

  /**
   * @param points by key; a column whose point is not among them is left out
   * @param latest epoch ms; a later line is refused, see `worker/jobs/import-run.ts`
   */
  constructor(
    private readonly layout: FileLayout,
    points: ReadonlyMap<string, TargetPoint>,
    private readonly latest: number,
  ) {
    this.lineReader = new LineReader(layout.delimiter);
    this.clock = new ZoneClock(layout.time.zone);
    for (const column of layout.columns) {
      const target = points.get(column.point);
      const sensor = layout.sensorColumn === undefined ? undefined : (column.sensor ?? '');
      if (target !== undefined)
        this.columns.set(sensor, [...(this.columns.get(sensor) ?? []), { ...column, target }]);
    }
  }

  push(piece: string): void {
    for (const line of this.lineReader.push(piece)) this.hold(line);
  }

  end(): void {
    for (const line of this.lineReader.end()) this.hold(line);
    this.settle();
  }

  /** Reads what is held back now: for whoever has only a file's beginning. */
  settle(): void {
    const held = this.held ?? [];
    this.held = null;
    this.isBackward = runsBackward(
      held.map(({ cells }) => (cells === null ? '' : this.timeText(cells))),
      this.layout.time.order,
    );
    for (const line of held) this.take(line);
  }

  private hold(line: FileLine): void {
    if (this.held === null || line.number <= this.layout.headLines) return this.take(line);
    this.held.push(line);
    if (this.held.length >= LOOKED_AT) this.settle();
  }

  private take(line: FileLine): void {
    this.lines = line.number;
    if (line.number <= this.layout.headLines) return;
    if (line.cells === null) return this.refuse(line, line.fault ?? 'This line cannot be read.');
    if (line.text.trim() === '') return;
    const { sensorColumn } = this.layout;
    const sensor = sensorColumn === undefined ? undefined : line.cells[sensorColumn]?.trim();
    if (sensorColumn !== undefined && sensor === undefined)
      return this.refuse(line, `The line has no column ${sensorColumn + 1}, which names the sensor.`);
    const columns = this.columns.get(sensor) ?? [];
    if (sensorColumn !== undefined && columns.length === 0) return;
    const at = this.timeOf(line, line.cells, sensor);
    if (at === null) return;
    if (at < EARLIEST) return this.refuse(line, 'The time lies before 2000: the logger’s clock was not set.');
    if (at > this.latest) return this.refuse(line, TOO_NEW);
    this.lastAt.set(sensor, at);
    for (const column of columns) this.value(line, line.cells, column, at);
  }

  private timeText(cells: readonly string[]): string {
    const [date = 0, ofDay] = this.layout.timeColumns;
    return ofDay === undefined ? (cells[date] ?? '') : `${cells[date] ?? ''} ${cells[ofDay] ?? ''}`;
  }

  private timeOf(line: FileLine, cells: readonly string[], sensor: string | undefined): number | null {
    const text = this.timeText(cells);
    const read = readTime(text, this.layout.time.order);
    if (read === null) {
      this.refuse(line, `${JSON.stringify(text.slice(0, 40))} is no time of the form that was chosen.`);
      return null;
    }
    if ('instant' in read) return read.instant;
    const instants = this.clock.instantsOf(read.wall);
    const [first, second] = instants;
    if (first !== undefined && second === undefined) return first;
    return first === undefined || second === undefined
      ? this.skipped(line, read.wall)
      : this.twice(line, first, second, sensor);
  }

  private skipped(line: FileLine, wall: number): number | null {
    const at = this.layout.time.skipped === 'leave-out' ? null : this.clock.beforeGap(wall);
    this.doubts.push({ line: line.number, text: line.text.slice(0, 80), kind: 'skipped', readAs: at });
    return at;
  }

  private twice(line: FileLine, first: number, second: number, sensor: string | undefined): number | null {
    const { twice } = this.layout.time;
    const at =
      twice === 'leave-out'
        ? null
        : twice === 'first' ||
            (twice === 'by-order' && isFirstPass(first, second, this.lastAt.get(sensor), this.isBackward))
          ? first
          : second;
    this.doubts.push({ line: line.number, text: line.text.slice(0, 80), kind: 'twice', readAs: at });
    return at;
  }

  private value(line: FileLine, cells: readonly string[], column: Column, at: number): void {
    const cell = cells[column.column];
    if (cell === undefined) {
      return this.refuse(line, `The line has no column ${column.column + 1}, which is for ${column.point}.`);
    }
    const given = cellNumber(cell, this.layout.decimal);
    if (given === null) return;
    const { target, unit } = column;
    const value = keptValue(given, unit);
    const isImpossible = FILE_UNITS[unit].kept === 'Cel' && value < -273.15;
    if (!Number.isFinite(value) || Math.abs(value) > 1e12 || isImpossible) {
      const said = JSON.stringify(cell.slice(0, 40));
      return this.refuse(line, `${said} in column ${column.column + 1} is no value for ${column.point}.`);
    }
    const isOutside =
      (target.min !== null && value < target.min) || (target.max !== null && value > target.max);
    this.readings.push({ point: target.number, at, value, quality: isOutside ? 2 : 0 });
  }

  private refuse(line: FileLine, why: string): void {
    this.faults.push({ line: line.number, text: line.text.slice(0, 200), why });
  }
}

const TOO_NEW =
  'The time lies less than a day back, or ahead; bring the file in again tomorrow, or set the zone right. What control looks at comes from the nodes alone.';
