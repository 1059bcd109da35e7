/** Where steps of a roll-up do not tell enough of time at temperature, and their readings have to be looked at. */
import { type HeatStep, SILENCE_MS } from './hot-spells';
import type { Extent } from './series';

/**
 * A roll-up knows in which five minutes a probe was hot, and a rule's hours go from reading to reading: so where a spell may
 * begin or end, which is where a step lies otherwise to one of the lines than the one beside it, or where the probe may have
 * been silent, the readings themselves are asked for. Within a spell they would only say the same.
 * @param steps of one length, in order of time, each with the bounds of its step
 * @param lines °C, ascending
 * @returns the spans of such steps, neighbours joined
 */
export function unsureSpans(steps: readonly HeatStep[], lines: readonly number[]): Extent[] {
  const sideOf = (celsius: number) =>
    lines.reduce((sum, line) => sum + (celsius > line ? 2 : celsius === line ? 1 : 0), 0);
  const sides = steps.map(({ least, greatest }) => [sideOf(least), sideOf(greatest)] as const);
  const isUnlike = (one: number, other: number): boolean => {
    const [a, b, from, to] = [sides[one], sides[other], steps[one], steps[other]];
    if (a === undefined || b === undefined || from === undefined || to === undefined) return true;
    // from the first reading of the one to the last of the other at the most
    return a[0] !== b[0] || a[1] !== b[1] || to.to - from.from > SILENCE_MS;
  };
  const spans: Extent[] = [];
  let wasUnsure = false;
  steps.forEach((step, place) => {
    const [least, greatest] = sides[place] ?? [0, 0];
    const isUnsure = least !== greatest || isUnlike(place - 1, place) || isUnlike(place, place + 1);
    const last = spans.at(-1);
    if (isUnsure && wasUnsure && last !== undefined) last.to = step.to;
    else if (isUnsure) spans.push({ from: step.from, to: step.to });
    wasUnsure = isUnsure;
  });
  return spans;
}

/**
 * The steps with those within the spans put in place by their readings, each a step of its own.
 * @param readings °C, ascending
 */
export function withReadings(
  steps: readonly HeatStep[],
  spans: readonly Extent[],
  readings: readonly { at: number; value: number }[],
): HeatStep[] {
  const single = readings.map(({ at, value }) => ({ from: at, to: at, least: value, greatest: value }));
  let next = 0;
  const kept = steps.filter((step) => {
    while (next < spans.length && (spans[next]?.to ?? Infinity) <= step.from) next += 1;
    return step.from < (spans[next]?.from ?? Infinity);
  });
  return [...kept, ...single].sort((a, b) => a.from - b.from);
}
