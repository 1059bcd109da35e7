import { z } from 'zod';

export const Alarm = z.strictObject({
  id: z.string(),
  /** Slug; null for what concerns the whole holding. */
  house: z.string().nullable(),
  key: z.string(),
  kind: z.string(),
  about: z.strictObject({
    point: z.string().optional(),
    channel: z.string().optional(),
    source: z.string().optional(),
    node: z.string().optional(),
  }),
  data: z.record(z.string(), z.unknown()),
  raisedAt: z.string(),
  clearedAt: z.string().nullable(),
  acknowledgedAt: z.string().nullable(),
  acknowledgedBy: z.string().nullable(),
});
export type Alarm = z.infer<typeof Alarm>;

export const AlarmWithEvents = z.strictObject({
  ...Alarm.shape,
  events: z.array(
    z.strictObject({
      at: z.string(),
      kind: z.enum(['raised', 'acknowledged', 'cleared']),
      by: z.string().nullable(),
      note: z.string().nullable(),
    }),
  ),
});
