/** Lines of equal temperature between the probes of a round, in drawing units. Nothing is drawn beyond the probes' hull. */
import { contours } from 'd3-contour';
import { geoPathOf } from './contour-path';
import {
  between,
  hullOf,
  spotOf,
  type ProbePlace,
  type Section,
  type Spot,
} from '@/lib/analysis/probe-section';

export interface Isotherm {
  /** In the reader's degrees. */
  level: number;
  path: string;
}

export interface Isotherms {
  /** Each holds all that is as warm or warmer, so that they lie over each other. */
  lines: Isotherm[];
  /** The probes' hull as a path; empty where the places lie in a line, and then nothing is drawn between them. */
  hull: string;
}

const COLUMNS = 96;
const ROWS = 56;

/** @param shown the reader's degrees of °C @param step between two lines, in them */
export function isothermsOf(
  section: Section,
  places: readonly ProbePlace[],
  at: (spot: Spot) => [number, number],
  shown: (celsius: number) => number,
  step: number,
): Isotherms {
  const readings = places.map((place) => ({ ...spotOf(section, place), celsius: shown(place.celsius) }));
  const hull = hullOf(readings);
  if (hull.length === 0) return { lines: [], hull: '' };
  const [xs, ys] = [hull.map(({ x }) => x), hull.map(({ y }) => y)];
  const [left, right, bottom, top] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  // a grid point stands in the middle of its cell
  const spotAt = (column: number, row: number): Spot => ({
    x: left + ((right - left) * (column - 0.5)) / (COLUMNS - 1),
    y: top - ((top - bottom) * (row - 0.5)) / (ROWS - 1),
  });
  const values = Array.from({ length: COLUMNS * ROWS }, (_, i) =>
    between(readings, spotAt((i % COLUMNS) + 0.5, Math.floor(i / COLUMNS) + 0.5)),
  );
  const celsius = readings.map((one) => one.celsius);
  const [least, most] = [Math.min(...celsius), Math.max(...celsius)];
  const levels: number[] = [];
  for (let level = Math.floor(least / step) * step; level <= most; level += step) levels.push(level);
  const drawn = contours().size([COLUMNS, ROWS]).thresholds(levels)(values);
  return {
    lines: drawn.map((one) => ({
      level: one.value,
      path: geoPathOf(one.coordinates, (column, row) => at(spotAt(column, row))),
    })),
    hull: `M${hull.map((spot) => at(spot).map(tidy).join(',')).join('L')}Z`,
  };
}

const tidy = (value: number) => Number(value.toFixed(1));
