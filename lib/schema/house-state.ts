/** How a house stands: what the worker keeps, the live feed carries and GET state answers (with the alarms beside it). */
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
  /** Since when it is in doubt; absent in what was kept before this was told. */
  doubtSince: z.string().nullish(),
  /** The last time of doubt that is over. */
  lastDoubt: z.object({ why: z.string().nullable(), from: z.string(), to: z.string() }).nullish(),
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
