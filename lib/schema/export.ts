import { z } from 'zod';
import { Instant } from './common';

/** Both ends are wanted: a table of everything by oversight is long to fetch. */
const span = { from: Instant, to: Instant };

export const ReadingsExport = z.strictObject({
  /** Keys, with commas between. */
  points: z
    .string()
    .min(1, 'Name one point at least.')
    .max(4000)
    .transform((text) => text.split(',').map((key) => key.trim())),
  ...span,
});
export const SwitchingsExport = z.strictObject(span);
export const HeapBookExport = z.strictObject({ source: z.string().min(1).max(140).optional() });
