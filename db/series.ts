/**
 * `reading` is partitioned by month and `rollup` is filled by plain SQL; drizzle-kit knows neither, so they are declared
 * outside the schema files that it reads and made by a migration of their own.
 */
import { bigint, doublePrecision, integer, pgTable, primaryKey, smallint } from 'drizzle-orm/pg-core';
import { instant } from './schema/columns';

export const reading = pgTable(
  'reading',
  {
    point: bigint('point', { mode: 'number' }).notNull(),
    at: instant('at').notNull(),
    value: doublePrecision('value').notNull(),
    /** 0 good, 1 uncertain, 2 bad, as judged when it was taken in. */
    quality: smallint('quality').notNull().default(0),
  },
  (table) => [primaryKey({ columns: [table.point, table.at] })],
);

/** Least, mean, greatest and count of good and uncertain readings over `stepS` = 300 or 3600 s from `at`. */
export const rollup = pgTable(
  'rollup',
  {
    point: bigint('point', { mode: 'number' }).notNull(),
    stepS: integer('step_s').notNull(),
    at: instant('at').notNull(),
    least: doublePrecision('least').notNull(),
    mean: doublePrecision('mean').notNull(),
    greatest: doublePrecision('greatest').notNull(),
    count: integer('count').notNull(),
  },
  (table) => [primaryKey({ columns: [table.point, table.stepS, table.at] })],
);

/**
 * Hours into which readings came late: their roll-ups, and the nights that hold them, are made anew. Written before the
 * readings are, so that a worker that is killed between the two leaves an hour too much rather than one too few.
 */
export const readingDue = pgTable(
  'reading_due',
  { point: bigint('point', { mode: 'number' }).notNull(), hour: instant('hour').notNull() },
  (table) => [primaryKey({ columns: [table.point, table.hour] })],
);
