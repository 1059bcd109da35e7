import { z } from 'zod';
import { HouseState } from './house-state';
import { Alarm } from './alarm-view';
import { Instant, PageQuery } from './common';

const State = z.enum(['on', 'off']);
const Data = z.record(z.string(), z.unknown());

export const HouseStateAnswer = z.object({
  ...HouseState.shape,
  /** Seconds since `at`, of app time. */
  age: z.number(),
  alarms: z.array(Alarm),
});
export type HouseStateAnswer = z.infer<typeof HouseStateAnswer>;

export const STEPS = ['raw', '1m', '5m', '1h'] as const;
export const ReadingsQuery = z.strictObject({
  /** Keys, with commas between. */
  points: z
    .string()
    .min(1, 'Name one point at least.')
    .max(4000)
    .transform((text) => text.split(',').map((key) => key.trim())),
  from: Instant.optional(),
  to: Instant.optional(),
  step: z.enum(STEPS).default('raw'),
});

const RawSeries = z.strictObject({
  at: z.array(z.string()),
  value: z.array(z.number()),
  quality: z.array(z.enum(['good', 'uncertain', 'bad'])),
});
const SteppedSeries = z.strictObject({
  at: z.array(z.string()),
  least: z.array(z.number()),
  mean: z.array(z.number()),
  greatest: z.array(z.number()),
});
export const Readings = z.strictObject({
  points: z.record(z.string(), z.union([RawSeries, SteppedSeries])),
});

const LadderStep = z.object({
  claim: z.string(),
  speaks: z.boolean(),
  wants: z.enum(['on', 'off', 'hold']).optional(),
  because: Data.optional(),
});

export const SwitchingsQuery = z.strictObject({
  ...PageQuery.shape,
  channel: z.string().min(1).max(140).optional(),
  from: Instant.optional(),
  to: Instant.optional(),
});
export const SwitchingAnswer = z.strictObject({
  id: z.string(),
  at: z.string(),
  channel: z.number(),
  from: State,
  to: State,
  claim: z.string(),
  /** The command's; null for a lease trip. */
  number: z.number().nullable(),
  version: z.number().nullable(),
  ladder: z.array(LadderStep),
});
export const SwitchingList = z.strictObject({ items: z.array(SwitchingAnswer), next: z.string().nullable() });

export const WhyQuery = z.strictObject({ at: Instant.optional() });
export const Why = z.strictObject({
  at: z.string(),
  channel: z.number(),
  state: State,
  claim: z.string(),
  until: z.string().nullable(),
  ladder: z.array(LadderStep),
  next: z.array(Data),
  version: z.number().nullable(),
  /** Claims under the one that decided that speak too. */
  under: z.array(LadderStep),
  /** When `next` was reckoned: for a moment of the past, when the decision was made. */
  foreseenAt: z.string().nullable(),
  /** When this decision began, and what followed it: null while it stands. */
  since: z.string().nullable(),
  ended: z.strictObject({ at: z.string(), state: State, claim: z.string() }).nullable(),
  /** The load's switchings before and after. */
  earlier: z.string().nullable(),
  later: z.string().nullable(),
  rule: z.strictObject({ id: z.string(), slug: z.string(), name: z.string() }).nullable(),
  /** Hours within this decision in which control did not run; `to` is null while it does not. */
  gaps: z.array(z.strictObject({ from: z.string(), to: z.string().nullable() })),
});
export type Why = z.infer<typeof Why>;

const Part = z.strictObject({ up: z.boolean(), says: z.string() });
export const Health = z.strictObject({
  /** App time. */
  now: z.string(),
  rate: z.number(),
  web: Part,
  database: Part,
  worker: Part,
  field: Part,
  /** Records that wait to be stored. */
  spool: z.number(),
  lastStep: z.string().nullable(),
});
export type Health = z.infer<typeof Health>;

/** A person's order, and until when it holds. */
export const OrderAnswer = z.strictObject({
  /** Of the order, in the house. */
  number: z.number(),
  at: z.string(),
  until: z.string().nullable(),
});
