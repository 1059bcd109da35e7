import type { House } from '@/lib/schema/yard-view';
import type { Answer } from './guard';

/** A table of a house as a file, sent while it is made. */
export const csvFile = (house: House, what: string, parts: AsyncIterable<string>): Answer => ({
  stream: { type: 'text/csv', name: `${house.slug}-${what}.csv`, parts },
});
