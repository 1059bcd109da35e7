/** How a source comes back after draws, in words. Of a change only what its interval bears. */
import type {
  EntryEffect,
  Estimate,
  PooledRecovery,
  RecoveryTrend,
  RecoveryWeek,
} from '@/lib/analysis/recovery';
import { count, temperature, difference, temperatureFigure, decimal, degrees } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { day, duration } from '@/lib/units/time';
import { nightDate } from './duty';
import type { FigureRow } from './duty-figures';
import { kindWord } from './heap';
import { join } from './join';
import type { Phrase } from './phrase';

const space = '\u00a0';

/** A tenth: over many rests the interval is under a minute. */
const minutes = (seconds: number) => decimal(seconds / 60, 1);

/** @example interval(tau, minutes) === '28 to 35', 'at least 28' where nothing bounds it above */
function interval({ low, high }: Estimate, figure: (value: number) => string): string {
  if (low !== null && high !== null) return `${figure(low)} to ${figure(high)}`;
  if (low !== null) return `at least ${figure(low)}`;
  return high === null ? 'no bound known' : `at most ${figure(high)}`;
}

/** Minutes with their interval. @example tauWords(tau) === '31.2 min (28.4 to 34.6)' */
export function tauWords(tau: Estimate): string {
  return `${minutes(tau.value)}${space}min (${interval(tau, minutes)})`;
}

/** @example levelWords(level, USUAL) === '46.2 °C (45.9 to 46.5)' */
export function levelWords(level: Estimate, preferences: Preferences): string {
  const figure = (celsius: number) => temperatureFigure(celsius, preferences);
  return `${figure(level.value)}${space}${degrees(preferences)} (${interval(level, figure)})`;
}

/** The first and the last week of those that have a figure; one twice is told once. */
export function endsOf(weeks: readonly RecoveryWeek[]): { first: Known; last: Known } | null {
  const known = weeks.filter((week): week is Known => week.recovery !== null);
  const [first, last] = [known[0], known.at(-1)];
  return first === undefined || last === undefined ? null : { first, last };
}

export type Known = RecoveryWeek & { recovery: PooledRecovery };

/** One week's figures. */
export function weekRows({ week, recovery }: Known, preferences: Preferences): FigureRow[] {
  const of = `week of ${nightDate(week)}`;
  return [
    { name: `Comes back to, ${of}`, value: levelWords(recovery.level, preferences) },
    {
      name: `Regains two thirds in, ${of}`,
      value: tauWords(recovery.tau),
      note: `from ${count(recovery.rests, 'rest')}`,
    },
  ];
}

/** For the head of Duty: only a change that the trend's interval leaves no doubt of; else nothing. */
export function recoverySentence(
  weeks: readonly RecoveryWeek[],
  trend: RecoveryTrend,
  preferences: Preferences,
): Phrase[] {
  const ends = endsOf(weeks);
  if (ends === null || (trend.change !== 'slower' && trend.change !== 'quicker')) return [];
  const { first, last } = ends;
  const drop = last.recovery.level.value - first.recovery.level.value;
  const said = join(
    {
      text: trend.change === 'slower' ? 'It is coming back more slowly:' : 'It is coming back more quickly:',
      tone: 'strong',
    },
    ` two thirds took ${duration(first.recovery.tau.value)} in the first week and now take `,
    { text: duration(last.recovery.tau.value), tone: 'base' },
    Math.abs(drop) < 1
      ? '.'
      : `, towards ${temperature(last.recovery.level.value, preferences)} instead of ${temperature(first.recovery.level.value, preferences)}.`,
  );
  return trend.change === 'slower'
    ? join(said, ' Probe and squeeze it first; feed or turn it on a mild day, with the fan off.')
    : said;
}

/** Beside the curves: what the weeks bear, in a sentence. */
export function trendWords(trend: RecoveryTrend): string {
  switch (trend.change) {
    case 'slower':
      return `Slower by ${perWeek(trend)} from week to week, over ${trend.weeks} weeks.`;
    case 'quicker':
      return `Quicker by ${perWeek(trend)} from week to week, over ${trend.weeks} weeks.`;
    case 'none-seen':
      return `No change from week to week that chance would not make, over ${trend.weeks} weeks.`;
    case 'cannot-tell':
      return `Whether that is changing cannot be told yet: five weeks with rests are needed, and there ${trend.weeks === 1 ? 'is one' : `are ${trend.weeks}`}.`;
  }
}

function perWeek({ ratioPerWeek }: RecoveryTrend): string {
  if (ratioPerWeek === null) return 'some';
  const part = (ratio: number) => decimal(Math.abs(ratio - 1) * 100, 0);
  const { low, high } = ratioPerWeek;
  // the nearer end first, whichever way it goes
  const inOrder = ratioPerWeek.value < 1 ? { ...ratioPerWeek, low: high, high: low } : ratioPerWeek;
  return `${part(ratioPerWeek.value)}${space}% (${interval(inOrder, part)})`;
}

/** @example 'Turned, 21 November:' */
export function effectName({ kind, at }: EntryEffect, zone: string): string {
  return `${kindWord(kind)}, ${day(at, zone)}:`;
}

/** What turning, feeding or watering did to it. @example 'two thirds in 0.8 times the time (0.7 to 0.9)' */
export function effectWords(effect: EntryEffect, preferences: Preferences): string {
  if (effect.tauRatio === null || effect.change === 'cannot-tell')
    return `cannot be told: ${effect.nightsBefore} nights before and ${effect.nightsAfter} after have rests long enough`;
  const { value } = effect.tauRatio;
  const ratio = `two thirds in ${decimal(value, 2)} times the time (${interval(effect.tauRatio, (one) => decimal(one, 2))})`;
  const level = effect.levelChange;
  const rise =
    level === null
      ? ''
      : `, ${difference(Math.abs(level.value), preferences)} ${level.value < 0 ? 'lower' : 'higher'}`;
  return effect.change === 'none-seen'
    ? `no change beyond chance (${ratio})`
    : `${effect.change}: ${ratio}${rise}`;
}
