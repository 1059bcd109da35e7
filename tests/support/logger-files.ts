// What the tests of loggers' files share: three points, and a file understood and read in small pieces.
import { matchColumns } from '@/lib/analysis/logger-columns';
import { guessLayout } from '@/lib/analysis/logger-guess';
import type { FileLayout } from '@/lib/analysis/logger-layout';
import { LoggerReader, type TargetPoint } from '@/lib/analysis/logger-reader';

const points = [
  { key: 'bench-1', name: 'Bench 1', unit: 'Cel', number: 1, min: -30, max: 60 },
  { key: 'humidity', name: 'Humidity', unit: '%RH', number: 2, min: null, max: null },
  { key: 'light', name: 'Light', unit: 'W/m2', number: 3, min: null, max: null },
];
const targets = new Map<string, TargetPoint>(points.map((point) => [point.key, point]));
const LATEST = Date.parse('2026-11-30T00:00:00Z');

/** What is understood of a file, with its columns put to the three points. */
export function guess(text: string, zone = 'Europe/Zurich') {
  const found = guessLayout(text, 'utf-8', zone);
  if (found === null) throw new Error('nothing was understood');
  return { ...found, layout: { ...found.layout, columns: matchColumns(found.columns, points) } };
}

export function read(text: string, layout: FileLayout, piece = 7) {
  const reader = new LoggerReader(layout, targets, LATEST);
  for (let at = 0; at < text.length; at += piece) reader.push(text.slice(at, at + piece));
  reader.end();
  return reader;
}

export const told = (reader: LoggerReader) =>
  reader.readings.map(({ point, at, value }) => [point, new Date(at).toISOString(), value]);

/** A file read as it is understood: its readings, as [point's number, time, value]. */
export const readAsGuessed = (text: string, zone?: string) => told(read(text, guess(text, zone).layout));

export const lines = (...all: string[]) => `${all.join('\n')}\n`;
