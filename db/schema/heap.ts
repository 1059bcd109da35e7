import {
  doublePrecision,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uuid,
} from 'drizzle-orm/pg-core';
import { holdingId, instant } from './columns';
import { source } from './channel';

export const heapEntry = pgTable(
  'heap_entry',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    sourceId: uuid('source_id').notNull(),
    kind: text('kind').notNull(),
    at: instant('at').notNull(),
    text: text('text').notNull(),
    materials: jsonb('materials')
      .$type<{ material: string; kilograms?: number; litres?: number }[]>()
      .notNull(),
    litresOfWater: doublePrecision('litres_of_water'),
    volumeM3: doublePrecision('volume_m3'),
    by: text('by').notNull(),
    enteredAt: instant('entered_at').notNull(),
    amendedBy: text('amended_by'),
    amendedAt: instant('amended_at'),
    revision: integer('revision').notNull().default(1),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.sourceId],
      foreignColumns: [source.holdingId, source.id],
    }).onDelete('cascade'),
    index('heap_entry_at').on(table.holdingId, table.sourceId, table.at),
  ],
);
