import { z } from 'zod';
import { listOf } from './common';
import { Email } from './people';

export const SPANS = ['week', 'month', 'winter'] as const;
export type ReportSpan = (typeof SPANS)[number];
/** In the order in which they stand on paper. */
export const SECTIONS = ['figures', 'nights', 'recovery', 'money', 'book', 'alarms'] as const;
export type ReportSection = (typeof SECTIONS)[number];

const Sections = z
  .array(z.enum(SECTIONS))
  .min(1, 'Choose one section at least.')
  .refine((all) => new Set(all).size === all.length, 'Each section once.');

export const ReportScheduleCreate = z.strictObject({
  span: z.enum(SPANS),
  sections: Sections.default([...SECTIONS]),
  to: z.array(Email).min(1, 'Choose who gets it.').max(20),
});
export const ReportSchedule = z.strictObject({
  id: z.string(),
  span: z.enum(SPANS),
  sections: Sections,
  to: z.array(z.string()),
  by: z.string(),
  createdAt: z.string(),
  /** The newest letter, whoever it went to; `sentAt` is null where it is not known whether it went. */
  last: z
    .strictObject({ fromNight: z.string(), toNight: z.string(), sentAt: z.string().nullable() })
    .nullable(),
});
export type ReportSchedule = z.infer<typeof ReportSchedule>;
export const ReportScheduleList = listOf(ReportSchedule);
