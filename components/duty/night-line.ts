/** A night as its row shows it: words and packed strips, for the browser, which knows no analysis and no units. */
import type { NightSummary } from '@/lib/analysis/nights';
import type { Preferences } from '@/lib/units/preferences';
import { type NightCells, nightCells } from '@/lib/wording/duty-figures';
import { markWords } from '@/lib/wording/duty-notes';
import { packStrip, USUAL_LENGTH } from './strip-paths';

export interface NightLine extends NightCells {
  night: string;
  /** What must be said of it beside its date: that it lasts, or how little of it was read. */
  note?: string;
  /** Under 90 % was read: the row is marked. */
  isThin?: true;
  /** A channel each, packed. */
  strips: string[];
  /** Length of the night, s, where it is not the usual: one that lasts ends early. */
  length?: number;
  isCold?: true;
}

export function nightLine(
  night: NightSummary,
  frostLimitC: number | null,
  preferences: Preferences,
): NightLine {
  const notes = [night.complete ? [] : 'so far', markWords(night) ?? []].flat();
  const length = (night.ends - night.from) / 1000;
  const isCold = frostLimitC !== null && night.lowest !== null && night.lowest.value < frostLimitC;
  return {
    night: night.night,
    strips: night.strips.map(({ spans }) => packStrip(spans)),
    ...(length === USUAL_LENGTH ? {} : { length }),
    ...nightCells(night, preferences),
    // what there is not is not sent: it would be sent four hundred times
    ...(notes.length === 0 ? {} : { note: notes.join(', ') }),
    ...(night.coverageLow ? { isThin: true } : {}),
    ...(isCold ? { isCold: true } : {}),
  };
}
