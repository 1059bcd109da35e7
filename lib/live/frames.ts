/** Frames of the live feed: what the worker tells a browser, and the little that a browser may say. */
import { z } from 'zod';
import { HouseState } from '@/lib/schema/house-state';

/** From the worker. `/live?house=<id>`; the first frame is a state, and again whenever a reader fell behind. */
export const LiveFrame = z.discriminatedUnion('type', [
  z.object({
    type: z.literal('state'),
    house: z.string(),
    state: HouseState,
    rate: z.number(),
    now: z.string(),
  }),
  z.object({
    type: z.literal('switching'),
    house: z.string(),
    channel: z.number(),
    at: z.string(),
    to: z.enum(['on', 'off']),
    claim: z.string(),
  }),
  z.object({ type: z.literal('alarms'), house: z.string() }),
  z.object({ type: z.literal('plan'), house: z.string() }),
]);
export type LiveFrame = z.infer<typeof LiveFrame>;

/** A browser says nothing but that it is there; anything else closes the socket. */
export const LiveRequest = z.strictObject({ type: z.literal('here') });

/** Close codes of our own range. */
export const LIVE_CLOSE = { signedOut: 4401, notFound: 4404, notAllowed: 4403 } as const;
