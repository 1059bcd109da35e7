/** Proofs of channels: an installer's test of a wiring, step by step, kept as it was done. */
import { sql } from 'drizzle-orm';
import { index, jsonb, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import type { ProofOutcome, ProofRecord, ProofRun } from '@/lib/schema/proof';
import type { Wiring } from '@/lib/schema/wiring';
import { holdingId, instant, revision } from './columns';
import { inHouse, ofHouse } from './of-house';

export const proof = pgTable(
  'proof',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    channelId: uuid('channel_id').notNull(),
    begunBy: text('begun_by').notNull(),
    begunAt: instant('begun_at').notNull(),
    endedBy: text('ended_by'),
    endedAt: instant('ended_at'),
    /** Null while it goes on. */
    outcome: text('outcome').$type<ProofOutcome>(),
    /** Why it was given up, or what of the wiring was changed. */
    endedWhy: text('ended_why'),
    /** The wiring that is proved; another one needs a proof of its own. */
    wiring: jsonb('wiring').$type<Wiring>().notNull(),
    /** What was done, in the order of doing: the last word on a step counts. */
    records: jsonb('records').$type<ProofRecord[]>().notNull().default([]),
    /** Runs that were ordered, in their order. */
    runs: jsonb('runs').$type<ProofRun[]>().notNull().default([]),
    revision: revision(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    inHouse(table),
    index('proof_channel').on(table.holdingId, table.channelId, table.begunAt),
    uniqueIndex('proof_open')
      .on(table.channelId)
      .where(sql`ended_at is null`),
  ],
);
