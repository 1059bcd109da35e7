import { sql } from 'drizzle-orm';
import { foreignKey, index, jsonb, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { organization } from './auth';
import { holdingId, instant } from './columns';

export const alarm = pgTable(
  'alarm',
  {
    holdingId: holdingId().references(() => organization.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    /** Null for what concerns the whole holding, such as control that does not run. */
    houseId: uuid('house_id'),
    /** Stable while its cause stands: kind, house and what it is about. */
    key: text('key').notNull(),
    kind: text('kind').notNull(),
    about: jsonb('about')
      .$type<{ point?: string; channel?: string; source?: string; node?: string }>()
      .notNull(),
    data: jsonb('data').$type<Record<string, unknown>>().notNull().default({}),
    raisedAt: instant('raised_at').notNull(),
    clearedAt: instant('cleared_at'),
    acknowledgedAt: instant('acknowledged_at'),
    acknowledgedBy: text('acknowledged_by'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    uniqueIndex('alarm_standing')
      .on(table.holdingId, table.key)
      .where(sql`cleared_at is null`),
    index('alarm_raised').on(table.holdingId, table.raisedAt),
  ],
);

export const alarmEvent = pgTable(
  'alarm_event',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    alarmId: uuid('alarm_id').notNull(),
    at: instant('at').notNull(),
    kind: text('kind').$type<'raised' | 'acknowledged' | 'cleared'>().notNull(),
    by: text('by'),
    note: text('note'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.alarmId],
      foreignColumns: [alarm.holdingId, alarm.id],
    }).onDelete('cascade'),
    index('alarm_event_alarm').on(table.alarmId, table.at),
  ],
);
