import { z } from 'zod';
import { finite, Instant, Text } from './common';

export const HEAP_ENTRY_KINDS = ['built', 'fed', 'watered', 'turned', 'covered', 'note'] as const;

export const HeapMaterial = z.strictObject({
  material: z.string().trim().min(1, 'Name the material.').max(80),
  kilograms: finite(0, 100_000, 'kg').optional(),
  litres: finite(0, 1_000_000, 'L').optional(),
});

export const HeapEntryCreate = z.strictObject({
  /** Slug or id of the source. */
  source: z.string().min(1, 'Choose the heap.').max(140),
  kind: z.enum(HEAP_ENTRY_KINDS),
  at: Instant.optional(),
  text: Text.default(''),
  materials: z.array(HeapMaterial).max(20).default([]),
  litresOfWater: finite(0, 100_000, 'L').optional(),
  volume: finite(0, 10_000, 'm³').optional(),
});
export const HeapEntryAmend = HeapEntryCreate.omit({ source: true }).partial();
