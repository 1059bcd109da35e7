import { z } from 'zod';
import { pointUnits } from '@/lib/field/units';
import { isSeen, Key, Measured, Name, SEEN, wholeSeconds } from './common';

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

export const PointUnit = z.enum(pointUnits);

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
    window: wholeSeconds(1, 86_400).optional(),
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
  unit: PointUnit,
  min: Measured.nullable(),
  max: Measured.nullable(),
  staleAfter: wholeSeconds(1, 86_400).nullable(),
  maxRate: Measured.positive('Above 0 a second, or leave it out.').nullable(),
  frozenAfter: wholeSeconds(1, 31 * 86_400).nullable(),
  offset: z.number().min(-50).max(50),
  gain: z.number().min(0.1, 'Between 0.1 and 10.').max(10, 'Between 0.1 and 10.'),
  sensor: z.string().trim().max(60).refine(isSeen, SEEN).nullable(),
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
