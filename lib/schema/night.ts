import { z } from 'zod';
import { PageQuery } from './common';

const Night = z.iso.date('Give a date as YYYY-MM-DD.');

export const NightsQuery = z.strictObject({
  limit: PageQuery.shape.limit,
  /** `2026-11-26 gate-heap`: behind that night of that source. */
  cursor: z
    .string()
    .regex(/^\d{4}-\d{2}-\d{2} [a-z0-9-]{1,80}$/, 'Give the cursor as it stood in the page before.')
    .optional(),
  source: z.string().min(1).max(140).optional(),
  from: Night.optional(),
  to: Night.optional(),
  format: z.enum(['json', 'csv']).default('json'),
});

const NightAnswer = z.strictObject({
  night: z.string(),
  source: z.string(),
  hours: z.number(),
  onSeconds: z.number(),
  restSeconds: z.number(),
  dutyOfNight: z.number(),
  dutyOfDraw: z.number().nullable(),
  starts: z.number(),
  heat: z.strictObject({ kWh: z.number(), sd: z.number() }).nullable(),
  electricity: z.strictObject({ kWh: z.number() }).nullable(),
  lowest: z.strictObject({ point: z.string(), value: z.number(), at: z.string() }).nullable(),
  belowFrostLimitSeconds: z.number(),
  recovery: z
    .strictObject({ tau: z.number(), tauSd: z.number(), level: z.number(), rests: z.number() })
    .nullable(),
  coverage: z.number(),
});
export const NightList = z.strictObject({ items: z.array(NightAnswer), next: z.string().nullable() });
