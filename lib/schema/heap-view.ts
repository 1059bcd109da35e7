import { z } from 'zod';
import { PageQuery } from './common';
import { HEAP_ENTRY_KINDS, HeapMaterial } from './heap';

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
