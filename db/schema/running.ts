import { sql } from 'drizzle-orm';
import {
  bigint,
  doublePrecision,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import type { Explanation } from '@/lib/control/events';
import { holdingId, instant } from './columns';
import { inHouse, ofHouse } from './of-house';

/** One row a switching of a load, with the ladder that decided it, written before the command leaves. */
export const switching = pgTable(
  'switching',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    channelId: uuid('channel_id').notNull(),
    at: instant('at').notNull(),
    from: text('from').$type<'on' | 'off'>().notNull(),
    to: text('to').$type<'on' | 'off'>().notNull(),
    claim: text('claim').notNull(),
    /** The command's number; null for a lease trip. */
    number: bigint('number', { mode: 'number' }),
    /** Boot id and count of a lease trip: a trip told twice is one row. */
    trip: text('trip'),
    ruleId: uuid('rule_id'),
    version: integer('version'),
    explanation: jsonb('explanation').$type<Explanation>().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    inHouse(table),
    index('switching_at').on(table.holdingId, table.houseId, table.at),
    index('switching_channel').on(table.channelId, table.at),
    uniqueIndex('switching_number')
      .on(table.channelId, table.number)
      .where(sql`number is not null`),
    uniqueIndex('switching_trip')
      .on(table.channelId, table.trip)
      .where(sql`trip is not null`),
  ],
);

/**
 * A channel's decisions and the source's rests as spans: what the strips of Watch and Duty are drawn from.
 * `state` is the load's; `claim` decided it from `at` until the next row of the channel.
 */
export const decision = pgTable(
  'decision',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    channelId: uuid('channel_id').notNull(),
    at: instant('at').notNull(),
    state: text('state').$type<'on' | 'off'>().notNull(),
    claim: text('claim').notNull(),
    /** Only where no switching of that instant carries it; null in rows from before decisions were explained. */
    explanation: jsonb('explanation').$type<Explanation>(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    inHouse(table),
    index('decision_channel').on(table.channelId, table.at),
    uniqueIndex('decision_once').on(table.channelId, table.at, table.claim, table.state),
  ],
);

/** What a relay said of itself, on change. */
export const relayReport = pgTable(
  'relay_report',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    channelId: uuid('channel_id').notNull(),
    at: instant('at').notNull(),
    state: text('state').$type<'on' | 'off'>().notNull(),
    number: bigint('number', { mode: 'number' }).notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    index('relay_report_channel').on(table.channelId, table.at),
  ],
);

/** What people ordered, numbered a house; the core takes each number once, in order. */
export const personCommand = pgTable(
  'person_command',
  {
    holdingId: holdingId(),
    houseId: ofHouse(),
    number: bigint('number', { mode: 'number' }).notNull(),
    at: instant('at').notNull(),
    by: text('by').notNull(),
    body: jsonb('body').$type<Record<string, unknown>>().notNull(),
  },
  (table) => [primaryKey({ columns: [table.holdingId, table.houseId, table.number] }), inHouse(table)],
);

/** One row a house: the core's memory, and how things stood at its last step. */
export const controlMemory = pgTable(
  'control_memory',
  {
    holdingId: holdingId(),
    houseId: ofHouse(),
    /** Kept at each event. */
    memory: jsonb('memory').$type<Record<string, unknown>>(),
    memoryAt: instant('memory_at'),
    /** Greatest number of `person_command` taken. */
    taken: bigint('taken', { mode: 'number' }).notNull().default(0),
    planRevision: bigint('plan_revision', { mode: 'number' }).notNull().default(0),
    /** The answer of GET state but for alarms: points, channels, sources. */
    state: jsonb('state').$type<Record<string, unknown>>(),
    stateAt: instant('state_at'),
    epoch: bigint('epoch', { mode: 'number' }).notNull().default(0),
  },
  (table) => [primaryKey({ columns: [table.holdingId, table.houseId] }), inHouse(table)],
);

/** One row: who drives. Times here are real time, not app time. */
export const leader = pgTable('leader', {
  id: integer('id').primaryKey(),
  holder: uuid('holder'),
  epoch: bigint('epoch', { mode: 'number' }).notNull(),
  until: instant('until').notNull(),
  heartbeat: instant('heartbeat').notNull(),
  spool: bigint('spool', { mode: 'number' }).notNull().default(0),
  /** App time of the newest step of any house. */
  lastStep: instant('last_step'),
});

/** App time in which no worker led: of those hours nothing was decided. One that goes on is not here yet. */
export const controlGap = pgTable('control_gap', {
  from: instant('from').primaryKey(),
  to: instant('to').notNull(),
});

/** One row: app time = anchorApp + (real − anchorReal) × rate. */
export const clockAnchor = pgTable('clock_anchor', {
  id: integer('id').primaryKey(),
  anchorReal: instant('anchor_real').notNull(),
  anchorApp: instant('anchor_app').notNull(),
  rate: doublePrecision('rate').notNull(),
});
