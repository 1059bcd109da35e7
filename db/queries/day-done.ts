import 'server-only';
import type { House } from '@/lib/schema/yard-view';
import { toLocal } from '@/lib/units/local-time';
import { Refusal } from './refusal';

/**
 * A day on which something was done has come: the house's own day decides, since it may be tomorrow there already.
 * @param day `YYYY-MM-DD`; null or undefined: none is told
 * @param remedy what to give instead, to follow "That day is yet to come: give"
 * @throws Refusal at `path`
 */
export function refuseDayToCome(
  day: string | null | undefined,
  path: string,
  remedy: string,
  { zone }: Pick<House, 'zone'>,
  now: Date,
): void {
  if (day === null || day === undefined || day <= toLocal(now.getTime(), zone).slice(0, 10)) return;
  throw new Refusal(path, `That day is yet to come: give ${remedy}.`);
}
