import 'server-only';
import { and, asc, eq, or, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { channel, interlock, loop } from '@/db/schema/channel';
import type { ChannelCreate } from '@/lib/schema/channel';
import { changedWiring, wiringOf } from '@/lib/schema/wiring';
import { Channel, type House } from '@/lib/schema/yard-view';
import { ofARun, ofOwnNode } from './channel-points';
import { refuseDayToCome } from './day-done';
import { listNodes } from './node';
import { refuseHeater } from './node-bus';
import { touchPlan } from './plan';
import { endProof, openProof } from './proof';
import { rulesOfChannel } from './point-uses';
import { houseNames, inUse, isId, type HouseNames } from './reference';
import { Refusal } from './refusal';

type Given = z.infer<typeof ChannelCreate>;
type Place = Pick<House, 'id' | 'zone'>;
type Row = typeof channel.$inferSelect;

function toChannel(row: Row, names: HouseNames): Channel {
  const { id, revision, number, relay, key, label, frostHelp, contact, load, startsPerHour } = row;
  const { highLimit, runProof, fallback, flow, protection } = row;
  return Channel.parse({
    ...{ id, revision, number, relay, key, label, frostHelp, contact, load, startsPerHour },
    ...{ highLimit, runProof, fallback, flow, protection },
    node: names.nodes.key(row.nodeId) ?? '',
    source: names.sources.key(row.sourceId),
    minOn: row.minOnS,
    minOff: row.minOffS,
    longestOn: row.longestOnS,
    provedAt: row.provedAt?.toISOString() ?? null,
  });
}

export async function listChannels(holding: Holding, houseId: string): Promise<Channel[]> {
  const rows = await holding.db
    .select()
    .from(channel)
    .where(inUse(holding, houseId, channel))
    .orderBy(asc(channel.number));
  const names = await houseNames(holding, houseId);
  return rows.map((row) => toChannel(row, names));
}

/** By id, number or key; a number goes before a key of the same digits. */
export async function findChannel(holding: Holding, houseId: string, ref: string): Promise<Channel | null> {
  const all = await listChannels(holding, houseId);
  return (
    all.find((row) => row.id === ref) ??
    all.find((row) => String(row.number) === ref) ??
    all.find((row) => row.key === ref) ??
    null
  );
}

/** @throws Refusal at the path of a name that this house does not have, or of a relay that the node has not */
async function columns(holding: Holding, houseId: string, given: Given) {
  const names = await houseNames(holding, houseId);
  const node = names.nodes.find(given.node, 'node');
  const relays = (await listNodes(holding, houseId)).find((row) => row.id === node.id)?.channels ?? 0;
  if (given.relay > relays) {
    throw new Refusal(
      'relay',
      `Node ${node.key} has ${relays === 0 ? 'no relays' : `relays 1 to ${relays}`}.`,
    );
  }
  await refuseHeater(holding, node.id, given.load.kind);
  const named = <T extends { point: string }>(part: T | null, path: string): T | null =>
    part === null ? null : { ...part, point: names.points.find(part.point, `${path}.point`).key };
  const { number, relay, key, label, frostHelp, contact, startsPerHour } = given;
  const { kind, watts, volts, supply, contactAmps } = given.load;
  const { flow, protection } = given;
  return {
    ...{ number, relay, key, label, frostHelp, contact, startsPerHour },
    load: {
      kind,
      ...(watts === undefined ? {} : { watts }),
      ...(volts === undefined ? {} : { volts }),
      ...(supply === undefined ? {} : { supply }),
      ...(contactAmps === undefined ? {} : { contactAmps }),
    },
    flow:
      flow === null
        ? null
        : {
            litresPerSecond: flow.litresPerSecond,
            from: flow.from,
            ...(flow.sd === undefined ? {} : { sd: flow.sd }),
          },
    protection,
    nodeId: node.id,
    sourceId: names.sources.id(given.source, 'source'),
    minOnS: given.minOn,
    minOffS: given.minOff,
    longestOnS: given.longestOn,
    highLimit: named(given.highLimit, 'highLimit'),
    runProof: await ofARun(holding, houseId, named(given.runProof, 'runProof')),
    fallback: await ofOwnNode(holding, node, named(given.fallback, 'fallback')),
  };
}

/** @throws Refusal where a residual-current device is said to have been tested on a day yet to come */
function refuseUntested({ protection }: Given, house: Place, now: Date): void {
  const remedy = 'the day on which its test button was pressed, or leave it empty';
  refuseDayToCome(protection?.rcdTestedOn, 'protection.rcdTestedOn', remedy, house, now);
}

export async function createChannel(
  holding: Holding,
  house: Place,
  given: Given,
  now: Date,
): Promise<Channel> {
  refuseUntested(given, house, now);
  const id = uuid();
  await holding.db
    .insert(channel)
    .values({ ...(await columns(holding, house.id, given)), id, houseId: house.id, holdingId: holding.id });
  await touchPlan(holding, house.id);
  return found(holding, house.id, id);
}

/** A proof is of a wiring: another one has not been seen to run, and a proof that goes on ends with it. */
export async function amendChannel(
  holding: Holding,
  house: Place,
  before: Channel,
  given: Given,
  act: { by: string; now: Date },
): Promise<Channel> {
  refuseUntested(given, house, act.now);
  const houseId = house.id;
  const set = await columns(holding, houseId, given);
  // a body may name the same node by its key or by its id
  const node = (await wiredNode(holding, before.id)) === set.nodeId ? before.node : given.node;
  const parts = changedWiring(wiringOf(before), wiringOf({ ...given, ...set, node }));
  await holding.db
    .update(channel)
    .set({ ...set, ...(parts.length > 0 ? { provedAt: null } : {}), revision: sql`${channel.revision} + 1` })
    .where(and(eq(channel.holdingId, holding.id), eq(channel.id, before.id)));
  const going = parts.length === 0 ? null : await openProof(holding, houseId, before.id);
  if (going !== null)
    await endProof(holding, houseId, going, { outcome: 'rewired', why: parts.join(', ') }, act);
  await touchPlan(holding, houseId);
  return found(holding, houseId, before.id);
}

async function wiredNode(holding: Holding, id: string): Promise<string | null> {
  const [row] = await holding.db
    .select({ nodeId: channel.nodeId })
    .from(channel)
    .where(and(eq(channel.holdingId, holding.id), eq(channel.id, id)));
  return row?.nodeId ?? null;
}

export async function removeChannel(
  holding: Holding,
  houseId: string,
  gone: Channel,
  now: Date,
): Promise<void> {
  const uses = [...(await rulesOfChannel(holding, gone.id)), ...(await fixedTo(holding, houseId, gone.id))];
  if (uses.length > 0) throw new Refusal(null, `Still used by ${uses.join(', ')}. Change those first.`);
  await holding.db
    .update(channel)
    .set({ removedAt: now, revision: sql`${channel.revision} + 1` })
    .where(and(eq(channel.holdingId, holding.id), eq(channel.id, gone.id)));
  await touchPlan(holding, houseId);
}

async function fixedTo(holding: Holding, houseId: string, id: string): Promise<string[]> {
  const loops = await holding.db
    .select({ name: loop.name })
    .from(loop)
    .where(and(inUse(holding, houseId, loop), eq(loop.channelId, id)));
  const locks = await holding.db
    .select({ id: interlock.id })
    .from(interlock)
    .where(
      and(inUse(holding, houseId, interlock), or(eq(interlock.channelId, id), eq(interlock.otherId, id))),
    );
  return [...loops.map((row) => row.name), ...(locks.length > 0 ? ['an interlock'] : [])];
}

async function found(holding: Holding, houseId: string, id: string): Promise<Channel> {
  const row = isId(id) ? await findChannel(holding, houseId, id) : null;
  if (row === null) throw new Error('the channel was there a moment ago');
  return row;
}
