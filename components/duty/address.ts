/** What the page Duty shows stands in its address, so that reload, share and back work. Read by read-address.ts. */
export const RANGES = [7, 14, 35, 100, 400] as const;
export const SORTS = ['night', 'ran', 'heat', 'starts', 'lowest', 'outdoors'] as const;
export type Sort = (typeof SORTS)[number];

export interface DutyAddress {
  source?: string | undefined;
  /** How many of the newest. */
  nights: number;
  /** The nights that are chosen among those, both included; both or neither. */
  from?: string | undefined;
  to?: string | undefined;
  /** What they are compared with, as `readAgainst` understands it. */
  against?: string | undefined;
  /** The night that is opened. */
  night?: string | undefined;
  sort: Sort;
  order: 'up' | 'down';
}

/** The page's address with something changed; what is as without an address is left out. */
export function addressOf(house: string, now: DutyAddress, change: Partial<DutyAddress>): string {
  const next = { ...now, ...change };
  const query = new URLSearchParams();
  if (next.source !== undefined) query.set('source', next.source);
  if (next.nights !== 35) query.set('nights', String(next.nights));
  if (next.from !== undefined && next.to !== undefined) {
    query.set('from', next.from);
    query.set('to', next.to);
  }
  if (next.against !== undefined) query.set('against', next.against);
  if (next.sort !== 'night') query.set('sort', next.sort);
  if (next.order !== 'up') query.set('order', next.order);
  if (next.night !== undefined) query.set('night', next.night);
  const text = query.toString();
  return `/${house}/duty${text === '' ? '' : `?${text}`}`;
}
