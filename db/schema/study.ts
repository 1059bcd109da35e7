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
import { holdingId, instant } from './columns';
import { inHouse, ofHouse } from './of-house';

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

/** The same of a house, whatever heats it. */
export const houseNight = pgTable(
  'house_night',
  {
    holdingId: holdingId(),
    houseId: ofHouse(),
    night: date('night', { mode: 'string' }).notNull(),
    body: jsonb('body').$type<Record<string, unknown>>().notNull(),
    madeAt: instant('made_at').notNull(),
  },
  (table) => [primaryKey({ columns: [table.holdingId, table.houseId, table.night] }), inHouse(table)],
);

/** One logger's file: from its first piece to its undoing. The file lies under the data directory while it is needed. */
export const importBatch = pgTable(
  'import_batch',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    name: text('name').notNull(),
    bytes: bigint('bytes', { mode: 'number' }).notNull(),
    received: bigint('received', { mode: 'number' }).notNull().default(0),
    state: text('state').notNull(),
    layout: jsonb('layout').$type<Record<string, unknown>>(),
    /** What was found when the file was looked through, before anything was written. */
    found: jsonb('found').$type<Record<string, unknown>>(),
    /** How far the work under way is: bytes for the reader, lines to go on after an end. */
    doneBytes: bigint('done_bytes', { mode: 'number' }).notNull().default(0),
    doneLines: bigint('done_lines', { mode: 'number' }).notNull().default(0),
    brought: bigint('brought', { mode: 'number' }).notNull().default(0),
    duplicates: bigint('duplicates', { mode: 'number' }).notNull().default(0),
    faults: bigint('faults', { mode: 'number' }).notNull().default(0),
    /** Length of the file of faults at the last commit: what was written after it is cut off again. */
    faultBytes: bigint('fault_bytes', { mode: 'number' }).notNull().default(0),
    problem: text('problem'),
    by: text('by').notNull(),
    createdAt: instant('created_at').notNull(),
    endedAt: instant('ended_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    inHouse(table),
    index('import_batch_house').on(table.holdingId, table.houseId, table.createdAt),
  ],
);

/** Readings that an import brought, and only those: what was there before it stays when it is undone. */
export const importPart = pgTable(
  'import_part',
  {
    holdingId: holdingId(),
    batchId: uuid('batch_id').notNull(),
    part: integer('part').notNull(),
    point: bigint('point', { mode: 'number' }).notNull(),
    /** Epoch ms, as runs of first, step and count (lib/analysis/time-runs). */
    times: bigint('times', { mode: 'number' }).array().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.batchId, table.part, table.point] }),
    foreignKey({
      columns: [table.holdingId, table.batchId],
      foreignColumns: [importBatch.holdingId, importBatch.id],
    }).onDelete('cascade'),
  ],
);
