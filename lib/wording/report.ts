/** A report as blocks of words and figures: the page lays them out, a letter writes them down, and both say the same. */
import { DateTime } from 'luxon';
import type { SpanOfNights } from '@/lib/analysis/report-span';
import type { NightSummary } from '@/lib/analysis/nights';
import type { EntryEffect, RecoveryTrend, RecoveryWeek } from '@/lib/analysis/recovery';
import { totalOf } from '@/lib/analysis/totals';
import { decimal, degrees, share, temperatureFigure, UNKNOWN } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { dutySentence, nightDate } from './duty';
import { type FigureRow, nightCells, nightFigures } from './duty-figures';
import { nightNotes } from './duty-notes';
import { effectName, effectWords, endsOf, recoverySentence, trendWords, weekRows } from './duty-recovery';
import type { Phrase } from './phrase';

export interface ReportBlock {
  key: string;
  title: string;
  sentence?: Phrase[];
  rows?: FigureRow[];
  table?: { head: string[]; rows: string[][]; foot?: string[] };
  notes?: string[];
}

export interface ReportSource {
  name: string;
  /** Ascending. */
  nights: NightSummary[];
  recovery: { weeks: RecoveryWeek[]; trend: RecoveryTrend; effects: EntryEffect[] } | null;
}

/** @example spanWords({ span: 'week', from: '2026-11-23', to: '2026-11-29' }) === 'Week of 23 to 29 November 2026' */
export function spanWords({ span, from, to }: SpanOfNights): string {
  const [first, last] = [from, to].map((name) => DateTime.fromISO(name, { zone: 'UTC', locale: 'en-GB' }));
  if (first === undefined || last === undefined) return '';
  if (span === 'month') return first.toFormat('LLLL yyyy');
  if (span === 'winter')
    return first.year === last.year ? `Winter of ${first.year}` : `Winter of ${first.year} to ${last.year}`;
  const begin =
    first.month === last.month
      ? String(first.day)
      : first.toFormat(first.year === last.year ? 'd LLLL' : 'd LLLL yyyy');
  return `Week of ${begin} to ${last.toFormat('d LLLL yyyy')}`;
}

export function figuresBlock(
  source: ReportSource,
  house: { zone: string; frostLimit: number | null },
  preferences: Preferences,
): ReportBlock {
  const { name, nights } = source;
  const standing = { source: name, nights, totals: totalOf(nights), frostLimitC: house.frostLimit };
  return {
    key: 'figures',
    title: name,
    sentence: dutySentence(standing, preferences),
    rows: nights.length === 0 ? [] : nightFigures(nights, house.zone, house.frostLimit, preferences),
  };
}

/** The very rows of Duty, and the same sums under them. */
export function nightsBlock({ name, nights }: ReportSource, preferences: Preferences): ReportBlock {
  const totals = totalOf(nights);
  const unit = degrees(preferences);
  const figure = (one: { value: number } | null) =>
    one === null ? '' : temperatureFigure(one.value, preferences);
  return {
    key: 'nights',
    title: `Nights of ${name}`,
    table: {
      head: ['night', 'ran', 'kWh', 'starts', `lowest ${unit}`, `outdoors ${unit}`],
      rows: nights.map((night) => {
        const cells = nightCells(night, preferences);
        const mark = night.coverageLow ? '\u00a0*' : '';
        return [
          `${nightDate(night.night)}${mark}`,
          cells.ran,
          cells.heat ?? '',
          String(cells.starts),
          cells.lowest ?? '',
          cells.outdoors ?? '',
        ];
      }),
      foot: [
        nights.length === 1 ? 'This night' : `All ${nights.length} nights`,
        share(totals.dutyOfNight),
        totals.heat === null ? '' : decimal(totals.heat.kWh, 1),
        String(totals.starts),
        figure(totals.lowest),
        figure(totals.outdoorsLowest),
      ],
    },
    notes: nightNotes(nights),
  };
}

export function recoveryBlock(
  { name, recovery }: ReportSource,
  zone: string,
  preferences: Preferences,
): ReportBlock | null {
  if (recovery === null) return null;
  const { weeks, trend, effects } = recovery;
  const block = { key: 'recovery', title: `How ${name} comes back` };
  const last = endsOf(weeks)?.last;
  if (last === undefined) return { ...block, sentence: ['Not known yet: no week has rests enough.'] };
  const sentence = recoverySentence(weeks, trend, preferences);
  return {
    ...block,
    ...(sentence.length === 0 ? {} : { sentence }),
    rows: weekRows(last, preferences),
    notes: [
      trendWords(trend),
      ...effects.map((effect) => `${effectName(effect, zone)} ${effectWords(effect, preferences)}.`),
    ],
  };
}

/** Every source of every house on one line, for a report of the whole holding. */
export function housesBlock(
  houses: readonly { name: string; sources: readonly { name: string; nights: NightSummary[] }[] }[],
  preferences: Preferences,
): ReportBlock {
  return {
    key: 'houses',
    title: 'All houses',
    table: {
      head: ['house and source', 'ran', 'heat, kWh', 'electricity, kWh', `lowest ${degrees(preferences)}`],
      rows: houses.flatMap((house) =>
        house.sources.map(({ name, nights }) => {
          const { heat, electricity, lowest, dutyOfNight } = totalOf(nights);
          return [
            `${house.name}, ${name}`,
            nights.length === 0 ? '' : share(dutyOfNight),
            heat === null ? UNKNOWN : `${decimal(heat.kWh, 1)}\u00a0±\u00a0${decimal(heat.sd, 1)}`,
            electricity === null ? UNKNOWN : decimal(electricity.kWh, 3),
            lowest === null ? UNKNOWN : temperatureFigure(lowest.value, preferences),
          ];
        }),
      ),
    },
  };
}
