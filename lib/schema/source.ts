/** Sources of heat, and the loops that draw from them. */
import { z } from 'zod';
import { Celsius, Key, Name, wholeSeconds } from './common';

export const SOURCE_KINDS = ['heap', 'ground', 'heater', 'other'] as const;
export const sourceFields = {
  name: Name,
  kind: z.enum(SOURCE_KINDS),
  corePoint: Key.nullable(),
  basePoint: Key.nullable(),
  coreFloor: Celsius.nullable(),
  dailyLimit: wholeSeconds(1, 10 * 86_400).nullable(),
  ready: z.strictObject({ level: Celsius, for: wholeSeconds(1, 30 * 86_400) }).nullable(),
};
const floorNeedsCore = {
  path: ['coreFloor'],
  error: 'A floor of the core needs a core point.',
};
export const SourceCreate = z
  .strictObject({
    ...sourceFields,
    corePoint: sourceFields.corePoint.default(null),
    basePoint: sourceFields.basePoint.default(null),
    coreFloor: sourceFields.coreFloor.default(null),
    dailyLimit: sourceFields.dailyLimit.default(null),
    ready: sourceFields.ready.default(null),
  })
  .refine((source) => source.coreFloor === null || source.corePoint !== null, floorNeedsCore);
export const SourceAmend = z.strictObject(sourceFields).partial();

export const LoopCreate = z.strictObject({
  name: Name,
  source: z.string().max(140),
  channel: Key,
  intake: Key,
  return: Key,
});
export const LoopAmend = LoopCreate.partial();
