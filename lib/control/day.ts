/** On time of a source's channels over the rolling 24 h: two fans count twice. Milliseconds. */
import type { SourceMemory } from './memory';

const DAY_MS = 86_400_000;
/** Spans kept; over it the two oldest become one of the same content, so a flapping load cannot swell the memory. */
const SPANS = 500;

/** Channel-milliseconds on in the 24 h up to `at`. */
export function usedMs(memory: SourceMemory, at: number): number {
  const { day } = memory;
  if (day.nextAt !== null && at > day.nextAt) return reckon(memory.spans, at);
  return day.usedMs + day.slope * (at - day.at);
}

/** Notes how many channels draw from `at` on, and keeps the sum at hand. */
export function settleDay(memory: SourceMemory, draws: number, at: number): SourceMemory {
  const { day } = memory;
  if (draws === memory.draws && (day.nextAt === null || at < day.nextAt)) return memory;
  const spans = memory.spans.filter(([, to]) => to === null || to > at - DAY_MS);
  if (draws !== memory.draws) {
    const last = spans.at(-1);
    if (last !== undefined && last[1] === null) spans[spans.length - 1] = [last[0], at, last[2]];
    if (draws > 0) spans.push([at, null, draws]);
    merge(spans);
  }
  return { ...memory, draws, spans, day: dayOf(spans, draws, at) };
}

/** Draws that were told afterwards, over by `at`, as [from, to, channels]: where they overlap others, both count. */
export function addSpans(memory: SourceMemory, told: SourceMemory['spans'], at: number): SourceMemory {
  // the one that goes on stays last: settleDay ends it there
  const spans = [...memory.spans, ...told].sort(
    (one, other) => Number(one[1] === null) - Number(other[1] === null) || one[0] - other[0],
  );
  while (spans.length > SPANS && merge(spans));
  return { ...memory, spans, day: dayOf(spans, memory.draws, at) };
}

function dayOf(spans: SourceMemory['spans'], draws: number, at: number): SourceMemory['day'] {
  let nextAt = Infinity;
  let leaving = 0;
  for (const [from, to, channels] of spans) {
    if (from <= at - DAY_MS && (to ?? at) > at - DAY_MS) leaving += channels;
    // a span's end comes after its beginning, so only the first of the two that is still to come counts
    const enters = from + DAY_MS;
    const edge = enters > at ? enters : to === null ? Infinity : to + DAY_MS;
    if (edge > at && edge < nextAt) nextAt = edge;
  }
  return {
    usedMs: reckon(spans, at),
    at,
    slope: draws - leaving,
    nextAt: nextAt === Infinity ? null : nextAt,
  };
}

function reckon(spans: SourceMemory['spans'], at: number): number {
  let sum = 0;
  for (const [from, to, channels] of spans) {
    const length = Math.min(to ?? at, at) - Math.max(from, at - DAY_MS);
    if (length > 0) sum += length * channels;
  }
  return sum;
}

function merge(spans: SourceMemory['spans']): boolean {
  const [first, second] = spans;
  if (spans.length <= SPANS || first === undefined || second === undefined) return false;
  if (first[1] === null || second[1] === null) return false;
  const content = (first[1] - first[0]) * first[2] + (second[1] - second[0]) * second[2];
  spans.splice(0, 2, [first[0], second[1], content / (second[1] - first[0])]);
  return true;
}
