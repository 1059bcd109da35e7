import { z } from 'zod';
import { Key, wholeSeconds } from './common';

/** A drafted interlock, asked what it would have prevented. */
export const ReplayQuery = z.strictObject({
  channel: Key,
  kind: z.enum(['never-with', 'needs']),
  other: Key,
  delay: z.coerce.number({ error: 'Give whole seconds.' }).pipe(wholeSeconds(0, 3600)).default(0),
});
export const InterlockReplay = z.strictObject({
  /** Oldest first. */
  nights: z.array(z.strictObject({ night: z.string(), count: z.number(), seconds: z.number() })),
  count: z.number(),
  seconds: z.number(),
  longest: z.strictObject({ from: z.string(), to: z.string() }).nullable(),
});
export type InterlockReplay = z.infer<typeof InterlockReplay>;
