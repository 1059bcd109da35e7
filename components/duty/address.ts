/** What the page Duty shows stands in its address, so that reload, share and back work. */
import { z } from 'zod';

export const RANGES = [7, 14, 35, 100, 400] as const;
export const SORTS = ['night', 'ran', 'heat', 'starts', 'lowest', 'outdoors'] as const;
export type Sort = (typeof SORTS)[number];

/** What an address cannot mean falls back to what the page shows without it: it is a view, not a change. */
const Address = z.object({
  source: z.string().max(140).optional().catch(undefined),
  nights: z.coerce.number().int().min(1).max(400).catch(35),
  night: z
    .string()
    .regex(/^\d{4}-\d\d-\d\d$/)
    .optional()
    .catch(undefined),
  sort: z.enum(SORTS).catch('night'),
  order: z.enum(['up', 'down']).catch('up'),
});
export type DutyAddress = z.infer<typeof Address>;

export function readAddress(params: Record<string, string | string[] | undefined>): DutyAddress {
  return Address.parse({ nights: 35, sort: 'night', order: 'up', ...params });
}

/** The page's address with something changed; what is as without an address is left out. */
export function addressOf(house: string, now: DutyAddress, change: Partial<DutyAddress>): string {
  const next = { ...now, ...change };
  const query = new URLSearchParams();
  if (next.source !== undefined) query.set('source', next.source);
  if (next.nights !== 35) query.set('nights', String(next.nights));
  if (next.sort !== 'night') query.set('sort', next.sort);
  if (next.order !== 'up') query.set('order', next.order);
  if (next.night !== undefined) query.set('night', next.night);
  const text = query.toString();
  return `/${house}/duty${text === '' ? '' : `?${text}`}`;
}
