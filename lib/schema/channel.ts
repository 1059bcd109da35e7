/** Channels, what keeps them off, and what a person orders of them. */
import { z } from 'zod';
import { plain } from '@/lib/control/plain';
import { Celsius, finite, Key, Measured, Name, wholeSeconds, Why } from './common';

export const LOAD_KINDS = ['motor', 'vent', 'heater', 'valve', 'lamp', 'other'] as const;
export const Load = z.strictObject({
  kind: z.enum(LOAD_KINDS),
  watts: finite(0, 50_000, 'W').optional(),
  volts: finite(0, 1000, 'V').optional(),
  supply: z.enum(['ac', 'dc']).optional(),
  contactAmps: finite(0, 200, 'A').optional(),
});
/** What stands between the mains and the load; a record of the work, not an approval of it. */
export const Protection = z.strictObject({
  /** The load hangs on an enclosed contactor, whose coil the relay switches. */
  contactor: z.boolean(),
  fuseAmps: finite(0.1, 200, 'A'),
  cableMm2: finite(0.1, 200, 'mm²').optional(),
  /** Of the enclosure (IEC 60529). */
  ip: z
    .string()
    .trim()
    .toUpperCase()
    .regex(/^IP[0-6X][0-9X]K?[A-DHMSW]{0,3}$/, 'Give the enclosure’s mark, such as IP65.')
    .optional(),
  rcdMilliamps: finite(1, 1000, 'mA').optional(),
  rcdTestedOn: z.iso.date({ error: 'Give the date as YYYY-MM-DD.' }).optional(),
  /** By local code or by the maker. */
  rcdTestEveryMonths: z
    .number({ error: 'Give whole months.' })
    .int('Give whole months.')
    .min(1, 'At least 1 month.')
    .max(60, 'At most 60 months.')
    .optional(),
});
export type Protection = z.infer<typeof Protection>;

export const channelFields = {
  number: z.number().int().min(1).max(999),
  node: Key,
  relay: z.number().int().min(1).max(64),
  key: Key,
  label: Name,
  source: z.string().max(140).nullable(),
  frostHelp: z.boolean(),
  contact: z.enum(['NO', 'NC']),
  load: Load,
  minOn: wholeSeconds(0, 86_400),
  minOff: wholeSeconds(0, 86_400),
  startsPerHour: finite(0.1, 3600, 'starts an hour').nullable(),
  longestOn: wholeSeconds(1, 7 * 86_400).nullable(),
  highLimit: z.strictObject({ point: Key, above: Celsius }).nullable(),
  runProof: z
    .strictObject({
      point: Key,
      above: Measured.min(0, 'Not under 0: a standing fan would pass for a running one.'),
    })
    .nullable(),
  fallback: z
    .strictObject({
      point: Key,
      below: Celsius,
      above: Celsius,
      onFor: wholeSeconds(1, 86_400),
      offFor: wholeSeconds(1, 86_400),
    })
    .refine((fallback) => plain(fallback.above - fallback.below) >= 0.5, {
      path: ['above'],
      error: 'Off over must be at least 0.5 °C over on under.',
    })
    .nullable(),
  flow: z
    .strictObject({
      litresPerSecond: finite(0, 10_000, 'L/s'),
      from: z.enum(['measured', 'curve', 'rated', 'guessed']),
      sd: finite(0, 10_000, 'L/s').optional(),
    })
    .nullable(),
  protection: Protection.nullable(),
};
export const ChannelCreate = z.strictObject({
  ...channelFields,
  source: channelFields.source.default(null),
  frostHelp: channelFields.frostHelp.default(false),
  startsPerHour: channelFields.startsPerHour.default(null),
  longestOn: channelFields.longestOn.default(null),
  highLimit: channelFields.highLimit.default(null),
  runProof: channelFields.runProof.default(null),
  fallback: channelFields.fallback.default(null),
  flow: channelFields.flow.default(null),
  protection: channelFields.protection.default(null),
});
export const ChannelAmend = z.strictObject(channelFields).partial();

export const InterlockCreate = z
  .strictObject({
    channel: Key,
    kind: z.enum(['never-with', 'needs']),
    other: Key,
    delay: wholeSeconds(0, 3600).default(0),
    frostMayBreak: z.boolean().default(false),
  })
  .refine((interlock) => interlock.channel !== interlock.other, {
    path: ['other'],
    error: 'A channel cannot be interlocked with itself.',
  });

export const InterlockAmend = z
  .strictObject({
    channel: Key,
    kind: z.enum(['never-with', 'needs']),
    other: Key,
    delay: wholeSeconds(0, 3600),
    frostMayBreak: z.boolean(),
  })
  .partial();

export const LockoutCreate = z.strictObject({ channel: Key, why: Why });

export const HandCommand = z.strictObject({
  state: z.enum(['on', 'off']),
  seconds: wholeSeconds(1, 43_200).optional(),
  holdInFrost: z.boolean().optional(),
});
export const AllOff = z.strictObject({ why: Why.optional() });
