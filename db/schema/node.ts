/** Nodes, and what they measure. */
import { sql } from 'drizzle-orm';
import {
  bigint,
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
import type { ModbusBus, MqttBus, Register } from '@/lib/schema/bus';
import { createdAt, holdingId, instant, removedAt, revision } from './columns';
import { inHouse, ofHouse } from './of-house';
import type { CalibrationPlace } from '@/lib/analysis/calibrate';

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
    /** How a board on Modbus TCP is reached; null too for every other kind. */
    modbus: jsonb('modbus').$type<ModbusBus>(),
    /** How the broker of a node is reached, but for its password; null too for every other kind. */
    mqtt: jsonb('mqtt').$type<MqttBus>(),
    /** The broker's password, sealed. */
    busSecret: text('bus_secret'),
    /** What is read of a board, and as which point. */
    registers: jsonb('registers').$type<Register[]>().notNull().default([]),
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
    inHouse(table),
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
    inHouse(table),
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
    /** How it was found: a word of lib/analysis/calibrate.ts; typed where nobody says. */
    kind: text('kind').notNull().default('typed'),
    /** What the point read beside which reference, where it was found by a run. */
    places: jsonb('places').$type<CalibrationPlace[]>(),
    /** Deviation that is left at the places, in the point's unit; null where it was typed. */
    residual: doublePrecision('residual'),
    note: text('note').notNull().default(''),
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
