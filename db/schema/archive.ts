import { bigint, index, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { organization } from './auth';
import { holdingId, instant } from './columns';

/** A whole holding on its way out as one file, or on its way in. What comes in lies under the data directory meanwhile. */
export const archive = pgTable(
  'archive',
  {
    holdingId: holdingId().references(() => organization.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    way: text('way').$type<'out' | 'in'>().notNull(),
    state: text('state').notNull(),
    name: text('name').notNull(),
    /** Of the file: as announced where it comes in, as sent where it goes out. */
    bytes: bigint('bytes', { mode: 'number' }).notNull().default(0),
    received: bigint('received', { mode: 'number' }).notNull().default(0),
    /** How far the work under way is, of how much: rows out, bytes looked through, rows in. */
    done: bigint('done', { mode: 'number' }).notNull().default(0),
    total: bigint('total', { mode: 'number' }).notNull().default(0),
    /** What was found inside, before anything was written. */
    found: jsonb('found').$type<Record<string, unknown>>(),
    /** The holding that was made of it. */
    intoId: uuid('into_id'),
    intoName: text('into_name'),
    problem: text('problem'),
    by: text('by').notNull(),
    /** Who becomes owner of what comes in; null for a program. */
    userId: uuid('user_id'),
    createdAt: instant('created_at').notNull(),
    endedAt: instant('ended_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    index('archive_created').on(table.holdingId, table.createdAt),
  ],
);
