import { z } from 'zod';
import { FINDING_KINDS } from '@/lib/analysis/heap-facts';
import { listOf, Why } from './common';

/** A finding is set aside by naming it with the evidence it stood on, as it was read. */
export const DismissalCreate = z.strictObject({
  source: z.string().min(1).max(140),
  kind: z.enum(FINDING_KINDS),
  mark: z.string().min(1).max(200),
  level: z.number(),
  why: Why,
});
export const Dismissal = z.strictObject({
  id: z.string(),
  source: z.string(),
  kind: z.string(),
  mark: z.string(),
  level: z.number(),
  why: z.string(),
  by: z.string(),
  at: z.string(),
});
export type Dismissal = z.infer<typeof Dismissal>;

export const HeapFinding = z.strictObject({
  kind: z.string(),
  urgency: z.enum(['act', 'soon', 'look']),
  sure: z.enum(['measured', 'seen', 'reckoned']),
  at: z.string(),
  mark: z.string(),
  level: z.number(),
  text: z.string(),
  why: z.string(),
  next: z.string(),
  source: z.string(),
  dismissed: z.strictObject({ id: z.string(), why: z.string(), by: z.string(), at: z.string() }).nullable(),
});
export const HeapFindingList = listOf(HeapFinding);
export const HeapFindingQuery = z.strictObject({ source: z.string().min(1).max(140) });
