/** Whether a heap comes back more slowly from its draws than it did, from a fit a week. */

export interface WeekOfRests {
  /** Middle of the week, epoch ms. */
  at: number;
  /** Time constant, s, and its standard deviation. */
  tauS: number;
  tauSdS: number;
}

export interface Slower {
  /** Epoch ms of the last week. */
  at: number;
  body: { fromS: number; toS: number; sdS: number; weeks: number };
}

const LEAST_WEEKS = 3;
const LEAST_SHARE = 0.15;

/**
 * Weighted straight line through the weeks (each by 1/sd², the slope's sd widened where the weeks scatter more than their
 * own sd says). Slower where the line rises by over two of its sd and by over 15 %: under that nobody would feel it.
 * @returns null where it does not, or under three weeks
 */
export function recoverySlower(weeks: readonly WeekOfRests[]): Slower | null {
  const fit = weeks.filter((week) => week.tauSdS > 0 && week.tauS > 0).toSorted((a, b) => a.at - b.at);
  const [first, last] = [fit[0], fit.at(-1)];
  if (first === undefined || last === undefined || fit.length < LEAST_WEEKS) return null;
  const weightOf = (week: WeekOfRests) => 1 / week.tauSdS ** 2;
  const sum = (of: (week: WeekOfRests) => number) => fit.reduce((total, week) => total + of(week), 0);
  const all = sum(weightOf);
  const midAt = sum((week) => weightOf(week) * week.at) / all;
  const midTau = sum((week) => weightOf(week) * week.tauS) / all;
  const spread = sum((week) => weightOf(week) * (week.at - midAt) ** 2);
  if (!(spread > 0)) return null;
  const slope = sum((week) => weightOf(week) * (week.at - midAt) * (week.tauS - midTau)) / spread;
  const chi2 = sum((week) => weightOf(week) * (week.tauS - midTau - slope * (week.at - midAt)) ** 2);
  const widening = Math.sqrt(Math.max(1, chi2 / (fit.length - 2)));
  const span = last.at - first.at;
  const sdS = (widening / Math.sqrt(spread)) * span;
  const fromS = midTau + slope * (first.at - midAt);
  const toS = midTau + slope * (last.at - midAt);
  if (toS - fromS <= 2 * sdS || toS - fromS <= LEAST_SHARE * fromS) return null;
  return { at: last.at, body: { fromS, toS, sdS, weeks: fit.length } };
}
