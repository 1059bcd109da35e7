/** Between instants and what a browser's field for date and time holds: `YYYY-MM-DDTHH:MM` in the house's zone. */
import { DateTime } from 'luxon';

/** @example toLocal(Date.parse('2026-11-26T22:05:00Z'), 'Europe/Zurich') === '2026-11-26T23:05' */
export function toLocal(at: number, zone: string): string {
  return DateTime.fromMillis(at, { zone }).toFormat("yyyy-MM-dd'T'HH:mm");
}

/**
 * The instant, epoch ms; null for what is no time. A time that the clock skips in spring is read with the offset before
 * the gap, one that comes twice in autumn is the first (RFC 5545).
 */
export function fromLocal(text: string, zone: string): number | null {
  if (!/^\d{4}-\d\d-\d\dT\d\d:\d\d(:\d\d)?$/.test(text)) return null;
  const read = DateTime.fromISO(text, { zone });
  if (!read.isValid) return null;
  // which of two the library takes depends on the season, so the first is asked for
  return Math.min(...read.getPossibleOffsets().map((one) => one.toMillis()));
}
