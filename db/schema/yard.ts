import { sql } from 'drizzle-orm';
import {
  bigint,
  boolean,
  doublePrecision,
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
import { organization } from './auth';
import { holdingId, instant } from './columns';

/** Things of the yard are taken out of use, never deleted: what they did must stay explainable. */
const removedAt = () => instant('removed_at');
const revision = () => integer('revision').notNull().default(1);
const createdAt = () => instant('created_at').notNull().defaultNow();

export const house = pgTable(
  'house',
  {
    holdingId: holdingId().references(() => organization.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    slug: text('slug').notNull(),
    name: text('name').notNull(),
    zone: text('zone').notNull(),
    latitude: doublePrecision('latitude').notNull(),
    longitude: doublePrecision('longitude').notNull(),
    altitude: doublePrecision('altitude').notNull(),
    frostLimit: doublePrecision('frost_limit'),
    frostAlarm: doublePrecision('frost_alarm'),
    /** A thermostat that keeps the house without any software; null: nobody has said that there is one. */
    lastResort: jsonb('last_resort').$type<{ below: number; provedOn: string | null }>(),
    /** Out of an archive and not put in service yet: the worker does not take it up, and no node can call it. */
    laidUpAt: instant('laid_up_at'),
    /** Grows with every change of anything the core reads of this house. */
    planRevision: bigint('plan_revision', { mode: 'number' }).notNull().default(1),
    revision: revision(),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    uniqueIndex('house_slug')
      .on(table.holdingId, table.slug)
      .where(sql`removed_at is null`),
  ],
);

const ofHouse = () => uuid('house_id').notNull();

export const node = pgTable(
  'node',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    houseId: ofHouse(),
    key: text('key').notNull(),
    kind: text('kind').notNull(),
    reportEveryS: integer('report_every_s').notNull(),
    channels: integer('channels').notNull(),
    tokenHash: text('token_hash').notNull(),
    /** The token before the last rotation stays valid for a day. */
    formerTokenHash: text('former_token_hash'),
    formerTokenUntil: instant('former_token_until'),
    revokedAt: instant('revoked_at'),
    /** What the link last knew: boot, firmware, clock error, trips, refused readings. */
    status: jsonb('status').$type<Record<string, unknown>>().notNull().default({}),
    lastHeardAt: instant('last_heard_at'),
    /** Greatest relay sequence and reading sequence need no keeping: a node keeps its own. */
    revision: revision(),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
    uniqueIndex('node_key')
      .on(table.holdingId, table.houseId, table.key)
      .where(sql`removed_at is null`),
    uniqueIndex('node_token').on(table.tokenHash),
    index('node_former_token').on(table.formerTokenHash),
  ],
);

export const point = pgTable(
  'point',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    /** What `reading` is keyed by: eight bytes instead of sixteen in its largest index. */
    number: bigint('number', { mode: 'number' }).generatedAlwaysAsIdentity(),
    houseId: ofHouse(),
    nodeId: uuid('node_id'),
    key: text('key').notNull(),
    name: text('name').notNull(),
    role: text('role').notNull(),
    unit: text('unit').notNull(),
    min: doublePrecision('min'),
    max: doublePrecision('max'),
    staleAfterS: integer('stale_after_s'),
    maxRate: doublePrecision('max_rate'),
    frozenAfterS: integer('frozen_after_s'),
    sensor: text('sensor'),
    derived: jsonb('derived').$type<{ of: string; points: string[]; window?: number }>(),
    revision: revision(),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
    uniqueIndex('point_key')
      .on(table.holdingId, table.houseId, table.key)
      .where(sql`removed_at is null`),
    uniqueIndex('point_number').on(table.number),
  ],
);

/** Readings stay raw; the calibration in force at a reading's time corrects it when it is read. */
export const calibration = pgTable(
  'calibration',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    pointId: uuid('point_id').notNull(),
    from: instant('from').notNull(),
    offset: doublePrecision('offset').notNull(),
    gain: doublePrecision('gain').notNull(),
    by: text('by').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.pointId],
      foreignColumns: [point.holdingId, point.id],
    }).onDelete('cascade'),
    index('calibration_point').on(table.pointId, table.from),
  ],
);

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
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
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
    /** When this wiring was proved; a changed wiring clears it. */
    provedAt: instant('proved_at'),
    revision: revision(),
    createdAt: createdAt(),
    removedAt: removedAt(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
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
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
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
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
  ],
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
    foreignKey({
      columns: [table.holdingId, table.houseId],
      foreignColumns: [house.holdingId, house.id],
    }).onDelete('cascade'),
    uniqueIndex('lockout_once')
      .on(table.channelId)
      .where(sql`removed_at is null`),
  ],
);
