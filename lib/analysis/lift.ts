/**
 * How much warmer than outdoors a point gets at most while a channel runs.
 *
 * A run that its band ended says only that the house could get at least that warm, so it tells nothing of the most. What
 * does tell: the end of a run that something else ended (a rest, a limit, a guard) while the band still wanted it, and a
 * run that has gone on for hours without getting there. Only in the dark: the sun lifts a house by itself.
 */
import { stepsWithin, type LoadRun, type Stepped } from './runs';

/** Of a run's end, and of each hour of a long one. */
const WINDOW_MS = 5 * 60_000;
const LEAST_RUN_MS = 8 * 60_000;
/** From here on a run counts as settled, whatever ends it. */
const LONG_MS = 2 * 3_600_000;
const HOUR_MS = 3_600_000;
const LEAST_SAMPLES = 6;
/** Of the samples in order: "greatest sustained", so that one door left open, or shut, does not set it. */
const SHARE = 0.9;

/**
 * @param runs of the channel, ascending
 * @param point what the rule goes by, °C, with the steps of `outdoors`
 * @returns K; null where fewer than six looks could be taken
 */
export function liftOf(
  runs: readonly LoadRun[],
  point: Stepped,
  outdoors: Stepped,
  isDark: (at: number) => boolean,
): number | null {
  const looks = runs.flatMap((run) => endsOf(run)).filter((end) => isDark(end) && isDark(end - WINDOW_MS));
  const samples = looks.flatMap((end) => {
    const excess = excessOver(point, outdoors, end - WINDOW_MS, end);
    return excess === null ? [] : [excess];
  });
  if (samples.length < LEAST_SAMPLES) return null;
  const sorted = samples.toSorted((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(SHARE * sorted.length))] ?? null;
}

function endsOf(run: LoadRun): number[] {
  const lasted = run.to - run.from;
  const ends: number[] = [];
  for (let after = LONG_MS; after < lasted; after += HOUR_MS) ends.push(run.from + after);
  const wasCutShort = run.endedBy !== null && run.endedBy !== 'idle' && run.endedBy !== 'band';
  if ((wasCutShort && lasted >= LEAST_RUN_MS) || lasted >= LONG_MS) ends.push(run.to);
  return ends;
}

/** Mean difference over the steps that both points have in the window; null where they share none. */
function excessOver(point: Stepped, outdoors: Stepped, from: number, to: number): number | null {
  const cold = new Map(stepsWithin(outdoors, from, to).map((one) => [one.at, one.value]));
  const both = stepsWithin(point, from, to).flatMap((one) => {
    const other = cold.get(one.at);
    return other === undefined ? [] : [one.value - other];
  });
  return both.length === 0 ? null : both.reduce((sum, one) => sum + one, 0) / both.length;
}
