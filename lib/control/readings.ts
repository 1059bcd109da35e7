/** The readings in use, which a memory keeps in lists apart from the points' entries: looked at, put and copied. */
import type { ParkedPoint, PointMemory, Readings } from './memory';
import { entry, type Run } from './run';

export const NO_READING: ParkedPoint['reading'] = { value: 0, at: 0, lastAt: 0, sameSince: 0 };

export const copyReadings = ({ value, at, lastAt, sameSince }: Readings): Readings => ({
  value: value.slice(),
  at: at.slice(),
  lastAt: lastAt.slice(),
  sameSince: sameSince.slice(),
});

/** Puts a reading in use; the lists must be the writer's own. */
export function putReading(readings: Readings, index: number, reading: ParkedPoint['reading']): void {
  readings.value[index] = reading.value;
  readings.at[index] = reading.at;
  readings.lastAt[index] = reading.lastAt;
  readings.sameSince[index] = reading.sameSince;
}

/** Null: the point has none. */
export const valueOf = (run: Run, index: number): number | null =>
  entry(run.points, index).hasValue ? (run.readings.value[index] ?? NaN) : null;

/** The same as a number that no comparison passes where there is none. */
export const comparable = (run: Run, index: number): number =>
  entry(run.points, index).hasValue ? (run.readings.value[index] ?? NaN) : NaN;

/** Time of the reading in use; null: the point never spoke. */
export const timeOf = (run: Run, index: number): number | null => run.readings.at[index] || null;

/** Time of the newest reading, plausible or not; null: the point never spoke. */
export const lastTimeOf = (run: Run, index: number): number | null => run.readings.lastAt[index] || null;

/** Each point with its reading, as they are parked. */
export const withReadings = (points: readonly PointMemory[], readings: Readings): ParkedPoint[] =>
  points.map((point, index) => ({
    ...point,
    reading: {
      value: readings.value[index] ?? 0,
      at: readings.at[index] ?? 0,
      lastAt: readings.lastAt[index] ?? 0,
      sameSince: readings.sameSince[index] ?? 0,
    },
  }));

/** The other way round. */
export function inLists(parked: readonly ParkedPoint[]): { points: PointMemory[]; readings: Readings } {
  const readings: Readings = { value: [], at: [], lastAt: [], sameSince: [] };
  const points = parked.map(({ reading, ...point }, index) => {
    putReading(readings, index, reading);
    return point;
  });
  return { points, readings };
}
