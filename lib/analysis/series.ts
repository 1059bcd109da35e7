/** Readings of one point as a line in time. Values are corrected already, in the point's own unit. */

export interface Reading {
  /** Epoch ms. */
  at: number;
  value: number;
}

export interface Series {
  key: string;
  name: string;
  role: string;
  /** Seconds for which a reading holds if no other follows: beyond, the point is silent. */
  holdS: number;
  /** Deviation of its own constant error, in its unit: by its calibration, or by the class of its sensor. */
  sd: number;
  /** Good readings only, ascending, beginning a little before the span that is asked for. */
  good: Reading[];
}

export interface Extent {
  from: number;
  to: number;
}

/** Spans in which each reading held, cut to [fromMs, toMs), with its value. */
export function holds(series: Series, fromMs: number, toMs: number): (Extent & { value: number })[] {
  return series.good.flatMap((reading, i) => {
    const next = series.good[i + 1]?.at ?? Infinity;
    const from = Math.max(reading.at, fromMs);
    const to = Math.min(next, reading.at + series.holdS * 1000, toMs);
    return to > from ? [{ from, to, value: reading.value }] : [];
  });
}

/** Share of [fromMs, toMs) in which the point had a good reading, 0 to 1; 0 for an empty span. */
export function coverageOf(series: Series, fromMs: number, toMs: number): number {
  if (toMs <= fromMs) return 0;
  return holds(series, fromMs, toMs).reduce((sum, held) => sum + held.to - held.from, 0) / (toMs - fromMs);
}

/** The lowest good reading taken in [fromMs, toMs) over several points, the earliest of equals; null without any. */
export function lowestOf(
  all: readonly Series[],
  fromMs: number,
  toMs: number,
): { point: string; name: string; value: number; at: number } | null {
  let lowest: { point: string; name: string; value: number; at: number } | null = null;
  for (const series of all) {
    for (const { at, value } of series.good) {
      if (at < fromMs || at >= toMs) continue;
      const lower = lowest === null || value < lowest.value || (value === lowest.value && at < lowest.at);
      if (lower) lowest = { point: series.key, name: series.name, value, at };
    }
  }
  return lowest;
}

/** Seconds of [fromMs, toMs) in which the lowest of several points stood under a limit, each reading holding till the next. */
export function secondsUnder(all: readonly Series[], limit: number, fromMs: number, toMs: number): number {
  // the lowest is under the limit exactly while any is
  const under = all.flatMap((series) => holds(series, fromMs, toMs).filter((held) => held.value < limit));
  return unionMs(under) / 1000;
}

/** ms that the extents cover together; sorts them. */
export function unionMs(extents: Extent[]): number {
  let sum = 0;
  let reached = -Infinity;
  for (const { from, to } of extents.sort((a, b) => a.from - b.from)) {
    if (to <= reached) continue;
    sum += to - Math.max(from, reached);
    reached = to;
  }
  return sum;
}

/** The good reading nearest an instant, if it is within the time a reading holds; else null. */
export function nearest(series: Series, atMs: number): Reading | null {
  let best: Reading | null = null;
  for (const reading of series.good)
    if (best === null || Math.abs(reading.at - atMs) < Math.abs(best.at - atMs)) best = reading;
  return best !== null && Math.abs(best.at - atMs) <= series.holdS * 1000 ? best : null;
}

/**
 * Value at an instant on the straight line between the readings about it; null outside them, or in a gap that is longer
 * than a reading holds. Asked with instants that only grow.
 */
export function liner(series: Series): (atMs: number) => number | null {
  const { good, holdS } = series;
  let next = 0;
  return (atMs) => {
    while (next < good.length && (good[next]?.at ?? Infinity) <= atMs) next += 1;
    const before = good[next - 1];
    const after = good[next];
    if (before === undefined) return null;
    if (before.at === atMs) return before.value;
    if (after === undefined || after.at - before.at > holdS * 1000) return null;
    return before.value + ((after.value - before.value) * (atMs - before.at)) / (after.at - before.at);
  };
}
