import { sql } from 'drizzle-orm';
import {
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import type { RuleBody } from '@/lib/schema/rule';
import { holdingId, instant } from './columns';
import { inHouse, ofHouse } from './of-house';

export const rule = pgTable(
  'rule',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    channelId: uuid('channel_id').notNull(),
    slug: text('slug').notNull(),
    name: text('name').notNull(),
    revision: integer('revision').notNull().default(1),
    createdAt: instant('created_at').notNull().defaultNow(),
    retiredAt: instant('retired_at'),
    /** The rule and version that a copy was made of; that rule lives its own life since. */
    copiedFrom: jsonb('copied_from').$type<{ rule: string; version: number }>(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    inHouse(table),
    uniqueIndex('rule_slug').on(table.holdingId, table.slug),
  ],
);

export const ruleVersion = pgTable(
  'rule_version',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    ruleId: uuid('rule_id').notNull(),
    /** A draft already carries the number it will have. */
    number: integer('number').notNull(),
    status: text('status').$type<'draft' | 'in-force' | 'retired'>().notNull(),
    body: jsonb('body').$type<RuleBody>().notNull(),
    why: text('why'),
    by: text('by').notNull(),
    draftedAt: instant('drafted_at').notNull(),
    forcedAt: instant('forced_at'),
    endedAt: instant('ended_at'),
    /** Who took it out of force, or put another in its place. */
    endedBy: text('ended_by'),
    /** Why the rule was retired; null where another version only took its place, which says its own why. */
    endedWhy: text('ended_why'),
    /** Who let it run a channel that nobody had proved, when, and in which words; null where it was proved. */
    unproved: jsonb('unproved').$type<{ by: string; at: string; words: string | null }>(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.ruleId],
      foreignColumns: [rule.holdingId, rule.id],
    }).onDelete('cascade'),
    uniqueIndex('rule_version_number').on(table.ruleId, table.number),
    uniqueIndex('rule_version_draft')
      .on(table.ruleId)
      .where(sql`status = 'draft'`),
    uniqueIndex('rule_version_in_force')
      .on(table.ruleId)
      .where(sql`status = 'in-force'`),
    index('rule_version_rule').on(table.holdingId, table.ruleId),
  ],
);
