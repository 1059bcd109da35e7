import { z } from 'zod';
import { SMELLS, SQUEEZES } from '@/lib/analysis/heap-facts';
import { finite, Instant, isSeen, SEEN, Text, Uuid } from './common';

export const HEAP_ENTRY_KINDS = ['built', 'fed', 'watered', 'turned', 'covered', 'note'] as const;

export const HeapMaterial = z.strictObject({
  material: z
    .string()
    .trim()
    .min(1, 'Name the material.')
    .max(80, 'At most 80 characters.')
    .refine(isSeen, SEEN),
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
  /** What nose and hand found. */
  smell: z.enum(SMELLS),
  squeeze: z.enum(SQUEEZES),
};
export const HeapEntryCreate = z.strictObject({
  /** Made by whoever sends it: sent twice under one id, it is written once. */
  id: Uuid.optional(),
  /** Slug or id of the source. */
  source: z.string().min(1, 'Choose the heap.').max(140),
  kind: fields.kind,
  at: fields.at.optional(),
  text: fields.text.default(''),
  materials: fields.materials.default([]),
  litresOfWater: fields.litresOfWater.optional(),
  volume: fields.volume.optional(),
  smell: fields.smell.optional(),
  squeeze: fields.squeeze.optional(),
});
// Made of the bare fields: a default inside would be filled in, and wipe what the change does not speak of.
export const HeapEntryAmend = z
  .strictObject({
    ...fields,
    litresOfWater: fields.litresOfWater.nullable(),
    volume: fields.volume.nullable(),
    smell: fields.smell.nullable(),
    squeeze: fields.squeeze.nullable(),
  })
  .partial();
