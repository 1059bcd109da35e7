import { date, foreignKey, index, jsonb, pgTable, primaryKey, uuid } from 'drizzle-orm/pg-core';
import { holdingId, instant } from './columns';
import { house } from './yard';

/** A noon-to-noon summary of one source, re-made from readings and switchings by a job. */
export const night = pgTable(
  'night',
  {
    holdingId: holdingId(),
    houseId: uuid('house_id').notNull(),
    sourceId: uuid('source_id').notNull(),
    /** Date of its evening in the house's zone. */
    night: date('night', { mode: 'string' }).notNull(),
    body: jsonb('body').$type<Record<string, unknown>>().notNull(),
    madeAt: instant('made_at').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.sourceId, table.night] }),
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
    index('night_house').on(table.holdingId, table.houseId, table.night),
  ],
);

/** The same of a house, whatever heats it. */
export const houseNight = pgTable(
  'house_night',
  {
    holdingId: holdingId(),
    houseId: uuid('house_id').notNull(),
    night: date('night', { mode: 'string' }).notNull(),
    body: jsonb('body').$type<Record<string, unknown>>().notNull(),
    madeAt: instant('made_at').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.houseId, table.night] }),
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
  ],
);
