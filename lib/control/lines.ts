/**
 * How claims look at a reading. Whoever compares a value with a limit does it here, and the line is noted: while a
 * point stays between the nearest lines on either side, every look at it would answer as it did, so nothing need be
 * decided anew (lull.ts). A value that is only told, in a reason or an alarm, needs no line.
 */
import { plain } from './plain';
import { comparable } from './readings';
import type { Run } from './run';

/** value < limit, strictly. A point without a value is under nothing. */
export function isUnder(run: Run, point: number, limit: number): boolean {
  const value = comparable(run, point);
  noteLine(run, point, value, limit);
  return value < limit;
}

/** value > limit, strictly. A point without a value is over nothing. */
export function isOver(run: Run, point: number, limit: number): boolean {
  const value = comparable(run, point);
  noteLine(run, point, value, limit);
  return value > limit;
}

/** first − second < limit, strictly and as on paper; false without either value. */
export function isDifferenceUnder(run: Run, first: number, second: number, limit: number): boolean {
  const a = comparable(run, first);
  const b = comparable(run, second);
  // each may go half of the way; a billionth less, as sums of rounded numbers may end on the wrong side
  const free = Math.abs(a - b - limit) / 2 - 1e-9;
  for (const [point, value] of [
    [first, a],
    [second, b],
  ] as const) {
    if (!(free > 0)) noteLine(run, point, value, value);
    else {
      noteLine(run, point, value, value - free);
      noteLine(run, point, value, value + free);
    }
  }
  return plain(a - b) < limit;
}

/** Whoever compares elsewhere, and exactly with these. */
export function noteLines(run: Run, point: number, limits: readonly number[]): void {
  const value = comparable(run, point);
  for (const limit of limits) noteLine(run, point, value, limit);
}

/** It is the point's next reading that is waited for, whatever it says. */
export function awaitReading(run: Run, point: number): void {
  run.over[point] = NaN;
  run.under[point] = NaN;
}

/** Narrows what the point may do; a line on the value itself leaves it no room. NaN, which nothing passes, stays. */
function noteLine(run: Run, point: number, value: number, limit: number): void {
  if (limit <= value && limit > (run.over[point] ?? NaN)) run.over[point] = limit;
  if (limit >= value && limit < (run.under[point] ?? NaN)) run.under[point] = limit;
}

/** Whether no look at a point would answer otherwise now than when its lines were drawn. */
export function isBetweenLines(run: Run, point: number): boolean {
  const over = run.over[point] ?? NaN;
  const under = run.under[point] ?? NaN;
  const value = comparable(run, point);
  if (Number.isNaN(value)) return over === -Infinity && under === Infinity;
  return (value > over && value < under) || (value === over && value === under);
}
