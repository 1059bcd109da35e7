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
  /** What a node has just sent, for whoever asked for it: values in the unit of their point, or as sent with why not. */
  z.object({
    type: z.literal('tail'),
    house: z.string(),
    node: z.string(),
    records: z.array(
      z.object({
        name: z.string(),
        value: z.number().nullable(),
        unit: z.string().nullable(),
        /** By its own time; null where it was refused. */
        at: z.string().nullable(),
        why: z.string().nullable(),
      }),
    ),
  }),
]);
export type LiveFrame = z.infer<typeof LiveFrame>;
export type TailRecord = Extract<LiveFrame, { type: 'tail' }>['records'][number];

/** A browser says that it is there, and of which node it wants to see what comes, by its key; null: of none. Anything else closes the socket. */
export const LiveRequest = z.discriminatedUnion('type', [
  z.strictObject({ type: z.literal('here') }),
  z.strictObject({ type: z.literal('tail'), node: z.string().max(200).nullable() }),
]);
export type LiveAsk = z.infer<typeof LiveRequest>;

/** Close codes of our own range. */
export const LIVE_CLOSE = { signedOut: 4401, notFound: 4404, notAllowed: 4403 } as const;
