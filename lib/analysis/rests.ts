/**
 * The rests of a source: the times between two draws in which its base comes back, each with its curve. A rest begins when
 * the last of the source's channels stops, and ends when one runs again; why the draw ended does not matter to the heap.
 */
import type { NightRecovery } from './nights';
import { LEAST_TAUS, pooledRecovery } from './recovery';
import { type Drift, fitCurve, LEAST_READINGS } from './rest-curve';
import type { RestFit, RestWhy } from './rest-fit';
import { round } from './rounding';
import { runsOf } from './runs';
import type { Extent, Reading, Series } from './series';
import type { Span } from './spans';
import { t95 } from './student';

/** Longest part of a rest that is looked at: later the heap's own day is what is seen. */
const LONGEST_MS = 4 * 3_600_000;
/** By then all but a hundredth has come back; what follows only adds the core's wandering. */
const ENOUGH_TAUS = 5;
const HOUR_S = 3600;
/** K/h by which a level may drift where no core tells, and beyond what a core tells: the core's probe is not the whole heap. */
const DRIFT_UNKNOWN_SD = 0.3;
const DRIFT_KNOWN_SD = 0.05;
const DRIFT_SHARE_SD = 0.1;

/**
 * @param spans of each of the source's channels over the extent
 * @returns a fit, or why there is none, for each rest that begins in the extent; cut off at its end
 */
export function restsOf(
  spans: readonly (readonly Span[])[],
  base: Series,
  core: Series | null,
  extent: Extent,
): RestFit[] {
  return pausesOf(spans, extent).map((pause) => fitRest(pause, base, core));
}

/** Times after a run in which no channel ran. What stood still already at the beginning follows no draw that is seen. */
function pausesOf(spans: readonly (readonly Span[])[], extent: Extent): Extent[] {
  const runs = spans.flatMap((one) => runsOf(one)).sort((a, b) => a.from - b.from);
  const pauses: Extent[] = [];
  let reached: number | null = null;
  for (const run of [...runs, { from: extent.to, to: extent.to }]) {
    if (reached !== null && run.from > reached) pauses.push({ from: reached, to: run.from });
    reached = Math.max(reached ?? run.to, run.to);
  }
  return pauses;
}

function fitRest(pause: Extent, base: Series, core: Series | null): RestFit {
  const whole = { from: pause.from, to: Math.min(pause.to, pause.from + LONGEST_MS) };
  const no = (why: RestWhy): RestFit => ({ ...pause, why });
  const seen = within(base, whole);
  if (seen.length < LEAST_READINGS)
    return no(within(base, pause).length === 0 ? 'not-read' : 'too-few-readings');
  if (isBroken(seen, whole.from, base.holdS)) return no('not-read');
  const drift = driftOf(core, whole);
  let curve = fitCurve(seen, whole.from, drift);
  const enough =
    curve === null || curve.rate <= 0 ? Infinity : whole.from + (ENOUGH_TAUS / curve.rate) * 1000;
  const early = seen.filter(({ at }) => at <= enough);
  if (early.length < seen.length && early.length >= LEAST_READINGS)
    curve = fitCurve(early, whole.from, driftOf(core, { from: whole.from, to: enough }));
  if (curve === null) return no('too-few-readings');
  const used = early.length >= LEAST_READINGS ? early : seen;
  const lengthS = ((used.at(-1)?.at ?? whole.from) - whole.from) / 1000;
  const { rate, rateSd, rateLow, rateHigh, level, depth } = curve;
  if (!Number.isFinite(rateSd)) return no('no-return');
  const known = {
    rate: figures(rate),
    rateSd: figures(rateSd),
    lengthS: round(lengthS, 1),
    points: used.length,
    rms: round(curve.rms, 4),
  };
  if (level === null || depth === null || rateLow <= 0 || lengthS * rate < LEAST_TAUS)
    return { ...no('too-short'), ...known };
  if (depth.value < t95(Math.max(1, used.length - 3)) * depth.sd) return no('no-return');
  return {
    ...pause,
    ...known,
    start: round(curve.start, 3),
    tau: round(1 / rate, 1),
    tauSd: round(rateSd / rate ** 2, 1),
    tauLow: round(1 / rateHigh, 1),
    tauHigh: round(1 / rateLow, 1),
    level: round(level.value, 3),
    levelSd: round(level.sd, 3),
  };
}

/** Six figures: a rate is a small number, and rounding must not be seen in what is pooled from it. */
const figures = (value: number) => Number(value.toPrecision(6));
function within(series: Series, { from, to }: Extent): Reading[] {
  return series.good.filter(({ at }) => at >= from && at < to);
}

/** A curve over a silence of the base would be drawn by its ends alone. */
function isBroken(readings: readonly Reading[], fromMs: number, holdS: number): boolean {
  return readings.some(({ at }, i) => at - (readings[i - 1]?.at ?? fromMs) > holdS * 1000);
}

/** How the level drifts, by a straight line through the core's readings. */
function driftOf(core: Series | null, extent: Extent): Drift {
  const readings = core === null ? [] : within(core, extent);
  const unknown = { perS: 0, sd: DRIFT_UNKNOWN_SD / HOUR_S };
  if (readings.length < LEAST_READINGS) return unknown;
  const n = readings.length;
  const meanT = readings.reduce((sum, { at }) => sum + (at - extent.from) / 1000, 0) / n;
  const meanY = readings.reduce((sum, { value }) => sum + value, 0) / n;
  let [tt, ty, yy] = [0, 0, 0];
  for (const { at, value } of readings) {
    const [t, y] = [(at - extent.from) / 1000 - meanT, value - meanY];
    tt += t * t;
    ty += t * y;
    yy += y * y;
  }
  if (tt === 0) return unknown;
  const perS = ty / tt;
  const lineSd = Math.sqrt(Math.max(0, yy - perS * ty) / Math.max(1, n - 2) / tt);
  return { perS, sd: Math.hypot(lineSd, DRIFT_KNOWN_SD / HOUR_S, DRIFT_SHARE_SD * perS) };
}

/** A night's rests taken together; null where their time constant cannot be told. */
export function nightRecovery(rests: readonly RestFit[]): NightRecovery | null {
  const pooled = pooledRecovery(rests);
  if (pooled === null) return null;
  return {
    tau: round(pooled.tau.value, 0),
    tauSd: round(pooled.tau.sd, 0),
    level: round(pooled.level.value, 2),
    levelSd: round(pooled.level.sd, 2),
    rests: pooled.rests,
  };
}
