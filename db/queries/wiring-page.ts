/** What the page Wiring shows: everything wired in a house, and how the worker last saw it. */
import { and, eq, isNull } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { node } from '@/db/schema/node';
import { alarm } from '@/db/schema/watch';
import type { HouseState } from '@/lib/schema/house-state';
import type {
  Channel,
  FieldNode,
  House,
  Interlock,
  Lockout,
  Loop,
  Point,
  Source,
} from '@/lib/schema/yard-view';
import { listChannels } from './channel';
import { listInterlocks } from './interlock';
import { listLockouts } from './lockout';
import { listLoops } from './loop';
import { listNodes } from './node';
import { lastAlone } from './node-log';
import { listPoints } from './point';
import { lastProofs, type LastProof } from './proof';
import { readMemory } from './running';
import { listSources } from './source';

export interface WiringPage {
  house: House;
  nodes: FieldNode[];
  /** By node id, as the link keeps it. */
  nodeStatus: Record<string, Record<string, unknown>>;
  points: Point[];
  sources: Source[];
  channels: Channel[];
  loops: Loop[];
  interlocks: Interlock[];
  lockouts: Lockout[];
  /** When a channel was last put on by its node's fallback, epoch ms by the channel's id; absent where it never was. */
  ranAlone: Record<string, number>;
  /** Kinds of the alarms that stand about a channel, by its key. */
  channelAlarms: Record<string, string[]>;
  /** What the proof of each proved channel found, by the channel's id; absent where no record is kept of it. */
  proofs: Record<string, LastProof>;
  /** Null until the worker has stepped this house for the first time. */
  state: HouseState | null;
}

export async function readWiring(holding: Holding, house: House): Promise<WiringPage> {
  const rows = await holding.db
    .select({ id: node.id, status: node.status })
    .from(node)
    .where(and(eq(node.holdingId, holding.id), eq(node.houseId, house.id), isNull(node.removedAt)));
  const channels = await listChannels(holding, house.id);
  const ranAlone = await lastAlone(
    holding,
    channels.map((one) => one.id),
  );
  return {
    ...{ house, channels, ranAlone: Object.fromEntries(ranAlone) },
    channelAlarms: await standingByChannel(holding, house.id),
    proofs: Object.fromEntries(await lastProofs(holding, house.id)),
    nodes: await listNodes(holding, house.id),
    nodeStatus: Object.fromEntries(rows.map((row) => [row.id, row.status])),
    points: await listPoints(holding, house.id),
    sources: await listSources(holding, house.id),
    loops: await listLoops(holding, house.id),
    interlocks: await listInterlocks(holding, house.id),
    lockouts: await listLockouts(holding, house.id),
    state: (await readMemory(holding, house.id))?.state ?? null,
  };
}

async function standingByChannel(holding: Holding, houseId: string): Promise<Record<string, string[]>> {
  const rows = await holding.db
    .select({ kind: alarm.kind, about: alarm.about })
    .from(alarm)
    .where(and(eq(alarm.holdingId, holding.id), eq(alarm.houseId, houseId), isNull(alarm.clearedAt)));
  const byChannel: Record<string, string[]> = {};
  for (const { kind, about } of rows) {
    if (about.channel !== undefined) byChannel[about.channel] = [...(byChannel[about.channel] ?? []), kind];
  }
  return byChannel;
}
