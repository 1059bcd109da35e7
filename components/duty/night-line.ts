/** A night as its row shows it: words and paths, ready for the browser, which knows no analysis and no units. */
import type { NightSummary } from '@/lib/analysis/nights';
import { decimal, share, temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { nightDate } from '@/lib/wording/duty';
import { type StripPaths, stripPaths } from './strip-paths';

export interface NightLine {
  night: string;
  date: string;
  /** What must be said of it beside its date: that it lasts, or how little of it was read. */
  note: string | null;
  /** Under 90 % was read: the row is marked. */
  isThin: boolean;
  strips: StripPaths[];
  /** Null where it is not known. */
  ran: string;
  heat: string | null;
  starts: string;
  lowest: string | null;
  isCold: boolean;
  outdoors: string | null;
}

export function nightLine(
  night: NightSummary,
  frostLimitC: number | null,
  preferences: Preferences,
): NightLine {
  const figure = (one: { value: number } | null) =>
    one === null ? null : temperatureFigure(one.value, preferences);
  const notes = [
    ...(night.complete ? [] : ['so far']),
    ...(night.coverageLow ? [`${share(night.coverage)} of it was read`] : []),
  ];
  return {
    night: night.night,
    date: nightDate(night.night),
    note: notes.length === 0 ? null : notes.join(', '),
    isThin: night.coverageLow,
    strips: night.strips.map(({ spans }) => stripPaths(spans, (night.ends - night.from) / 1000)),
    ran: share(night.dutyOfNight),
    heat: night.heat === null ? null : decimal(night.heat.kWh, 1),
    starts: String(night.starts),
    lowest: figure(night.lowest),
    isCold: frostLimitC !== null && night.lowest !== null && night.lowest.value < frostLimitC,
    outdoors: figure(night.outdoorsLowest),
  };
}
