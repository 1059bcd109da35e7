/** Where round figures stand: hours of a night in the house's zone, degrees in the reader's unit. Pure. */
import { scaleLinear } from 'd3-scale';
import { DateTime } from 'luxon';
import { celsius, fahrenheit } from '@/lib/units/conversion';
import { decimal, degrees } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock } from '@/lib/units/time';

export interface HourTick {
  at: number;
  label: string;
  isMidnight: boolean;
}

/**
 * Hours by the wall, every so many from noon. A night in which the clock is changed is 23 or 25 h long, and its ticks
 * stand where the wall shows them, so they are then not evenly spaced.
 * @param every hours, a divisor of 12
 */
export function hourTicks(
  from: number,
  to: number,
  zone: string,
  every: number,
  preferences: Preferences,
): HourTick[] {
  const noon = DateTime.fromMillis(from, { zone });
  const ticks: HourTick[] = [];
  for (let hours = 0; hours <= 24; hours += every) {
    const hour = (12 + hours) % 24;
    const day = noon.plus({ days: 12 + hours >= 24 ? 1 : 0 });
    const at = day.set({ hour, minute: 0, second: 0, millisecond: 0 }).toMillis();
    if (at >= from && at <= to)
      ticks.push({ at, label: clock(at, zone, preferences), isMidnight: hour === 0 });
  }
  return ticks;
}

export interface DegreeTick {
  celsius: number;
  label: string;
}

/** Few round figures in the reader's degrees; the uppermost carries the unit. */
export function degreeTicks(
  least: number,
  greatest: number,
  many: number,
  preferences: Preferences,
): DegreeTick[] {
  const inF = preferences.temperature === 'F';
  const shown = (value: number) => (inF ? fahrenheit(value) : value);
  const values = scaleLinear()
    .domain([shown(least), shown(greatest)])
    .ticks(many);
  const places = values.some((value) => !Number.isInteger(value)) ? 1 : 0;
  return values.map((value, place) => ({
    celsius: inF ? celsius(value) : value,
    label: decimal(value, places) + (place === values.length - 1 ? ` ${degrees(preferences)}` : ''),
  }));
}

/** Moves labels apart that would overlap, keeping their order and moving each as little as may be. */
export function spread<Item extends { y: number }>(
  items: readonly Item[],
  apart: number,
  top: number,
  bottom: number,
): Item[] {
  const sorted = [...items].sort((one, other) => one.y - other.y).map((item) => ({ ...item }));
  for (let pass = 0; pass < 12; pass += 1) {
    sorted.forEach((item, place) => {
      const above = sorted[place - 1];
      if (above !== undefined && item.y - above.y < apart) {
        const push = (apart - (item.y - above.y)) / 2;
        above.y -= push;
        item.y += push;
      }
      item.y = Math.min(bottom, Math.max(top, item.y));
    });
  }
  // the sweep above ends close; this one holds the distance whatever happens
  sorted.forEach((item, place) => {
    const above = sorted[place - 1];
    if (above !== undefined) item.y = Math.max(item.y, above.y + apart);
  });
  return sorted;
}
