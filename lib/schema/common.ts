import { z } from 'zod';

/** A key names a point, node or channel inside its house and goes on the wire, so it keeps SenML's safe characters. */
export const Key = z
  .string()
  .regex(
    /^[A-Za-z0-9][A-Za-z0-9._-]{0,62}$/,
    'Use letters, digits, dot, dash or underscore; begin with a letter or digit; 63 at most.',
  );

/**
 * Whether there is anything to see: spaces without width and their like leave a row that nobody can press. Of no text at
 * all each field says in its own words whether it is missing.
 */
export const isSeen = (text: string) =>
  text === '' || /[^\p{C}\p{Z}\p{Default_Ignorable_Code_Point}]/u.test(text);
export const SEEN = 'Give something that can be seen.';
const isOneLine = (text: string) => !/[\t\n\r\u2028\u2029]/.test(text);

export const Name = z
  .string()
  .trim()
  .min(1, 'Give a name.')
  .max(120, 'At most 120 characters.')
  .refine(isOneLine, 'Give one line, without tabs.')
  .refine(isSeen, SEEN);
export const Text = z.string().trim().max(4000, 'At most 4000 characters.');
export const Why = z
  .string()
  .trim()
  .min(1, 'Say why in a few words.')
  .max(500, 'At most 500 characters.')
  .refine(isSeen, SEEN);

export const finite = (least: number, most: number, unit: string) =>
  z
    .number({ error: `Give a number in ${unit}.` })
    .min(least, `At least ${least} ${unit}.`)
    .max(most, `At most ${most} ${unit}.`);

/** Of a value of a point in its own unit: a meter that counts all that a holding ever used stays under it. */
export const MEASURED_MOST = 1e9;
export const Measured = z
  .number({ error: 'Give a number.' })
  .min(-MEASURED_MOST, 'At least −1,000,000,000.')
  .max(MEASURED_MOST, 'At most 1,000,000,000.');

export const wholeSeconds = (least: number, most: number) =>
  z
    .number({ error: 'Give whole seconds.' })
    .int('Give whole seconds.')
    .min(least, `At least ${least} s.`)
    .max(most, `At most ${most} s.`);

/** °C of anything this product measures, flame and liquid nitrogen aside. */
export const Celsius = finite(-60, 200, '°C');

export const Zone = z.string().refine(isZone, 'Name an IANA time zone, such as Europe/London.');

function isZone(value: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: value });
    return value.includes('/') || value === 'UTC';
  } catch {
    return false;
  }
}

/** `HH:MM` in the house's zone. */
export const ClockTime = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'Give a time as HH:MM.');

/** A clock time, or the sun with an offset: `sunset-01:00`, `sunrise+00:30`. */
export const DayTime = z
  .string()
  .regex(
    /^(([01]\d|2[0-3]):[0-5]\d|(sunrise|sunset)([+-](0\d|1[0-2]):[0-5]\d)?)$/,
    'Give HH:MM, or sunrise or sunset with an offset, such as sunset-01:00.',
  );

/** `MM-DD`. 29 February is a day like others: in a common year it is read as 1 March. */
export const MonthDay = z
  .string()
  .regex(/^(0[1-9]|1[0-2])-(0[1-9]|[12]\d|3[01])$/, 'Give month and day as MM-DD.')
  .refine(
    (value) =>
      Number(value.slice(3)) <=
      ([31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][Number(value.slice(0, 2)) - 1] ?? 0),
    'That month has no such day.',
  );

export const Uuid = z.uuid();

export const Instant = z.iso
  .datetime({ offset: true, error: 'Give an ISO 8601 time with offset.' })
  .refine((value) => value >= '1970' && value < '2200', 'Give a time between 1970 and 2200.');

/** Where a list goes on: the last row given, by its instant where the list is in order of time. */
export interface Place {
  id: string;
  at?: number | undefined;
}
const PlaceText = z.strictObject({
  id: z.string().max(80),
  at: z.number().int().min(0).max(8e15).optional(),
});

export function writeCursor(place: Place): string {
  return btoa(JSON.stringify(place)).replaceAll('+', '-').replaceAll('/', '_').replaceAll('=', '');
}

export const Cursor = z
  .string()
  .max(400)
  .transform((text, context): Place => {
    try {
      return PlaceText.parse(JSON.parse(atob(text.replaceAll('-', '+').replaceAll('_', '/'))));
    } catch {
      context.addIssue({ code: 'custom', message: 'Give the cursor as it stood in the page before.' });
      return z.NEVER;
    }
  });

/** Paging of every list. */
export const PageQuery = z.strictObject({
  limit: z.coerce
    .number({ error: 'Give a whole number.' })
    .int('Give a whole number.')
    .min(1, 'At least 1.')
    .max(500, 'At most 500.')
    .default(100),
  cursor: Cursor.optional(),
});
export type PageQuery = z.infer<typeof PageQuery>;

export const listOf = <T extends z.ZodType>(item: T) =>
  z.strictObject({ items: z.array(item), next: z.string().nullable() });
