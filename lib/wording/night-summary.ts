/** A noon-to-noon chart in words: what it shows to somebody who does not see it, and the hours behind it as figures. */
import { secondsOf, startsOf, type Span } from '@/lib/analysis/spans';
import { count, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock, day, duration } from '@/lib/units/time';

export interface SummaryLine {
  name: string;
  at: readonly number[];
  value: readonly (number | null)[];
}
export interface SummaryStrip {
  label: string;
  spans: readonly Pick<Span, 'from' | 'to' | 'on' | 'kind'>[];
}
export interface NightFacts {
  night: { from: number; to: number };
  now: number;
  zone: string;
  lines: readonly SummaryLine[];
  strips: readonly SummaryStrip[];
}

/** @example "Noon to noon, 26 Nov to 27 Nov. House air: 11.2 °C at first, 5.7 °C last, lowest 4.0 °C at 02:36. …" */
export function nightSummary(facts: NightFacts, preferences: Preferences): string {
  const { night, zone } = facts;
  const say = (celsius: number) => temperature(celsius, preferences);
  const lines = facts.lines.map((line) => {
    const read = line.at.flatMap((at, place) => {
      const value = line.value[place];
      return value === null || value === undefined ? [] : [{ at, value }];
    });
    const [first, last] = [read[0], read.at(-1)];
    if (first === undefined || last === undefined) return `${line.name}: no reading.`;
    const low = read.reduce((least, one) => (one.value < least.value ? one : least), first);
    return `${line.name}: ${say(first.value)} at first, ${say(last.value)} last, lowest ${say(low.value)} at ${clock(low.at, zone, preferences)}.`;
  });
  const strips = facts.strips.map((strip) => {
    const ran = runOf(strip);
    return ran.seconds === 0
      ? `${strip.label} did not run.`
      : `${strip.label} ran ${duration(ran.seconds)} in ${count(ran.starts, 'start')}.`;
  });
  return [`Noon to noon, ${day(night.from, zone)} to ${day(night.to, zone)}.`, ...lines, ...strips].join(' ');
}

function runOf(strip: SummaryStrip): { seconds: number; starts: number } {
  const spans: Span[] = strip.spans.map((span) => ({ ...span, claim: null }));
  return { seconds: secondsOf(spans, (span) => span.on), starts: startsOf(spans) };
}

export interface HourRow {
  at: number;
  /** The reading nearest the hour, of each line in order; null within 15 min of none. */
  values: (number | null)[];
  /** Seconds that each load ran in the hour that begins here. */
  ranS: number[];
}

/** One row an hour, up to now. */
export function hourRows(facts: NightFacts): HourRow[] {
  const rows: HourRow[] = [];
  for (let at = facts.night.from; at < Math.min(facts.now, facts.night.to); at += 3_600_000) {
    rows.push({
      at,
      values: facts.lines.map((line) => nearest(line, at)),
      ranS: facts.strips.map((strip) =>
        strip.spans.reduce(
          (sum, span) =>
            sum +
            (span.on ? Math.max(0, Math.min(span.to, at + 3_600_000) - Math.max(span.from, at)) / 1000 : 0),
          0,
        ),
      ),
    });
  }
  return rows;
}

function nearest(line: SummaryLine, at: number): number | null {
  let best: { away: number; value: number } | null = null;
  line.at.forEach((time, place) => {
    const value = line.value[place];
    const away = Math.abs(time - at);
    if (value !== null && value !== undefined && away <= 900_000 && away < (best?.away ?? Infinity))
      best = { away, value };
  });
  return (best as { value: number } | null)?.value ?? null;
}
