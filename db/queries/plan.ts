/** What the core and the worker need to know of a house: its configuration, and how it is wired. */
import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { AnyPgColumn } from 'drizzle-orm/pg-core';
import type { Holding } from '@/db/client';
import { rule, ruleVersion } from '@/db/schema/rule';
import { channel, interlock, lockout, loop, source } from '@/db/schema/channel';
import { house } from '@/db/schema/house';
import { calibration, node, point } from '@/db/schema/node';
import type { Contact, HouseConfig } from '@/lib/control/types';
import type { ModbusBus, MqttBus, Register } from '@/lib/schema/bus';
import { houseConfig } from './house-config';

export interface HouseHead {
  id: string;
  holdingId: string;
  slug: string;
  planRevision: number;
}

export interface HouseRecord extends HouseHead {
  config: HouseConfig;
  nodes: NodeWiring[];
  points: PointWiring[];
  channels: ChannelWiring[];
}

export interface NodeWiring {
  id: string;
  key: string;
  kind: string;
  reportEveryS: number;
  channels: number;
  /** SHA-256 of the tokens that open its link, in hex, each with the end of its validity. */
  tokens: { hash: string; until: number | null }[];
  lastHeardAt: number | null;
  status: Record<string, unknown>;
  /** How it is reached, where the worker has to go to it. */
  modbus: ModbusBus | null;
  mqtt: MqttBus | null;
  /** The broker's password, sealed. */
  busSecret: string | null;
  registers: Register[];
}

export interface PointWiring {
  id: string;
  number: number;
  nodeId: string | null;
  key: string;
  name: string;
  role: string;
  unit: string;
  /** Ascending by `from`. */
  calibrations: Calibration[];
}

/** Corrected value = raw × gain + offset, from `from` on. */
export interface Calibration {
  from: number;
  offset: number;
  gain: number;
}

export interface ChannelWiring {
  id: string;
  number: number;
  key: string;
  label: string;
  nodeId: string;
  relay: number;
  contact: Contact;
  fallback: { point: string; below: number; above: number; onFor: number; offFor: number } | null;
  proved: boolean;
  lockedOut: boolean;
}

/**
 * To be called in the transaction of whatever changes a house, its wiring or its rules in force: the worker then looks
 * at the house again.
 */
export async function touchPlan(holding: Holding, houseId: string): Promise<void> {
  await holding.db
    .update(house)
    .set({ planRevision: sql`${house.planRevision} + 1` })
    .where(and(eq(house.holdingId, holding.id), eq(house.id, houseId)));
  await holding.db.execute(sql`select pg_notify('plan', ${houseId})`);
}

/** Every house of every holding, for the worker's look. */
export async function listHouses(db: Holding['db']): Promise<HouseHead[]> {
  return db
    .select({ id: house.id, holdingId: house.holdingId, slug: house.slug, planRevision: house.planRevision })
    .from(house)
    .where(and(isNull(house.removedAt), isNull(house.laidUpAt)));
}

/** Which house a node belongs to, by the hash of its token. */
export async function findNodeByToken(
  db: Holding['db'],
  tokenHash: string,
): Promise<{ holdingId: string; houseId: string; nodeId: string } | null> {
  const [row] = await db
    .select({ holdingId: node.holdingId, houseId: node.houseId, nodeId: node.id })
    .from(node)
    .innerJoin(house, and(eq(house.holdingId, node.holdingId), eq(house.id, node.houseId)))
    .where(
      and(
        isNull(house.laidUpAt),
        sql`(${node.tokenHash} = ${tokenHash} or (${node.formerTokenHash} = ${tokenHash} and ${node.formerTokenUntil} > now()))`,
        isNull(node.removedAt),
        isNull(node.revokedAt),
      ),
    );
  return row ?? null;
}

/** Configuration as the core compiles it; null where the house is not there or was taken out of use. */
export async function loadHouseConfig(holding: Holding, houseId: string): Promise<HouseConfig | null> {
  return (await loadHouse(holding, houseId))?.config ?? null;
}

/** A house that may be driven; null too for one that is laid up, whoever asks for it. */
export async function loadHouseInService(holding: Holding, houseId: string): Promise<HouseRecord | null> {
  const rows = await holding.db
    .select({ id: house.id })
    .from(house)
    .where(and(eq(house.holdingId, holding.id), eq(house.id, houseId), isNull(house.laidUpAt)));
  return rows.length === 0 ? null : loadHouse(holding, houseId);
}

/** Everything of a house that the worker drives it by. */
export async function loadHouse(holding: Holding, houseId: string): Promise<HouseRecord | null> {
  const { db } = holding;
  const ofHouse = (table: { holdingId: AnyPgColumn; houseId: AnyPgColumn; removedAt: AnyPgColumn }) =>
    and(eq(table.holdingId, holding.id), eq(table.houseId, houseId), isNull(table.removedAt));
  const [head] = await db
    .select()
    .from(house)
    .where(and(eq(house.holdingId, holding.id), eq(house.id, houseId), isNull(house.removedAt)));
  if (head === undefined) return null;
  // The revision was read first: what changes meanwhile raises it again, and is looked at again.
  const nodes = await db.select().from(node).where(ofHouse(node)).orderBy(asc(node.key));
  const points = await db.select().from(point).where(ofHouse(point)).orderBy(asc(point.number));
  const sources = await db.select().from(source).where(ofHouse(source)).orderBy(asc(source.slug));
  const channels = await db.select().from(channel).where(ofHouse(channel)).orderBy(asc(channel.number));
  const loops = await db.select().from(loop).where(ofHouse(loop)).orderBy(asc(loop.slug));
  const interlocks = await db.select().from(interlock).where(ofHouse(interlock)).orderBy(asc(interlock.id));
  const lockouts = await db.select().from(lockout).where(ofHouse(lockout));
  const calibrations = await db
    .select()
    .from(calibration)
    .where(and(eq(calibration.holdingId, holding.id), inArray(calibration.pointId, points.map(idOf))))
    .orderBy(asc(calibration.from));
  const rules = await readRulesInForce(holding, houseId);
  const rows = { head, nodes, points, sources, channels, loops, interlocks, rules };
  return {
    id: head.id,
    holdingId: head.holdingId,
    slug: head.slug,
    planRevision: head.planRevision,
    config: houseConfig(rows),
    nodes: nodes.map(nodeWiring),
    points: points.map((row) => ({
      ...pick(row),
      calibrations: calibrations
        .filter((one) => one.pointId === row.id)
        .map((one) => ({ from: one.from.getTime(), offset: one.offset, gain: one.gain })),
    })),
    channels: channels.map((row) => ({
      id: row.id,
      number: row.number,
      key: row.key,
      label: row.label,
      nodeId: row.nodeId,
      relay: row.relay,
      contact: row.contact === 'NC' ? 'NC' : 'NO',
      fallback: row.fallback,
      proved: row.provedAt !== null,
      lockedOut: lockouts.some((one) => one.channelId === row.id),
    })),
  };
}

const idOf = (row: { id: string }): string => row.id;

function pick(row: typeof point.$inferSelect) {
  const { id, number, nodeId, key, name, role, unit } = row;
  return { id, number, nodeId, key, name, role, unit };
}

function nodeWiring(row: typeof node.$inferSelect): NodeWiring {
  const tokens = [{ hash: row.tokenHash, until: null as number | null }];
  if (row.formerTokenHash !== null && row.formerTokenUntil !== null) {
    tokens.push({ hash: row.formerTokenHash, until: row.formerTokenUntil.getTime() });
  }
  return {
    id: row.id,
    key: row.key,
    kind: row.kind,
    reportEveryS: row.reportEveryS,
    channels: row.channels,
    tokens: row.revokedAt === null ? tokens : [],
    lastHeardAt: row.lastHeardAt?.getTime() ?? null,
    status: row.status,
    modbus: row.modbus,
    mqtt: row.mqtt,
    busSecret: row.busSecret,
    registers: row.registers,
  };
}

async function readRulesInForce(holding: Holding, houseId: string) {
  return holding.db
    .select({ rule, version: ruleVersion })
    .from(rule)
    .innerJoin(ruleVersion, and(eq(ruleVersion.holdingId, rule.holdingId), eq(ruleVersion.ruleId, rule.id)))
    .where(
      and(
        eq(rule.holdingId, holding.id),
        eq(rule.houseId, houseId),
        isNull(rule.retiredAt),
        eq(ruleVersion.status, 'in-force'),
      ),
    )
    .orderBy(asc(rule.createdAt), asc(rule.id));
}
