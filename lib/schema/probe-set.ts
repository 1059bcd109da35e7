import { z } from 'zod';
import { Celsius, finite, Instant, listOf, PageQuery, Text, Uuid } from './common';

const whole = (least: number, most: number) => z.number().int('Give a whole number.').min(least).max(most);
const Side = z.string().trim().max(20, 'At most 20 characters.');

/** The section of a heap in which a round is probed. */
export const Section = z.strictObject({
  widthM: finite(0.3, 30, 'm'),
  heightM: finite(0.1, 10, 'm'),
  sunkM: finite(0, 5, 'm'),
  columns: whole(1, 8),
  rows: whole(1, 6),
  left: Side,
  right: Side,
});

export const ProbePlace = z.strictObject({
  column: whole(0, 7),
  row: whole(0, 5),
  celsius: Celsius,
});

type Round = {
  section?: z.infer<typeof Section> | undefined;
  places?: z.infer<typeof ProbePlace>[] | undefined;
};

function placesLieInSection({ section, places }: Round, context: z.RefinementCtx): void {
  const seen = new Set<string>();
  for (const [index, { column, row }] of (places ?? []).entries()) {
    const path = ['places', index];
    if (section !== undefined && (column >= section.columns || row >= section.rows))
      context.addIssue({ code: 'custom', path, message: 'That place is not in the section.' });
    if (seen.has(`${column} ${row}`))
      context.addIssue({ code: 'custom', path, message: 'That place was given already.' });
    seen.add(`${column} ${row}`);
  }
}

const fields = {
  at: Instant,
  section: Section,
  places: z.array(ProbePlace).min(1, 'Probe one place at least.').max(48),
  text: Text,
};
export const ProbeSetCreate = z
  .strictObject({
    /** Made by whoever sends it: sent twice under one id, it is written once. */
    id: Uuid.optional(),
    /** Slug or id of the heap. */
    source: z.string().min(1, 'Choose the heap.').max(140),
    at: fields.at.optional(),
    section: fields.section,
    places: fields.places,
    text: fields.text.default(''),
  })
  .superRefine(placesLieInSection);
/** Section and places belong together, so they are amended together. */
export const ProbeSetAmend = z
  .strictObject({
    at: fields.at.optional(),
    section: fields.section,
    places: fields.places,
    text: fields.text,
  })
  .superRefine(placesLieInSection);

export const ProbeSet = z.strictObject({
  id: z.string(),
  revision: z.number(),
  source: z.string(),
  at: z.string(),
  section: Section,
  places: z.array(ProbePlace),
  text: z.string(),
  by: z.string(),
  enteredAt: z.string(),
  amendedBy: z.string().nullable(),
  amendedAt: z.string().nullable(),
});
export type ProbeSet = z.infer<typeof ProbeSet>;
export const ProbeSetList = listOf(ProbeSet);
export const ProbeSetQuery = z.strictObject({
  ...PageQuery.shape,
  /** Slug or id of one heap. */
  source: z.string().min(1).max(140).optional(),
});
