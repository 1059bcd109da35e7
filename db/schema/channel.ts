/** Channels, the sources and loops they draw from, and what keeps them off. */
import { sql } from 'drizzle-orm';
import {
  boolean,
  doublePrecision,
  foreignKey,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import type { Protection } from '@/lib/schema/channel';
import { createdAt, holdingId, instant, removedAt, revision } from './columns';
import { inHouse, ofHouse } from './of-house';
import { node } from './node';

export const source = pgTable(
  'source',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    slug: text('slug').notNull(),
    name: text('name').notNull(),
    kind: text('kind').notNull(),
    corePointId: uuid('core_point_id'),
    basePointId: uuid('base_point_id'),
    coreFloor: doublePrecision('core_floor'),
    dailyLimitS: integer('daily_limit_s'),
    readyLevel: doublePrecision('ready_level'),
    readyForS: integer('ready_for_s'),
    revision: revision(),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    inHouse(table),
    uniqueIndex('source_slug')
      .on(table.holdingId, table.slug)
      .where(sql`removed_at is null`),
  ],
);

export const channel = pgTable(
  'channel',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    number: integer('number').notNull(),
    key: text('key').notNull(),
    label: text('label').notNull(),
    nodeId: uuid('node_id').notNull(),
    relay: integer('relay').notNull(),
    sourceId: uuid('source_id'),
    frostHelp: boolean('frost_help').notNull(),
    contact: text('contact').notNull(),
    load: jsonb('load')
      .$type<{ kind: string; watts?: number; volts?: number; supply?: 'ac' | 'dc'; contactAmps?: number }>()
      .notNull(),
    minOnS: integer('min_on_s').notNull(),
    minOffS: integer('min_off_s').notNull(),
    startsPerHour: doublePrecision('starts_per_hour'),
    longestOnS: integer('longest_on_s'),
    highLimit: jsonb('high_limit').$type<{ point: string; above: number }>(),
    runProof: jsonb('run_proof').$type<{ point: string; above: number }>(),
    fallback: jsonb('fallback').$type<{
      point: string;
      below: number;
      above: number;
      onFor: number;
      offFor: number;
    }>(),
    flow: jsonb('flow').$type<{ litresPerSecond: number; from: string; sd?: number }>(),
    protection: jsonb('protection').$type<Protection>(),
    /** When this wiring was proved; a changed wiring clears it. */
    provedAt: instant('proved_at'),
    revision: revision(),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    inHouse(table),
    foreignKey({ columns: [table.holdingId, table.nodeId], foreignColumns: [node.holdingId, node.id] }),
    uniqueIndex('channel_number')
      .on(table.holdingId, table.houseId, table.number)
      .where(sql`removed_at is null`),
    uniqueIndex('channel_key')
      .on(table.holdingId, table.houseId, table.key)
      .where(sql`removed_at is null`),
    uniqueIndex('channel_relay')
      .on(table.holdingId, table.nodeId, table.relay)
      .where(sql`removed_at is null`),
  ],
);

export const loop = pgTable(
  'loop',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    slug: text('slug').notNull(),
    name: text('name').notNull(),
    sourceId: uuid('source_id').notNull(),
    channelId: uuid('channel_id').notNull(),
    intakePointId: uuid('intake_point_id').notNull(),
    returnPointId: uuid('return_point_id').notNull(),
    revision: revision(),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    inHouse(table),
    uniqueIndex('loop_slug')
      .on(table.holdingId, table.slug)
      .where(sql`removed_at is null`),
  ],
);

export const interlock = pgTable(
  'interlock',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    channelId: uuid('channel_id').notNull(),
    kind: text('kind').notNull(),
    otherId: uuid('other_id').notNull(),
    delayS: integer('delay_s').notNull(),
    frostMayBreak: boolean('frost_may_break').notNull(),
    revision: revision(),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [primaryKey({ columns: [table.holdingId, table.id] }), inHouse(table)],
);

export const lockout = pgTable(
  'lockout',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    channelId: uuid('channel_id').notNull(),
    why: text('why').notNull(),
    by: text('by').notNull(),
    at: instant('at').notNull(),
    removedBy: text('removed_by'),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    inHouse(table),
    uniqueIndex('lockout_once')
      .on(table.channelId)
      .where(sql`removed_at is null`),
  ],
);
