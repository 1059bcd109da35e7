import { z } from 'zod';
import { finite, Instant, Text } from './common';

export const HEAP_ENTRY_KINDS = ['built', 'fed', 'watered', 'turned', 'covered', 'note'] as const;

export const HeapMaterial = z.strictObject({
  material: z.string().trim().min(1, 'Name the material.').max(80),
  kilograms: finite(0, 100_000, 'kg').optional(),
  litres: finite(0, 1_000_000, 'L').optional(),
});

const fields = {
  kind: z.enum(HEAP_ENTRY_KINDS),
  at: Instant,
  text: Text,
  materials: z.array(HeapMaterial).max(20),
  litresOfWater: finite(0, 100_000, 'L'),
  volume: finite(0, 10_000, 'm³'),
};
export const HeapEntryCreate = z.strictObject({
  /** Slug or id of the source. */
  source: z.string().min(1, 'Choose the heap.').max(140),
  kind: fields.kind,
  at: fields.at.optional(),
  text: fields.text.default(''),
  materials: fields.materials.default([]),
  litresOfWater: fields.litresOfWater.optional(),
  volume: fields.volume.optional(),
});
// Made of the bare fields: a default inside would be filled in, and wipe what the change does not speak of.
export const HeapEntryAmend = z
  .strictObject({
    ...fields,
    litresOfWater: fields.litresOfWater.nullable(),
    volume: fields.volume.nullable(),
  })
  .partial();
