import { date, foreignKey, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { holdingId, instant } from './columns';
import { house } from './house';

/** A report that is sent by mail when its week, month or winter has ended. */
export const reportSchedule = pgTable(
  'report_schedule',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: uuid('house_id').notNull(),
    span: text('span').notNull(),
    sections: jsonb('sections').$type<string[]>().notNull(),
    /** Addresses of members. */
    to: jsonb('to').$type<string[]>().notNull(),
    by: text('by').notNull(),
    createdAt: instant('created_at').notNull(),
    removedAt: instant('removed_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
  ],
);

/** One letter of a schedule. The row is written before the letter goes, so that of two workers one sends it. */
export const reportSent = pgTable(
  'report_sent',
  {
    holdingId: holdingId(),
    scheduleId: uuid('schedule_id').notNull(),
    /** First and last night of what it tells. */
    fromNight: date('from_night', { mode: 'string' }).notNull(),
    toNight: date('to_night', { mode: 'string' }).notNull(),
    to: text('to').notNull(),
    claimedAt: instant('claimed_at').notNull(),
    /** Null while it is on its way, and for good where the program ended in between. */
    sentAt: instant('sent_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.scheduleId, table.fromNight, table.to] }),
    foreignKey({
      columns: [table.holdingId, table.scheduleId],
      foreignColumns: [reportSchedule.holdingId, reportSchedule.id],
    }).onDelete('cascade'),
  ],
);
