import { z } from 'zod';
import { USUAL, type Preferences } from '@/lib/units/preferences';

const fields = {
  temperature: z.enum(['C', 'F']),
  clock: z.union([z.literal(24), z.literal(12)]),
  flow: z.enum(['L/s', 'cfm']),
  length: z.enum(['m', 'ft']),
};

/** What a person's row keeps. A key that is missing or no longer known falls back, so an old row never fails. */
export const StoredPreferences: z.ZodType<Preferences> = z.object({
  temperature: fields.temperature.catch(USUAL.temperature),
  clock: fields.clock.catch(USUAL.clock),
  flow: fields.flow.catch(USUAL.flow),
  length: fields.length.catch(USUAL.length),
});

/** The theme belongs to the device, so it is kept in a cookie of its own and not with the person. */
export const Theme = z.enum(['system', 'light', 'dark']);
export type Theme = z.infer<typeof Theme>;

/** What may be changed, one or several at a time. */
export const PreferencesChange = z.strictObject({ ...fields, theme: Theme }).partial();
export type PreferencesChange = z.infer<typeof PreferencesChange>;
