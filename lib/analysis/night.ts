/**
 * Nights: from noon to noon by the clock of the house, named by the date of their evening. The clock may be put forward
 * or back in one, so a night has 23, 24 or 25 h, 23.5 or 24.5 h on Lord Howe: always two noons apart, never 86 400 s.
 */
import { DateTime } from 'luxon';

export interface Night {
  /** Date of its evening, `YYYY-MM-DD`. */
  night: string;
  /** Epoch ms of its two noons; the second belongs to the next night. */
  from: number;
  to: number;
}

const noonOf = (day: DateTime): DateTime => day.set({ hour: 12, minute: 0, second: 0, millisecond: 0 });

/**
 * The night of a date.
 * @throws RangeError for what is no date, or no zone
 * @example nightNamed('2026-03-28', 'Europe/Zurich') lasts 23 h
 */
export function nightNamed(night: string, zone: string): Night {
  const evening = DateTime.fromISO(night, { zone });
  if (!evening.isValid || night.length !== 10) throw new RangeError(`no night is named ${night} in ${zone}`);
  return {
    night,
    from: noonOf(evening).toMillis(),
    to: noonOf(evening.plus({ days: 1 })).toMillis(),
  };
}

/** The night that holds an instant, epoch ms. At noon sharp it is the one that begins. */
export function nightOf(atMs: number, zone: string): Night {
  const local = DateTime.fromMillis(atMs, { zone });
  const date = local.hour < 12 ? local.minus({ days: 1 }) : local;
  return nightNamed(date.toFormat('yyyy-MM-dd'), zone);
}

/** Each night from the one that holds `fromMs` to the one that holds `toMs`, in order. */
export function nightsBetween(fromMs: number, toMs: number, zone: string): Night[] {
  const nights: Night[] = [];
  let next = nightOf(fromMs, zone);
  while (next.from <= toMs) {
    nights.push(next);
    next = nightOf(next.to, zone);
  }
  return nights;
}

/** The name of the night `count` nights before (or, below zero, after) another. */
export function nightBefore(night: string, count: number): string {
  return DateTime.fromISO(night, { zone: 'UTC' }).minus({ days: count }).toFormat('yyyy-MM-dd');
}

/** Hours between two instants, epoch ms. */
export function hoursBetween(fromMs: number, toMs: number): number {
  return (toMs - fromMs) / 3_600_000;
}
