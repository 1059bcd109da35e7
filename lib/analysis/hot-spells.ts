/** Unbroken times over a temperature, from what was measured. A silence of the probe ends one: it is no proof of heat. */

/** What a probe read in one step of time; a single reading is a step as well, that begins and ends with it. */
export interface HeatStep {
  /** Epoch ms of its first and its last reading, or where it is known to lie among others, of its bounds. */
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
 * Spells in which every reading lay from `fromC` up to `toC`, both counted in. A spell goes from reading to reading: what was
 * before its first and after its last is not known.
 * @param steps in order of time
 */
export function spells(
  steps: readonly HeatStep[],
  fromC: number,
  toC = Infinity,
  silenceMs = SILENCE_MS,
): Spell[] {
  return spellsWhere(steps, (step) => step.least >= fromC && step.greatest <= toC, silenceMs);
}

function spellsWhere(
  steps: readonly HeatStep[],
  isIn: (step: HeatStep) => boolean,
  silenceMs = SILENCE_MS,
): Spell[] {
  const found: Spell[] = [];
  let open: Spell | null = null;
  for (const step of steps) {
    const counts = isIn(step);
    if (open !== null && (!counts || step.from - open.to > silenceMs)) open = null;
    if (!counts) continue;
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

/** Hours of all spells over `aboveC`; what was not read is not counted. */
export function hoursAbove(steps: readonly HeatStep[], aboveC: number): number {
  return sumHours(spellsWhere(steps, (step) => step.least > aboveC));
}

/** Hours of all spells at or over `fromC`. */
export function hoursFrom(steps: readonly HeatStep[], fromC: number): number {
  return sumHours(spells(steps, fromC));
}

/** Hours from reading to reading, whatever was read: without the silences of the probe. */
export function hoursRead(steps: readonly HeatStep[]): number {
  return sumHours(spellsWhere(steps, () => true));
}

function sumHours(found: readonly Spell[]): number {
  return found.reduce((sum, spell) => sum + spell.hours, 0);
}

/** The most hours over `aboveC` that any `windowH` hours within the steps hold. */
export function mostHoursAbove(steps: readonly HeatStep[], aboveC: number, windowH: number): number {
  const hot = spellsWhere(steps, (step) => step.least > aboveC);
  const windowMs = windowH * HOUR_MS;
  const within = (from: number) =>
    hot.reduce(
      (sum, one) => sum + Math.max(0, Math.min(one.to, from + windowMs) - Math.max(one.from, from)),
      0,
    );
  // the fullest window begins with a spell or ends with one: moved from there, it gains no more than it loses
  const most = hot.reduce((top, { from, to }) => Math.max(top, within(from), within(to - windowMs)), 0);
  return most / HOUR_MS;
}
