/** A calibration of a point: what it read beside which reference, and what came of it. */
import { z } from 'zod';
import { CALIBRATION_KINDS, REFERENCES } from '@/lib/analysis/calibrate';
import { finite, Key } from './common';

const Place = z.strictObject({
  at: z.enum(REFERENCES),
  /** Only beside a thermometer: what it showed. Ice and boiling water are reckoned here. */
  reference: finite(-60, 200, '°C').optional(),
  /** Only beside a thermometer: by how much it may be wrong. */
  referenceSd: finite(0.001, 5, '°C').optional(),
  /** Mean of the steady readings, as the node sent them. */
  raw: finite(-200, 400, '°C'),
  rawSd: finite(0, 5, '°C'),
  readings: z.number().int('Give a whole number.').min(3, 'At least 3 readings.').max(10_000),
});

export const CalibrationCreate = z
  .strictObject({
    places: z.array(Place).min(1, 'Give one place at least.').max(2, 'At most two places.'),
    note: z.string().trim().max(500, 'At most 500 characters.').default(''),
    /** It is more than 3 °C, or a gain outside 0.9 to 1.1, and meant so. */
    acceptUnusual: z.boolean().default(false),
  })
  .superRefine(({ places }, context) => {
    places.forEach((place, at) => {
      const isTold = place.reference !== undefined && place.referenceSd !== undefined;
      if (place.at === 'thermometer' && !isTold)
        context.addIssue({
          code: 'custom',
          path: ['places', at, place.reference === undefined ? 'reference' : 'referenceSd'],
          message: 'Give what the thermometer showed, and by how much it may be wrong.',
        });
      if (place.at !== 'thermometer' && (place.reference !== undefined || place.referenceSd !== undefined))
        context.addIssue({
          code: 'custom',
          path: ['places', at, 'reference'],
          message: 'Leave it out: ice and boiling water are reckoned from the house’s altitude.',
        });
    });
  });
export type CalibrationCreate = z.infer<typeof CalibrationCreate>;

export const Calibration = z.strictObject({
  id: z.string(),
  kind: z.enum(CALIBRATION_KINDS),
  /** Readings from then on are corrected by it. */
  from: z.string(),
  offset: z.number(),
  gain: z.number(),
  by: z.string(),
  places: z
    .array(
      z.strictObject({
        at: z.enum(REFERENCES),
        reference: z.number(),
        referenceSd: z.number(),
        raw: z.number(),
        rawSd: z.number(),
        readings: z.number(),
      }),
    )
    .nullable(),
  /** Deviation that is left at the worse place, in the point's unit; null where it was typed. */
  residual: z.number().nullable(),
  note: z.string(),
});
export type Calibration = z.infer<typeof Calibration>;

/** What a point reads just now, before any calibration. */
export const RawReading = z.strictObject({
  /** The newest; null where it never sent one. */
  at: z.string().nullable(),
  raw: z.number().nullable(),
  /** Of the last minutes. */
  mean: z.number().nullable(),
  sd: z.number().nullable(),
  change: z.number().nullable(),
  readings: z.number(),
  seconds: z.number(),
  isSteady: z.boolean(),
  why: z.enum(['silent', 'few', 'moving', 'scattered']).nullable(),
});
export type RawReading = z.infer<typeof RawReading>;

export const ExchangePlaces = z.strictObject({ with: Key });
