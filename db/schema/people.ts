import { bigint, index, jsonb, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { organization } from './auth';
import { holdingId, instant } from './columns';

/** Keys of programs: only the hash is kept, the key itself is shown once. */
export const apiKey = pgTable(
  'api_key',
  {
    holdingId: holdingId().references(() => organization.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    name: text('name').notNull(),
    role: text('role').notNull(),
    hash: text('hash').notNull(),
    createdBy: text('created_by').notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
    lastUsedAt: instant('last_used_at'),
    revokedAt: instant('revoked_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    uniqueIndex('api_key_hash').on(table.hash),
  ],
);

/** Append-only: no query updates or deletes it. */
export const auditLog = pgTable(
  'audit_log',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    at: instant('at').notNull(),
    /** Who: an e-mail address, or the name of a program's key. */
    by: text('by').notNull(),
    action: text('action').notNull(),
    subject: text('subject').notNull(),
    detail: jsonb('detail').$type<Record<string, unknown>>().notNull().default({}),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    index('audit_log_at').on(table.holdingId, table.at),
  ],
);

/** Answers kept for 24 h, so that a repeated request with the same Idempotency-Key acts once. */
export const idempotency = pgTable(
  'idempotency',
  {
    holdingId: holdingId(),
    key: text('key').notNull(),
    caller: text('caller').notNull(),
    requestHash: text('request_hash').notNull(),
    status: bigint('status', { mode: 'number' }),
    body: jsonb('body'),
    createdAt: instant('created_at').notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.holdingId, table.caller, table.key] })],
);

/** Mail taken by the local SMTP sink of a development or demo installation. */
export const sinkMessage = pgTable(
  'sink_message',
  {
    id: uuid('id').primaryKey(),
    at: instant('at').notNull(),
    from: text('from').notNull(),
    to: text('to').notNull(),
    subject: text('subject').notNull(),
    text: text('text').notNull(),
  },
  (table) => [index('sink_message_to').on(table.to, table.at)],
);
