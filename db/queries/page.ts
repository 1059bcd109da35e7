import { writeCursor, type Place } from '@/lib/schema/common';

/** How much of a list is wanted, and behind which row. */
export interface Page {
  limit: number;
  cursor?: Place | undefined;
}

export interface Listed<T> {
  items: T[];
  next: string | null;
}

/** Cuts a list that was asked for with one row more than wanted; that one tells whether there is a next page. */
export function cut<T>(rows: T[], limit: number, placeOf: (row: T) => Place): Listed<T> {
  const items = rows.slice(0, limit);
  const last = items.at(-1);
  return { items, next: rows.length > limit && last !== undefined ? writeCursor(placeOf(last)) : null };
}

/** A page of a list that is short enough to be read whole, in the order given. */
export function pageOf<T extends { id: string }>(all: T[], page: Page): Listed<T> {
  const { cursor } = page;
  const from = cursor === undefined ? 0 : all.findIndex((item) => item.id === cursor.id) + 1;
  // a row that went away meanwhile would send the reader back to the beginning
  const rest = cursor !== undefined && from === 0 ? [] : all.slice(from);
  return cut(rest, page.limit, (item) => ({ id: item.id }));
}
