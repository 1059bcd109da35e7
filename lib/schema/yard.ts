import { z } from 'zod';
import { Celsius, finite, Key, Name, Uuid, wholeSeconds, Why, Zone } from './common';

export const POINT_ROLES = [
  'house-air',
  'bench',
  'outdoors',
  'loop-intake',
  'loop-return',
  'heap-core',
  'heap-base',
  'heap-edge',
  'ground',
  'humidity',
  'light',
  'contact',
  'current',
  'pressure',
  'voltage',
  'power',
  'gas-co',
  'gas-co2',
  'gas-nh3',
  'other',
] as const;
export type PointRole = (typeof POINT_ROLES)[number];

export const UNITS = [
  'Cel',
  'K',
  '%RH',
  '/',
  '%',
  'W/m2',
  'ppm',
  'Pa',
  'm/s',
  'W',
  'Wh',
  'V',
  'A',
  'm3/s',
] as const;

export const houseFields = {
  name: Name,
  zone: Zone,
  latitude: finite(-90, 90, '°'),
  longitude: finite(-180, 180, '°'),
  altitude: finite(-450, 6000, 'm'),
  frostLimit: finite(-40, 15, '°C').nullable(),
  frostAlarm: finite(-40, 15, '°C').nullable(),
  /** A thermostat that works without any software: what it is set to, and when somebody saw it work. */
  lastResort: z
    .strictObject({
      below: finite(-40, 15, '°C'),
      provedOn: z.iso.date({ error: 'Give the date as YYYY-MM-DD.' }).nullable().default(null),
    })
    .nullable(),
};
export const HouseCreate = z.strictObject({
  ...houseFields,
  altitude: houseFields.altitude.default(0),
  frostLimit: houseFields.frostLimit.default(null),
  frostAlarm: houseFields.frostAlarm.default(null),
  lastResort: houseFields.lastResort.default(null),
});
export const HouseAmend = z.strictObject(houseFields).partial();

export const NODE_KINDS = ['socket', 'http', 'modbus', 'mqtt'] as const;
export const nodeFields = {
  key: Key,
  kind: z.enum(NODE_KINDS),
  reportEvery: wholeSeconds(1, 3600),
  channels: z.number().int().min(0).max(64),
};
export const NodeCreate = z.strictObject({
  ...nodeFields,
  reportEvery: nodeFields.reportEvery.default(30),
  channels: nodeFields.channels.default(8),
});
export const NodeAmend = z.strictObject(nodeFields).omit({ kind: true }).partial();

/** Kinds of derived point; which of them the core reckons yet is told by the check of a rule that uses one. */
export const DERIVED = [
  'difference',
  'mean',
  'least',
  'greatest',
  'trend',
  'dew-point',
  'vapour-pressure-deficit',
  'lift',
  'loop-heat',
] as const;

/** How many points each kind takes; the others take one to twelve. */
const TAKES: Partial<Record<(typeof DERIVED)[number], number>> = {
  difference: 2,
  trend: 1,
  'dew-point': 2,
  'vapour-pressure-deficit': 2,
  lift: 2,
  'loop-heat': 2,
};

const Derived = z
  .strictObject({
    of: z.enum(DERIVED),
    points: z.array(Key).min(1).max(12),
    window: wholeSeconds(60, 86_400).optional(),
  })
  .superRefine(({ of, points }, context) => {
    const takes = TAKES[of];
    if (takes === undefined || takes === points.length) return;
    const message =
      takes === 1 ? `A ${of} is of one point.` : `A ${of} takes ${takes} points, in their order.`;
    context.addIssue({ code: 'custom', path: ['points'], message });
  });

export const pointFields = {
  key: Key,
  node: Key.nullable(),
  name: Name,
  role: z.enum(POINT_ROLES),
  unit: z.enum(UNITS),
  min: z.number().nullable(),
  max: z.number().nullable(),
  staleAfter: wholeSeconds(1, 86_400).nullable(),
  maxRate: z.number().positive('Above 0 a second, or leave it out.').nullable(),
  frozenAfter: wholeSeconds(60, 31 * 86_400).nullable(),
  offset: z.number().min(-50).max(50),
  gain: z.number().min(0.1, 'Between 0.1 and 10.').max(10, 'Between 0.1 and 10.'),
  sensor: z.string().trim().max(60).nullable(),
  derived: Derived.nullable(),
};
export const PointCreate = z
  .strictObject({
    ...pointFields,
    node: pointFields.node.default(null),
    min: pointFields.min.default(null),
    max: pointFields.max.default(null),
    staleAfter: pointFields.staleAfter.default(null),
    maxRate: pointFields.maxRate.default(null),
    frozenAfter: pointFields.frozenAfter.default(null),
    offset: pointFields.offset.default(0),
    gain: pointFields.gain.default(1),
    sensor: pointFields.sensor.default(null),
    derived: pointFields.derived.default(null),
  })
  .refine((point) => point.node === null || point.derived === null, {
    path: ['node'],
    error: 'A point is measured by a node, or derived from other points, not both.',
  })
  .refine((point) => point.min === null || point.max === null || point.min < point.max, {
    path: ['max'],
    error: 'The greatest value must be above the least.',
  });
export const PointAmend = z.strictObject(pointFields).partial();

export const SOURCE_KINDS = ['heap', 'ground', 'heater', 'other'] as const;
export const sourceFields = {
  name: Name,
  kind: z.enum(SOURCE_KINDS),
  corePoint: Key.nullable(),
  basePoint: Key.nullable(),
  coreFloor: Celsius.nullable(),
  dailyLimit: wholeSeconds(60, 10 * 86_400).nullable(),
  ready: z.strictObject({ level: Celsius, for: wholeSeconds(60, 30 * 86_400) }).nullable(),
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

export const LOAD_KINDS = ['motor', 'vent', 'heater', 'valve', 'lamp', 'other'] as const;
const Load = z.strictObject({
  kind: z.enum(LOAD_KINDS),
  watts: finite(0, 50_000, 'W').optional(),
  volts: finite(0, 1000, 'V').optional(),
  supply: z.enum(['ac', 'dc']).optional(),
  contactAmps: finite(0, 200, 'A').optional(),
});
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
      above: z.number().min(0, 'Not under 0: a standing fan would pass for a running one.'),
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
    .refine((fallback) => fallback.above - fallback.below >= 0.5, {
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
});
export const ChannelAmend = z.strictObject(channelFields).partial();

export const LoopCreate = z.strictObject({
  name: Name,
  source: z.string().max(140),
  channel: Key,
  intake: Key,
  return: Key,
});
export const LoopAmend = LoopCreate.partial();

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

export const EntityRef = z.union([Uuid, z.string().min(1).max(140)]);
