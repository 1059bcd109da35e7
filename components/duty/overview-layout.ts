/** Where the nights of the overview stand: a bar a night, and dates under them. Pure. */
import { nightLabel } from '@/lib/units/time';

/** The bars' drawing is as many units wide as there are nights, and this high. */
export const BARS_HIGH = 40;

/**
 * All bars as one path over the line of nothing; a night that took heat out of the house hangs below it.
 * @param heights what each night's bar is as high as; null draws none
 */
export function barsPath(heights: readonly (number | null)[]): { bars: string; zero: number } {
  const values = heights.map((value) => value ?? 0);
  const [least, most] = [Math.min(0, ...values), Math.max(0, ...values)];
  const unit = most === least ? 0 : BARS_HIGH / (most - least);
  const zero = round(most * unit);
  const bars = values
    .map((value, place) => {
      const high = round(Math.abs(value) * unit);
      if (high === 0) return '';
      return `M${place + 0.1} ${value < 0 ? zero : round(zero - high)}h.8v${high}h-.8z`;
    })
    .join('');
  return { bars, zero };
}

const round = (value: number) => Math.round(value * 10) / 10;

export interface OverviewTick {
  /** Per cent of the width, at the middle of its night. */
  left: number;
  label: string;
}

/** Sundays' dates under a few weeks, firsts of months under more; never closer than so many labels fit beside each other. */
export function overviewTicks(nights: readonly string[], most = 8): OverviewTick[] {
  const isMonths = nights.length > 50;
  const places = nights.flatMap((night, place) => (isMark(night, isMonths) ? [place] : []));
  const every = Math.ceil(places.length / most);
  return places
    .filter((_, which) => which % every === 0)
    .map((place) => ({
      left: round((100 * (place + 0.5)) / nights.length),
      label: isMonths ? monthOf(nights[place] ?? '') : nightLabel(nights[place] ?? ''),
    }));
}

function isMark(night: string, isMonths: boolean): boolean {
  return isMonths ? night.endsWith('-01') : new Date(`${night}T12:00:00Z`).getUTCDay() === 0;
}

const monthOf = (night: string) => nightLabel(night).split(' ')[1] ?? '';
