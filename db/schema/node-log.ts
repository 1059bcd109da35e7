import { sql } from 'drizzle-orm';
import { foreignKey, index, jsonb, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { holdingId, instant } from './columns';
import { node } from './node';

/** As lib/field/fallback-log.ts reads it out of a text. */
export interface KeptFallback {
  what: 'begun' | 'ended' | 'on' | 'off';
  relay?: number;
  why?: string | null;
  point?: string | null;
  /** °C */
  value?: number | null;
}

/** What field nodes said of themselves in `log` frames; what a fallback did while nobody commanded the node is read out of it. */
export const nodeLog = pgTable(
  'node_log',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: uuid('house_id').notNull(),
    nodeId: uuid('node_id').notNull(),
    /** When it happened by the node's account, else when it was heard. */
    at: instant('at').notNull(),
    heardAt: instant('heard_at').notNull(),
    level: text('level').notNull(),
    text: text('text').notNull(),
    /** Null for a text of no known form. */
    fallback: jsonb('fallback').$type<KeptFallback>(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.nodeId],
      foreignColumns: [node.holdingId, node.id],
    }).onDelete('cascade'),
    index('node_log_at').on(table.holdingId, table.houseId, table.at),
    // a node sends again what it got no answer to; such a text names its own time
    uniqueIndex('node_log_once')
      .on(table.nodeId, table.at, table.text)
      .where(sql`fallback is not null`),
  ],
);
