import { createHash, randomBytes } from 'node:crypto';
import { and, eq, inArray, isNull } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { everyHolding, type Holding } from '@/db/client';
import { organization } from '@/db/schema/auth';
import { rule, ruleVersion } from '@/db/schema/rule';
import { channel, interlock, loop, source } from '@/db/schema/channel';
import { house } from '@/db/schema/house';
import { calibration, node, point } from '@/db/schema/node';
import { RuleBody } from '@/lib/schema/rule';
import { ChannelCreate, InterlockCreate } from '@/lib/schema/channel';
import { HouseCreate } from '@/lib/schema/house';
import { NodeCreate } from '@/lib/schema/node';
import { PointCreate } from '@/lib/schema/point';
import { LoopCreate, SourceCreate } from '@/lib/schema/source';
import type { DemoHouse } from './demo-house';

export interface NodeSecret {
  house: string;
  key: string;
  token: string;
}

/** What was seeded, by the words of the demo: keys to ids, for the history that is played next. */
export interface SeededHouse {
  houseId: string;
  slug: string;
  secrets: NodeSecret[];
  channelIds: Map<string, string>;
  sourceIds: Map<string, string>;
}

const slugOf = (name: string) => name.toLowerCase().replaceAll(' ', '-');

/** Writes one demo house as it stood at `at`: wired, proved and with its rules in force. */
export async function writeHouse(
  holding: Holding,
  demo: DemoHouse,
  by: string,
  at: Date,
): Promise<SeededHouse> {
  const { db, id: holdingId } = holding;
  const houseId = uuid();
  const slug = slugOf(demo.house.name);
  await db
    .insert(house)
    .values({ holdingId, id: houseId, slug, ...HouseCreate.parse(demo.house), createdAt: at });

  const secrets: NodeSecret[] = [];
  const nodeIds = new Map<string, string>();
  for (const given of demo.nodes) {
    const body = NodeCreate.parse(given);
    const token = newToken();
    secrets.push({ house: slug, key: body.key, token });
    nodeIds.set(body.key, uuid());
    await db.insert(node).values({
      holdingId,
      id: idOf(nodeIds, body.key),
      houseId,
      key: body.key,
      kind: body.kind,
      reportEveryS: body.reportEvery,
      channels: body.channels,
      tokenHash: hashOf(token),
      createdAt: at,
    });
  }

  const pointIds = new Map<string, string>();
  for (const given of demo.points) {
    const { node: nodeKey, staleAfter, frozenAfter, offset, gain, ...body } = PointCreate.parse(given);
    const id = uuid();
    pointIds.set(body.key, id);
    const nodeId = nodeKey === null ? null : idOf(nodeIds, nodeKey);
    const derived = body.derived && { of: body.derived.of, points: body.derived.points };
    await db.insert(point).values({
      holdingId,
      id,
      houseId,
      ...body,
      nodeId,
      derived,
      staleAfterS: staleAfter,
      frozenAfterS: frozenAfter,
      createdAt: at,
    });
    await db.insert(calibration).values({ holdingId, id: uuid(), pointId: id, from: at, offset, gain, by });
  }

  const sourceIds = new Map<string, string>();
  for (const given of demo.sources) {
    const body = SourceCreate.parse(given);
    const id = uuid();
    sourceIds.set(slugOf(body.name), id);
    await db.insert(source).values({
      holdingId,
      id,
      houseId,
      slug: slugOf(body.name),
      name: body.name,
      kind: body.kind,
      corePointId: body.corePoint === null ? null : idOf(pointIds, body.corePoint),
      basePointId: body.basePoint === null ? null : idOf(pointIds, body.basePoint),
      coreFloor: body.coreFloor,
      dailyLimitS: body.dailyLimit,
      readyLevel: body.ready?.level ?? null,
      readyForS: body.ready?.for ?? null,
      createdAt: at,
    });
  }

  const channelIds = new Map<string, string>();
  for (const given of demo.channels) {
    const body = ChannelCreate.parse(given);
    const id = uuid();
    channelIds.set(body.key, id);
    const { node: nodeKey, source: sourceSlug, minOn, minOff, longestOn, load, flow, ...rest } = body;
    await db.insert(channel).values({
      holdingId,
      id,
      houseId,
      ...rest,
      nodeId: idOf(nodeIds, nodeKey),
      sourceId: sourceSlug === null ? null : idOf(sourceIds, sourceSlug),
      minOnS: minOn,
      minOffS: minOff,
      longestOnS: longestOn,
      load: withoutUndefined(load),
      flow: flow && withoutUndefined(flow),
      provedAt: demo.proved.includes(body.key) ? at : null,
      createdAt: at,
    });
  }

  for (const given of demo.loops) {
    const body = LoopCreate.parse(given);
    await db.insert(loop).values({
      holdingId,
      id: uuid(),
      houseId,
      slug: slugOf(body.name),
      name: body.name,
      sourceId: idOf(sourceIds, body.source),
      channelId: idOf(channelIds, body.channel),
      intakePointId: idOf(pointIds, body.intake),
      returnPointId: idOf(pointIds, body.return),
      createdAt: at,
    });
  }

  for (const given of demo.interlocks) {
    const body = InterlockCreate.parse(given);
    await db.insert(interlock).values({
      holdingId,
      id: uuid(),
      houseId,
      channelId: idOf(channelIds, body.channel),
      kind: body.kind,
      otherId: idOf(channelIds, body.other),
      delayS: body.delay,
      frostMayBreak: body.frostMayBreak,
      createdAt: at,
    });
  }

  for (const given of demo.rules) {
    const ruleId = uuid();
    await db.insert(rule).values({
      holdingId,
      id: ruleId,
      houseId,
      channelId: idOf(channelIds, given.channel),
      slug: slugOf(given.name),
      name: given.name,
      createdAt: at,
    });
    await db.insert(ruleVersion).values({
      holdingId,
      id: uuid(),
      ruleId,
      number: 1,
      status: 'in-force',
      body: RuleBody.parse(given.body),
      why: given.why,
      by,
      draftedAt: at,
      forcedAt: at,
    });
  }
  return { houseId, slug, secrets, channelIds, sourceIds };
}

/** New tokens for the nodes of the demo holdings, when the file that held the old ones is gone. */
export async function renewTokens(holdingSlugs: string[]): Promise<NodeSecret[]> {
  const db = everyHolding();
  const nodes = await db
    .select({ id: node.id, key: node.key, house: house.slug })
    .from(node)
    .innerJoin(house, eq(house.id, node.houseId))
    .innerJoin(organization, eq(organization.id, node.holdingId))
    .where(and(inArray(organization.slug, holdingSlugs), isNull(node.removedAt)));
  const secrets: NodeSecret[] = [];
  for (const { id, key, house: houseSlug } of nodes) {
    const token = newToken();
    await db
      .update(node)
      .set({ tokenHash: hashOf(token) })
      .where(eq(node.id, id));
    secrets.push({ house: houseSlug, key, token });
  }
  return secrets;
}

const newToken = () => randomBytes(32).toString('base64url');
const hashOf = (token: string) => createHash('sha256').update(token).digest('hex');

function idOf(ids: Map<string, string>, key: string): string {
  const id = ids.get(key);
  if (id === undefined) throw new Error(`The demo names ${key}, which it does not have.`);
  return id;
}

/** zod's optional keys may be there and undefined; the columns' types want them absent. */
function withoutUndefined<T extends object>(value: T): { [K in keyof T]: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(value).filter(([, item]) => item !== undefined)) as {
    [K in keyof T]: Exclude<T[K], undefined>;
  };
}
