import { z } from 'zod';
import { finite, isSeen, listOf, SEEN } from './common';

const share = (what: string) =>
  z
    .number({ error: `Give ${what} as a share from 0 to 1.` })
    .min(0, 'At least 0.')
    .max(1, 'At most 1.');

const fields = {
  name: z.string().trim().min(1, 'Name the material.').max(80, 'At most 80 characters.').refine(isSeen, SEEN),
  /** kg/m³, loose */
  density: finite(5, 3000, 'kg/m³').nullable(),
  moisture: share('water').refine((value) => value < 1, 'Under 1: there is some dry matter in it.'),
  carbon: share('carbon').refine((value) => value <= 0.75, 'At most 0.75 of the dry mass.'),
  nitrogen: share('nitrogen').refine((value) => value <= 0.5, 'At most 0.5 of the dry mass.'),
  from: z
    .string()
    .trim()
    .min(1, 'Say where the figures come from.')
    .max(200, 'At most 200 characters.')
    .refine(isSeen, SEEN),
};

/** A material of the holding's own. Water is a share of the wet mass, carbon and nitrogen of the dry. */
export const MaterialCreate = z.strictObject({ ...fields, density: fields.density.default(null) });
export const MaterialAmend = z.strictObject(fields).partial();
export const Material = z.strictObject({
  id: z.string(),
  revision: z.number(),
  name: z.string(),
  density: z.number().nullable(),
  moisture: z.number(),
  carbon: z.number(),
  nitrogen: z.number(),
  from: z.string(),
  by: z.string(),
});
export type Material = z.infer<typeof Material>;
export const MaterialList = listOf(Material);
