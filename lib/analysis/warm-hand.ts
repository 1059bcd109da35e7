/**
 * The warm-hand test: somebody holds one probe, and the point that warms is the one to which it is wired. A hand of 30 °C
 * warms a bare probe by some kelvins in a minute; a house does not warm so, and not one point alone.
 */
import { median } from './median';
import type { Read } from './steadiness';

/** K that a held probe must have risen. */
export const WARM_RISE_K = 3;
/** What the others may do at most, as a share of it: else it was the sun, or two probes lie side by side. */
const ALONE_SHARE = 0.5;

export interface Watched {
  key: string;
  /** Ascending; those before the hold and those since. */
  readings: readonly Read[];
}

export interface Rise {
  key: string;
  /** K over what it read before; null where it sent nothing before or nothing since. */
  rise: number | null;
}

export interface HandFound {
  rises: Rise[];
  /** The one that warmed; null: none yet, or more than one. */
  warmed: string | null;
  /** Others that warmed with it, so that nothing can be told. */
  with: string[];
}

/** By how much each point has risen since the probe was taken into the hand, epoch ms. */
export function warmHand(points: readonly Watched[], since: number): HandFound {
  const rises = points.map(({ key, readings }): Rise => {
    const before = readings.filter((one) => one.at <= since).slice(-3);
    const after = readings.filter((one) => one.at > since);
    if (before.length === 0 || after.length === 0) return { key, rise: null };
    const rest = median(before.map((one) => one.value));
    return { key, rise: Math.max(...after.map((one) => one.value)) - rest };
  });
  const ordered = rises
    .flatMap(({ key, rise }) => (rise === null ? [] : [{ key, rise }]))
    .sort((a, b) => b.rise - a.rise);
  const top = ordered[0];
  if (top === undefined || top.rise < WARM_RISE_K) return { rises, warmed: null, with: [] };
  const beside = ordered.slice(1).filter((one) => one.rise > top.rise * ALONE_SHARE);
  return beside.length === 0
    ? { rises, warmed: top.key, with: [] }
    : { rises, warmed: null, with: [top, ...beside].map((one) => one.key) };
}
