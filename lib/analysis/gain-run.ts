/** What a draw brought in a run that was made to find out: return minus intake at its end. */
import type { Reading } from './series';

export interface LoopEnd {
  /** Good readings, ascending, °C. */
  readings: readonly Reading[];
  /** Deviation of the probe's own constant error, K. */
  sd: number;
}

export interface RunGain {
  /** Return minus intake, K. */
  kelvin: number;
  /** Of both probes' constant errors and of how the readings scatter, together. */
  sd: number;
}

/** The share of the run, at its end, that counts: before it the pipe's own air and wall are what comes back. */
const LAST_SHARE = 1 / 3;
/** Readings of the two ends this far apart still speak of one time. */
const TOGETHER_MS = 60_000;

/**
 * Mean of return minus intake over the last third of a run. Each return reading is held against the intake's nearest in
 * time; ± is √(sd² of the one probe + sd² of the other + scatter² ÷ pairs) (errors that do not hang together add by their
 * squares: JCGM 100, GUM).
 * @param from,to when the load ran, epoch ms
 * @returns null where no two readings of both ends fall into it
 */
export function gainOfRun(intake: LoopEnd, back: LoopEnd, from: number, to: number): RunGain | null {
  const since = to - (to - from) * LAST_SHARE;
  const pairs = back.readings
    .filter(({ at }) => at >= since && at <= to)
    .flatMap(({ at, value }) => {
      const beside = nearest(intake.readings, at, from, to);
      return beside === null ? [] : [value - beside.value];
    });
  if (pairs.length === 0) return null;
  const mean = pairs.reduce((sum, one) => sum + one, 0) / pairs.length;
  const scatter =
    pairs.length === 1 ? 0 : pairs.reduce((sum, one) => sum + (one - mean) ** 2, 0) / (pairs.length - 1);
  return { kelvin: mean, sd: Math.sqrt(intake.sd ** 2 + back.sd ** 2 + scatter / pairs.length) };
}

function nearest(readings: readonly Reading[], at: number, from: number, to: number): Reading | null {
  let best: Reading | null = null;
  for (const one of readings) {
    if (one.at < from || one.at > to || Math.abs(one.at - at) > TOGETHER_MS) continue;
    if (best === null || Math.abs(one.at - at) < Math.abs(best.at - at)) best = one;
  }
  return best;
}
