import { z } from 'zod';
import { Instant, isSeen, listOf, SEEN } from './common';

export const HEAP_JOB_KINDS = ['build', 'first-frost', 'spring', 'rebuild', 'own'] as const;

const Day = z.iso
  .date({ error: 'Give a day as YYYY-MM-DD.' })
  .refine((value) => value >= '1970' && value < '2200', {
    error: 'Give a day between 1970 and 2200.',
  });
const Line = z
  .string()
  .trim()
  .min(1, 'Say what is to be done.')
  .max(200, 'At most 200 characters.')
  .refine(isSeen, SEEN);

const fields = {
  kind: z.enum(HEAP_JOB_KINDS),
  title: z
    .string()
    .trim()
    .min(1, 'Give the job a name.')
    .max(120, 'At most 120 characters.')
    .refine(isSeen, SEEN),
  dueOn: Day,
  checklist: z.array(z.strictObject({ text: Line, done: z.boolean().default(false) })).max(30),
};
export const HeapJobCreate = z.strictObject({
  source: z.string().min(1, 'Choose the heap.').max(140),
  kind: fields.kind.default('own'),
  title: fields.title,
  dueOn: fields.dueOn,
  checklist: fields.checklist.default([]),
});
export const HeapJobAmend = z
  .strictObject({ title: fields.title, dueOn: fields.dueOn, checklist: fields.checklist, done: z.boolean() })
  .partial();

export const HeapJob = z.strictObject({
  id: z.string(),
  revision: z.number(),
  source: z.string(),
  kind: z.enum(HEAP_JOB_KINDS),
  title: z.string(),
  dueOn: z.string(),
  checklist: z.array(
    z.strictObject({ text: z.string(), doneAt: Instant.nullable(), doneBy: z.string().nullable() }),
  ),
  doneAt: z.string().nullable(),
  doneBy: z.string().nullable(),
});
export type HeapJob = z.infer<typeof HeapJob>;
export const HeapJobList = listOf(HeapJob);
export const HeapJobQuery = z.strictObject({ source: z.string().min(1).max(140).optional() });

export const CalendarLink = z.strictObject({
  id: z.string(),
  createdAt: z.string(),
  lastUsedAt: z.string().nullable(),
});
export type CalendarLink = z.infer<typeof CalendarLink>;
export const CalendarLinkList = listOf(CalendarLink);
/** Its address carries a secret and is told once. */
export const CalendarLinkMade = z.strictObject({ ...CalendarLink.shape, address: z.string() });
