/** Whether a probe that lies in a bath has come to rest there: only then does its mean say what it reads. */
import { lineThrough } from './line';

export interface Read {
  /** Epoch ms. */
  at: number;
  value: number;
}

export interface Steadiness {
  readings: number;
  /** Seconds from the first of them to the last. */
  seconds: number;
  mean: number | null;
  /** Of one reading about their mean. */
  sd: number | null;
  /** By how much the line through them rises from the first to the last. */
  change: number | null;
  isSteady: boolean;
  why: 'silent' | 'few' | 'moving' | 'scattered' | null;
}

const LEAST_READINGS = 5;
const LEAST_S = 120;
/** K. A one-wire probe steps by 0.0625 K, so two of its steps. */
const MOST_CHANGE_K = 0.125;
const MOST_SD_K = 0.1;

/**
 * @param readings of the last minutes, ascending
 * @param silentAfterS without a reading for so long before `now`, nothing is told
 */
export function steadiness(readings: readonly Read[], now: number, silentAfterS: number): Steadiness {
  const [first, last] = [readings[0], readings.at(-1)];
  const none = { mean: null, sd: null, change: null, isSteady: false };
  if (first === undefined || last === undefined || now - last.at > silentAfterS * 1000)
    return { readings: 0, seconds: 0, ...none, why: 'silent' };
  const seconds = (last.at - first.at) / 1000;
  const count = readings.length;
  const mean = readings.reduce((sum, one) => sum + one.value, 0) / count;
  if (count < 3) return { readings: count, seconds, ...none, mean, why: 'few' };
  const sd = Math.sqrt(readings.reduce((sum, one) => sum + (one.value - mean) ** 2, 0) / (count - 1));
  const line = lineThrough(readings.map((one) => ({ x: (one.at - first.at) / 1000, y: one.value })));
  const change = line === null ? 0 : line.slope * seconds;
  const why =
    count < LEAST_READINGS || seconds < LEAST_S
      ? 'few'
      : Math.abs(change) > MOST_CHANGE_K
        ? 'moving'
        : sd > MOST_SD_K
          ? 'scattered'
          : null;
  return { readings: count, seconds, mean, sd, change, isSteady: why === null, why };
}
