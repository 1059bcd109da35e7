import { date, index, jsonb, pgTable, primaryKey, uuid } from 'drizzle-orm/pg-core';
import { holdingId, instant } from './columns';
import { inHouse, ofHouse } from './house';

/** A noon-to-noon summary of one source, re-made from readings and switchings by a job. */
export const night = pgTable(
  'night',
  {
    holdingId: holdingId(),
    houseId: ofHouse(),
    sourceId: uuid('source_id').notNull(),
    /** Date of its evening in the house's zone. */
    night: date('night', { mode: 'string' }).notNull(),
    body: jsonb('body').$type<Record<string, unknown>>().notNull(),
    madeAt: instant('made_at').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.sourceId, table.night] }),
    inHouse(table),
    index('night_house').on(table.holdingId, table.houseId, table.night),
  ],
);
