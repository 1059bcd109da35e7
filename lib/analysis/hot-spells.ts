/** Unbroken times over a temperature, from what was measured. A silence of the probe ends one: it is no proof of heat. */

/** What a probe read in one step of time. */
export interface HeatStep {
  /** Epoch ms, and to where the step reaches. */
  from: number;
  to: number;
  /** °C */
  least: number;
  greatest: number;
}

export interface Spell {
  from: number;
  to: number;
  /** h from the first to the last of it. */
  hours: number;
  /** The coldest that was read in it, °C, unrounded: 54.99 is under 55. */
  leastC: number;
}

const HOUR_MS = 3_600_000;
/** A quarter of an hour between two readings is a slow probe; more is silence. */
export const SILENCE_MS = 15 * 60_000;

/**
 * Spells in which every reading lay from `fromC` up to `toC`, both counted in.
 * @param steps in order of time
 */
export function spells(
  steps: readonly HeatStep[],
  fromC: number,
  toC = Infinity,
  silenceMs = SILENCE_MS,
): Spell[] {
  const found: Spell[] = [];
  let open: Spell | null = null;
  for (const step of steps) {
    const isIn = step.least >= fromC && step.greatest <= toC;
    if (open !== null && (!isIn || step.from - open.to > silenceMs)) open = null;
    if (!isIn) continue;
    if (open === null) {
      open = { from: step.from, to: step.to, hours: 0, leastC: step.least };
      found.push(open);
    }
    open.to = Math.max(open.to, step.to);
    open.leastC = Math.min(open.leastC, step.least);
    open.hours = (open.to - open.from) / HOUR_MS;
  }
  return found;
}

export function longest(found: readonly Spell[]): Spell | null {
  return found.reduce<Spell | null>(
    (best, one) => (best === null || one.hours > best.hours ? one : best),
    null,
  );
}

/** Hours of all steps that lie wholly over `aboveC`; what was not read is not counted. */
export function hoursAbove(steps: readonly HeatStep[], aboveC: number): number {
  return sumHours(steps.filter((step) => step.least > aboveC));
}

/** Hours of all steps at or over `fromC`. */
export function hoursFrom(steps: readonly HeatStep[], fromC: number): number {
  return sumHours(steps.filter((step) => step.least >= fromC));
}

function sumHours(steps: readonly HeatStep[]): number {
  return steps.reduce((sum, step) => sum + (step.to - step.from) / HOUR_MS, 0);
}

/** The most hours over `aboveC` that any `windowH` hours within the steps hold. */
export function mostHoursAbove(steps: readonly HeatStep[], aboveC: number, windowH: number): number {
  const hot = steps.filter((step) => step.least > aboveC);
  let [most, sum, first] = [0, 0, 0];
  for (const step of hot) {
    sum += (step.to - step.from) / HOUR_MS;
    for (let oldest = hot[first]; oldest !== undefined && step.to - oldest.from > windowH * HOUR_MS;) {
      sum -= (oldest.to - oldest.from) / HOUR_MS;
      first += 1;
      oldest = hot[first];
    }
    most = Math.max(most, sum);
  }
  return most;
}
