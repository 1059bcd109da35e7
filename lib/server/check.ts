import type { z } from 'zod';
import { sayPlainly } from './body-errors';
import { notValid } from './errors';

/** @throws Problem `not-valid` with every issue at its path */
export function check<T extends z.ZodType>(schema: T, value: unknown): z.output<T> {
  const parsed = schema.safeParse(value, { error: sayPlainly });
  if (!parsed.success) throw notValid(parsed.error);
  return parsed.data;
}

/** A change of some fields, checked as the whole that it makes. */
export function merged<T extends z.ZodObject>(schema: T, before: object, change: object): z.output<T> {
  const known = Object.entries(before).filter(([name]) => Object.hasOwn(schema.shape, name));
  return check(schema, { ...Object.fromEntries(known), ...change });
}
