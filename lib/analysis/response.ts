/**
 * How a point answers a load that is switched on: as a first-order lag, with a time constant τ and a rise.
 *
 * Before a start the point makes its way to where it would stay with the load off; from the start on to a place higher by
 * the rise. With g(t) = 1 − e^(−t/τ), t from the start, that is T = a + b·g before it and T = a + (b + rise)·g after it:
 * for a given τ a linear fit, with a and b of each start and one rise for all. Of a grid of τ the one with the least
 * error is taken. Short runs say little of rise and τ apart, but much of rise ÷ τ, which is what a prediction of starts
 * needs. Weather that changes within a start counts as error.
 * (First-order lag under two-position control: any textbook on process control.)
 */
import { stepsWithin, type LoadRun, type Stepped } from './runs';

/** Looked at before a start, for the slope, and after it. */
const BEFORE_MS = 30 * 60_000;
const AFTER_MS = 90 * 60_000;
const LEAST_RUN_MS = 8 * 60_000;
const LEAST_STARTS = 6;
const LEAST_STEPS = 4;
const TAU_S = { least: 300, most: 12 * 3600, steps: 90 };
/** Of the measured rises' spread that the fit may leave unsaid before it counts as not known. */
const MOST_LEFT = 0.5;

/** T against t, from before a start to after it; s from the start, °C. */
type Start = { afterS: number; value: number }[];

/**
 * @param runs of the channel, ascending
 * @param point what the rule goes by, °C; the shorter its steps, the better a start is seen
 * @returns time constant, s, and rise, K; null where too few starts stood alone, or the point hardly answers
 */
export function responseOf(
  runs: readonly LoadRun[],
  point: Stepped,
  isDark: (at: number) => boolean,
): { tauS: number; riseK: number } | null {
  const starts = runs.flatMap((run) => {
    const start = startOf(run, point, isDark);
    return start === null ? [] : [start];
  });
  if (starts.length < LEAST_STARTS) return null;
  let best: Fit & { tauS: number } = { tauS: 0, riseK: 0, left: Infinity, without: 0 };
  for (let step = 0; step <= TAU_S.steps; step += 1) {
    const tauS = TAU_S.least * (TAU_S.most / TAU_S.least) ** (step / TAU_S.steps);
    const fit = fitRise(starts, tauS);
    if (fit.left < best.left) best = { tauS, ...fit };
  }
  const { tauS, riseK, left, without } = best;
  return riseK > 0 && left <= MOST_LEFT * without ? { tauS, riseK } : null;
}

interface Fit {
  riseK: number;
  /** Sum of squares that stays, and that would stay without any rise. */
  left: number;
  without: number;
}

/** One rise for all starts: what a and b of each start can say is taken out first (partial regression). */
function fitRise(starts: readonly Start[], tauS: number): Fit {
  let [sumGY, sumGG, sumYY] = [0, 0, 0];
  for (const start of starts) {
    const x = start.map((one) => 1 - Math.exp(-one.afterS / tauS));
    const answer = withoutLine(
      x,
      x.map((g, place) => ((start[place]?.afterS ?? 0) > 0 ? g : 0)),
    );
    const value = withoutLine(
      x,
      start.map((one) => one.value),
    );
    answer.forEach((g, place) => {
      const y = value[place] ?? 0;
      sumGY += g * y;
      sumGG += g * g;
      sumYY += y * y;
    });
  }
  const riseK = sumGG === 0 ? 0 : sumGY / sumGG;
  return { riseK, left: sumYY - riseK * sumGY, without: sumYY };
}

/** What of `y` no straight line over `x` says. */
function withoutLine(x: readonly number[], y: readonly number[]): number[] {
  const mean = (of: readonly number[]) => of.reduce((sum, one) => sum + one, 0) / of.length;
  const [midX, midY] = [mean(x), mean(y)];
  let [sumXY, sumXX] = [0, 0];
  x.forEach((one, place) => {
    sumXY += (one - midX) * ((y[place] ?? 0) - midY);
    sumXX += (one - midX) ** 2;
  });
  const slope = sumXX === 0 ? 0 : sumXY / sumXX;
  return y.map((one, place) => one - midY - slope * ((x[place] ?? 0) - midX));
}

/** Null for a start that did not stand alone: too soon after a run, too short, by day, or with readings missing. */
function startOf(run: LoadRun, point: Stepped, isDark: (at: number) => boolean): Start | null {
  const to = Math.min(run.to, run.from + AFTER_MS);
  if (to - run.from < LEAST_RUN_MS || run.stoodS === null || run.stoodS * 1000 < BEFORE_MS) return null;
  if (!isDark(run.from - BEFORE_MS) || !isDark(to)) return null;
  const before = stepsWithin(point, run.from - BEFORE_MS, run.from);
  const after = stepsWithin(point, run.from, to);
  if (before.length < LEAST_STEPS || after.length < LEAST_STEPS) return null;
  return [...before, ...after].map((one) => ({ afterS: (one.at - run.from) / 1000, value: one.value }));
}
