import { sql } from 'drizzle-orm';
import {
  bigint,
  doublePrecision,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { organization } from './auth';
import { createdAt, holdingId, instant, removedAt, revision } from './columns';

export const house = pgTable(
  'house',
  {
    holdingId: holdingId().references(() => organization.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    slug: text('slug').notNull(),
    name: text('name').notNull(),
    zone: text('zone').notNull(),
    latitude: doublePrecision('latitude').notNull(),
    longitude: doublePrecision('longitude').notNull(),
    altitude: doublePrecision('altitude').notNull(),
    frostLimit: doublePrecision('frost_limit'),
    frostAlarm: doublePrecision('frost_alarm'),
    /** A thermostat that keeps the house without any software; null: nobody has said that there is one. */
    lastResort: jsonb('last_resort').$type<{ below: number; provedOn: string | null }>(),
    /** Out of an archive and not put in service yet: the worker does not take it up, and no node can call it. */
    laidUpAt: instant('laid_up_at'),
    /** Steps of the set-up that somebody put off: words of lib/analysis/setup.ts. */
    setupSkipped: jsonb('setup_skipped').$type<string[]>().notNull().default([]),
    /** Grows with every change of anything the core reads of this house. */
    planRevision: bigint('plan_revision', { mode: 'number' }).notNull().default(1),
    revision: revision(),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    uniqueIndex('house_slug')
      .on(table.holdingId, table.slug)
      .where(sql`removed_at is null`),
  ],
);
