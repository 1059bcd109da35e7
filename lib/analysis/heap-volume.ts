/** How a heap sinks, from how large it was said to be. */

export interface Measured {
  /** Epoch ms */
  at: number;
  volumeM3: number;
}

export interface Shrinkage {
  first: Measured;
  last: Measured;
  /** Share of the first volume that is gone; negative where it has grown. */
  share: number;
  days: number;
  /** Share of what was there that goes in a week, were it steady; null under three days, which say nothing. */
  aWeek: number | null;
  /** What was fed meanwhile makes the heap larger, so it sank by more than is seen. */
  fedMeanwhile: number;
}

const DAY_MS = 86_400_000;

/**
 * @param measured in any order
 * @param fed when it was fed, epoch ms
 * @returns null with fewer than two measurements
 */
export function shrinkage(measured: readonly Measured[], fed: readonly number[]): Shrinkage | null {
  const sorted = measured.filter((one) => one.volumeM3 > 0).toSorted((a, b) => a.at - b.at);
  const [first, last] = [sorted[0], sorted.at(-1)];
  if (first === undefined || last === undefined || first === last) return null;
  const days = (last.at - first.at) / DAY_MS;
  const left = last.volumeM3 / first.volumeM3;
  return {
    ...{ first, last, days },
    share: 1 - left,
    aWeek: days < 3 ? null : 1 - left ** (7 / days),
    // fed on the day of the first measurement is measured with it
    fedMeanwhile: fed.filter((at) => at > first.at && at < last.at).length,
  };
}
