import { z } from 'zod';
import { SMELLS, SQUEEZES } from '@/lib/analysis/heap-facts';
import { PageQuery, Uuid } from './common';
import { HEAP_ENTRY_KINDS, HeapMaterial } from './heap';

export const Photograph = z.strictObject({
  id: z.string(),
  width: z.number(),
  height: z.number(),
  by: z.string(),
  enteredAt: z.string(),
});
export type Photograph = z.infer<typeof Photograph>;
export const PhotographQuery = z.strictObject({ size: z.enum(['whole', 'thumbnail']).default('whole') });
/** The id is made by whoever sends it: sent twice, it is kept once. */
export const PhotographSend = z.strictObject({ id: Uuid.optional() });

export const HeapEntry = z.strictObject({
  id: z.string(),
  revision: z.number(),
  /** Slug of the heap. */
  source: z.string(),
  kind: z.enum(HEAP_ENTRY_KINDS),
  at: z.string(),
  text: z.string(),
  materials: z.array(HeapMaterial),
  litresOfWater: z.number().nullable(),
  /** m³ */
  volume: z.number().nullable(),
  smell: z.enum(SMELLS).nullable(),
  squeeze: z.enum(SQUEEZES).nullable(),
  photographs: z.array(Photograph),
  by: z.string(),
  enteredAt: z.string(),
  amendedBy: z.string().nullable(),
  amendedAt: z.string().nullable(),
});
export type HeapEntry = z.infer<typeof HeapEntry>;

export const HeapEntryQuery = z.strictObject({
  ...PageQuery.shape,
  /** Slug or id of one heap. */
  source: z.string().min(1).max(140).optional(),
});
