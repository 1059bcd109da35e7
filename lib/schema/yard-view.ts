/** The things of the yard as routes answer them and pages show them: what was given, with its id and how often it changed. */
import { z } from 'zod';
import { ModbusBus, MqttTold, Register } from './bus';
import { channelFields } from './channel';
import { houseFields } from './house';
import { nodeFields } from './node';
import { pointFields } from './point';
import { sourceFields } from './source';

/** Grows by one with each change; the ETag is made of it. */
const entity = { id: z.string(), revision: z.number() };
const at = z.string();

export const House = z.strictObject({
  ...entity,
  slug: z.string(),
  ...houseFields,
  /** Out of an archive and not in service: nothing drives it. */
  laidUpAt: at.nullable(),
});
export type House = z.infer<typeof House>;

export const FieldNode = z.strictObject({
  ...entity,
  ...nodeFields,
  modbus: ModbusBus.nullable(),
  mqtt: MqttTold.nullable(),
  registers: z.array(Register),
  lastHeardAt: at.nullable(),
  revokedAt: at.nullable(),
  /** A former token stays good until then. */
  formerTokenUntil: at.nullable(),
});
export type FieldNode = z.infer<typeof FieldNode>;
export const FieldNodeWithToken = z.strictObject({ ...FieldNode.shape, token: z.string() });

export const Point = z.strictObject({ ...entity, ...pointFields, node: z.string().nullable() });
export type Point = z.infer<typeof Point>;

export const Source = z.strictObject({ ...entity, slug: z.string(), ...sourceFields });
export type Source = z.infer<typeof Source>;

export const Channel = z.strictObject({ ...entity, ...channelFields, provedAt: at.nullable() });
export type Channel = z.infer<typeof Channel>;

export const Loop = z.strictObject({
  ...entity,
  slug: z.string(),
  name: z.string(),
  source: z.string(),
  channel: z.string(),
  intake: z.string(),
  return: z.string(),
});
export type Loop = z.infer<typeof Loop>;

export const Interlock = z.strictObject({
  ...entity,
  channel: z.string(),
  kind: z.enum(['never-with', 'needs']),
  other: z.string(),
  delay: z.number(),
  frostMayBreak: z.boolean(),
});
export type Interlock = z.infer<typeof Interlock>;

export const Lockout = z.strictObject({
  ...entity,
  channel: z.string(),
  why: z.string(),
  by: z.string(),
  at,
  removedAt: at.nullable(),
  removedBy: z.string().nullable(),
});
export type Lockout = z.infer<typeof Lockout>;
