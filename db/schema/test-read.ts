import { foreignKey, index, jsonb, pgTable, primaryKey, uuid } from 'drizzle-orm/pg-core';
import type { TestReadCreate } from '@/lib/schema/bus';
import { holdingId, instant } from './columns';
import { node } from './node';

export interface KeptAnswer {
  words: number[] | null;
  raw: number | null;
  value: number | null;
  why: string | null;
}

/**
 * One reading of a board that somebody asks for: the pages write the question, the leading worker the answer. A row lives
 * for minutes.
 */
export const testRead = pgTable(
  'test_read',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: uuid('house_id').notNull(),
    nodeId: uuid('node_id').notNull(),
    ask: jsonb('ask').$type<Omit<TestReadCreate, 'node'>>().notNull(),
    /** Real time. */
    askedAt: instant('asked_at').notNull(),
    /** Null until a worker has one. */
    answer: jsonb('answer').$type<KeptAnswer>(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.nodeId],
      foreignColumns: [node.holdingId, node.id],
    }).onDelete('cascade'),
    index('test_read_asked').on(table.askedAt),
  ],
);
