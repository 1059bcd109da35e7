/** Frames of the live feed: what the worker tells a browser, and the little that a browser may say. */
import { z } from 'zod';

const Quality = z.enum(['good', 'uncertain', 'bad']);
const State = z.enum(['on', 'off']);
const Data = z.record(z.string(), z.unknown());

export const StatePoint = z.object({
  key: z.string(),
  name: z.string(),
  role: z.string(),
  value: z.number().nullable(),
  unit: z.string(),
  at: z.string().nullable(),
  quality: Quality,
  why: z.string().nullable(),
});

export const StateChannel = z.object({
  number: z.number(),
  key: z.string(),
  label: z.string(),
  state: State,
  reported: State.nullable(),
  claim: z.string(),
  because: Data,
  until: z.string().nullable(),
  mode: z.enum(['auto', 'hand', 'locked']),
  proved: z.boolean(),
  lockedOut: z.boolean(),
});

export const StateSource = z.object({
  slug: z.string(),
  name: z.string(),
  kind: z.string(),
  credit: z.number(),
  restSince: z.string().nullable(),
  restUntil: z.string().nullable(),
  restAtMostUntil: z.string().nullable(),
  drawnToday: z.number(),
  drawing: z.boolean(),
  underFloor: z.boolean(),
});

/** How a house stands: also what `control_memory.state` keeps and what GET state answers (with the alarms beside it). */
export const HouseState = z.object({
  at: z.string(),
  points: z.array(StatePoint),
  channels: z.array(StateChannel),
  sources: z.array(StateSource),
  nodes: z.array(z.object({ key: z.string(), online: z.boolean(), lastHeardAt: z.string().nullable() })),
});
export type HouseState = z.infer<typeof HouseState>;
export type StatePoint = z.infer<typeof StatePoint>;
export type StateChannel = z.infer<typeof StateChannel>;
export type StateSource = z.infer<typeof StateSource>;

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
    to: State,
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
