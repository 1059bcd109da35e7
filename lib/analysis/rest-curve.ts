/**
 * One rest's curve. A base that was cooled by a draw comes back towards its surroundings, and these may themselves warm or
 * cool while it does. With the rate k = 1/τ and φ(t) = (1 − e^(−k t)) / k,
 *
 *   T(t) = T_0 + m φ(t) + s (t − φ(t)),
 *
 * T_0 being the temperature at the end of the draw, m the slope at first, s the drift of the level L = T_0 + m τ. T_0, m and s
 * enter straight, so for each k they follow by linear least squares, and one search over k is left (variable projection,
 * Golub and Pereyra 1973). The drift is known beforehand from the core's own line, within a deviation: without it a core that
 * warms by 0.3 K an hour makes τ some 10 % too long, with an interval that does not know; left wholly free it would swallow
 * short rests.
 *
 * The rate, not τ, is what is looked for: a rest that is a straight line has the rate 0, a finite figure with a symmetric
 * interval, which can be pooled with others; as a time constant it would be infinite, and leaving it out would make the
 * rest of them too quick.
 *
 * The interval is the profile's: all rates whose sum of squares is not worse than the best by more than t² deviations.
 * Readings whose errors follow each other (a probe of coarse steps near its level) tell less than their number says: where
 * they do, the limit is widened by how much less.
 */
import { inverse, normal } from './linear';
import { excess, stepNoise } from './reading-noise';
import type { Reading } from './series';
import { t95 } from './student';

export interface Drift {
  /** K/s of the level, and its deviation. */
  perS: number;
  sd: number;
}

export interface Curve {
  /** 1/s; nothing or less where the readings are straight, or bend the other way. */
  rate: number;
  /** Of the profile: half its width ÷ t. */
  rateSd: number;
  rateLow: number;
  rateHigh: number;
  /** °C at the end of the draw. */
  start: number;
  /** °C where it was heading then, and K that the draw took; null without a rate. */
  level: { value: number; sd: number } | null;
  depth: { value: number; sd: number } | null;
  rms: number;
}

/** Time is counted in lengths of the rest from here on, so that the equations are well scaled. */
interface Problem {
  t: number[];
  y: number[];
  driftK: number;
  /** Weight of what is known of the drift: noise ÷ its deviation, both K. */
  weight: number;
}

interface Fit {
  rate: number;
  rss: number;
  /** T_0, slope at first, drift: K, K a length. */
  linear: readonly [number, number, number];
}

/** Rates looked for, in 1/lengths: beyond, a curve is a step, or bends so far the other way that it is none of a rest. */
const RATES = [
  -3, -2, -1.2, -0.6, -0.2, 0.1, 0.3, 0.5, 0.8, 1.2, 1.7, 2.4, 3.3, 4.5, 6.2, 8.5, 12, 17, 24, 34, 48, 70,
  100,
];
export const LEAST_READINGS = 4;

/** @returns null under four readings, or where they have no spread in time */
export function fitCurve(readings: readonly Reading[], fromMs: number, drift: Drift): Curve | null {
  const lengthS = ((readings.at(-1)?.at ?? fromMs) - fromMs) / 1000;
  if (readings.length < LEAST_READINGS || !(lengthS > 0)) return null;
  const t = readings.map(({ at }) => (at - fromMs) / 1000 / lengthS);
  const y = readings.map(({ value }) => value);
  const freedom = y.length - 3;
  const prior = { t, y, driftK: drift.perS * lengthS };
  const driftSdK = Math.max(drift.sd * lengthS, 1e-9);
  const first = search({ ...prior, weight: stepNoise(y) / driftSdK });
  // the drift's weight wants the noise, which is known once a curve is laid
  const problem = { ...prior, weight: Math.sqrt(first.rss / freedom + 1e-12) / driftSdK };
  const best = search(problem);
  const errors = errorsOf(problem, best);
  const variance = Math.max(best.rss / freedom, 1e-12) * excess(errors);
  const deviations = t95(freedom);
  const limit = best.rss + deviations ** 2 * variance;
  const [low, high] = [edge(problem, best, -1, limit), edge(problem, best, 1, limit)];
  return {
    rate: best.rate / lengthS,
    rateSd: (high - low) / (2 * deviations) / lengthS,
    rateLow: low / lengthS,
    rateHigh: high / lengthS,
    start: best.linear[0],
    ...heading(problem, best, variance),
    rms: Math.sqrt(errors.reduce((sum, error) => sum + error * error, 0) / errors.length),
  };
}

/** φ, and how it changes with the rate; by its series where k t is small and the quotient would lose its digits. */
function phi(t: number, rate: number): [value: number, slope: number] {
  const x = rate * t;
  if (Math.abs(x) < 1e-4) return [t * (1 - x / 2), -t * t * (0.5 - x / 3)];
  const left = Math.exp(-x);
  return [(1 - left) / rate, (t * left - (1 - left) / rate) / rate];
}

function fitAt({ t, y, driftK, weight }: Problem, rate: number): Fit {
  const known = weight * weight;
  const origin = y[0] ?? 0;
  // sums of the normal equations, written out: this runs some eighty times a rest, over all of its readings
  let [b, c, bb, bc, cc] = [0, 0, 0, 0, known];
  let [r, br, cr, rr] = [0, 0, known * driftK, known * driftK * driftK];
  for (let i = 0; i < t.length; i += 1) {
    const at = t[i] ?? 0;
    const x = rate * at;
    const p = Math.abs(x) < 1e-4 ? at * (1 - x / 2) : (1 - Math.exp(-x)) / rate;
    const q = at - p;
    const v = (y[i] ?? 0) - origin;
    b += p;
    c += q;
    bb += p * p;
    bc += p * q;
    cc += q * q;
    r += v;
    br += p * v;
    cr += q * v;
    rr += v * v;
  }
  const n = t.length;
  // elimination of a symmetric system of three
  const [bb1, bc1, cc1] = [bb - (b * b) / n, bc - (b * c) / n, cc - (c * c) / n];
  const [br1, cr1] = [br - (b * r) / n, cr - (c * r) / n];
  const s = (cr1 - (bc1 * br1) / bb1) / (cc1 - (bc1 * bc1) / bb1);
  const m = (br1 - bc1 * s) / bb1;
  const start = (r - b * m - c * s) / n;
  const rss = rr - start * r - m * br - s * cr;
  return { rate, rss: Number.isFinite(rss) ? Math.max(0, rss) : Infinity, linear: [start + origin, m, s] };
}

const GOLDEN = (Math.sqrt(5) - 1) / 2;

/** The best over a grid, then closed in on by the golden section. */
function search(problem: Problem): Fit {
  const fits = RATES.map((rate) => fitAt(problem, rate));
  const place = fits.reduce((least, fit, i) => (fit.rss < (fits[least]?.rss ?? Infinity) ? i : least), 0);
  const at = (i: number) => RATES[Math.min(RATES.length - 1, Math.max(0, i))] ?? 0;
  let [low, high] = [at(place - 1), at(place + 1)];
  const near = 1e-4 * Math.max(0.1, high - low);
  let a = fitAt(problem, high - GOLDEN * (high - low));
  let b = fitAt(problem, low + GOLDEN * (high - low));
  while (high - low > near) {
    if (a.rss < b.rss) {
      [high, b] = [b.rate, a];
      a = fitAt(problem, high - GOLDEN * (high - low));
    } else {
      [low, a] = [a.rate, b];
      b = fitAt(problem, low + GOLDEN * (high - low));
    }
  }
  return a.rss < b.rss ? a : b;
}

/** Rate at which the sum of squares passes the limit, on one side of the best; infinite where it never does. */
function edge(problem: Problem, best: Fit, side: -1 | 1, limit: number): number {
  const [least, most] = [RATES[0] ?? 0, RATES.at(-1) ?? 0];
  let inner = best.rate;
  let step = 0.01 + 0.01 * Math.abs(best.rate);
  for (;;) {
    const outer = inner + side * step;
    if (outer < least || outer > most) return side * Infinity;
    if (fitAt(problem, outer).rss > limit) {
      let [a, b] = [inner, outer];
      while (Math.abs(b - a) > 1e-4 * Math.max(0.1, Math.abs(b))) {
        const middle = (a + b) / 2;
        if (fitAt(problem, middle).rss > limit) b = middle;
        else a = middle;
      }
      return (a + b) / 2;
    }
    inner = outer;
    step *= 1.5;
  }
}

function errorsOf({ t, y }: Problem, { rate, linear: [start, m, s] }: Fit): number[] {
  return t.map((at, i) => {
    const [p] = phi(at, rate);
    return (y[i] ?? 0) - (start + m * p + s * (at - p));
  });
}

/** Level and depth with their deviations, by the linear part of how they follow from T_0, m, drift and rate. */
function heading(problem: Problem, best: Fit, variance: number): Pick<Curve, 'level' | 'depth'> {
  const { rate, linear } = best;
  const [start, m, s] = linear;
  if (rate <= 0) return { level: null, depth: null };
  const rows = problem.t.map((at) => {
    const [p, slope] = phi(at, rate);
    return [1, p, at - p, (m - s) * slope];
  });
  const covariance = inverse(normal([...rows, [0, 0, problem.weight, 0]]));
  if (covariance === null) return { level: null, depth: null };
  const sdOf = (by: readonly number[]) => {
    const sum = by.reduce(
      (all, one, i) => all + by.reduce((row, two, j) => row + one * two * (covariance[i]?.[j] ?? 0), 0),
      0,
    );
    return Math.sqrt(Math.max(0, sum * variance));
  };
  const depth = [0, 1 / rate, 0, -m / rate ** 2];
  return {
    level: { value: start + m / rate, sd: sdOf([1, ...depth.slice(1)]) },
    depth: { value: m / rate, sd: sdOf(depth) },
  };
}
