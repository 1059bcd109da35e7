import {
  bigint,
  date,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uuid,
} from 'drizzle-orm/pg-core';
import { organization } from './auth';
import { holdingId, instant } from './columns';
import { source } from './channel';

/** A holding's prices: one book, written as a whole. What it said before stands in the audit log. */
export const moneyBook = pgTable(
  'money_book',
  {
    holdingId: holdingId().references(() => organization.id, { onDelete: 'cascade' }),
    body: jsonb('body').$type<Record<string, unknown>>().notNull(),
    revision: integer('revision').notNull().default(1),
    by: text('by').notNull(),
    enteredAt: instant('entered_at').notNull(),
  },
  (table) => [primaryKey({ columns: [table.holdingId] })],
);

/** What a heap cost beside the electricity of its fan. */
export const heapCost = pgTable(
  'heap_cost',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    sourceId: uuid('source_id').notNull(),
    kind: text('kind').notNull(),
    paidOn: date('paid_on', { mode: 'string' }).notNull(),
    text: text('text').notNull(),
    /** Millionths of the currency's unit. */
    micros: bigint('micros', { mode: 'number' }).notNull(),
    /** How it was entered where it is somebody's time. */
    work: jsonb('work').$type<{ hours: string; rate: string }>(),
    /** Seasons for which it serves. */
    years: integer('years').notNull(),
    by: text('by').notNull(),
    enteredAt: instant('entered_at').notNull(),
    removedAt: instant('removed_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.sourceId],
      foreignColumns: [source.holdingId, source.id],
    }).onDelete('cascade'),
    index('heap_cost_source').on(table.holdingId, table.sourceId, table.paidOn),
  ],
);
