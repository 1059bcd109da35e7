/** What can be added and changed on the page Wiring: which form, which schema, which address. */
import type { z } from 'zod';
import { ChannelAmend, ChannelCreate, InterlockAmend, InterlockCreate } from '@/lib/schema/channel';
import { HouseAmend, HouseCreate } from '@/lib/schema/house';
import { NodeAmend, NodeCreate } from '@/lib/schema/node';
import { PointAmend, PointCreate } from '@/lib/schema/point';
import { ReversingVentCreate, DEAD_TIME_S } from '@/lib/schema/reversing-vent';
import { LoopAmend, LoopCreate, SourceAmend, SourceCreate } from '@/lib/schema/source';
import { channelGroups } from './forms/channel';
import { houseGroups } from './forms/house';
import { interlockGroups, loopGroups } from './forms/loop';
import { busesAtFirst } from './forms/bus';
import { nodeGroups } from './forms/node';
import type { Yard } from './forms/options';
import { pointGroups } from './forms/point';
import { reversingVentGroups } from './forms/reversing-vent';
import { sourceGroups } from './forms/source';
import type { Group } from './spec';

export type Kind =
  'house' | 'node' | 'point' | 'source' | 'channel' | 'loop' | 'interlock' | 'reversing-vent';

export interface KindOf {
  word: string;
  create: z.ZodType;
  amend: z.ZodType;
  list: (yard: Yard) => { id: string; revision: number }[];
  groups: (yard: Yard, id: string | null) => Group[];
  /** What stands in a new form at first. */
  first: (yard: Yard) => object;
  /** What happens when it is taken out of use; null: that is not done here. */
  removal: string | null;
}

const nextNumber = (yard: Yard) => Math.max(0, ...yard.channels.map((one) => one.number)) + 1;

export const KINDS: Record<Kind, KindOf> = {
  house: {
    word: 'house',
    create: HouseCreate,
    amend: HouseAmend,
    list: (yard) => [yard.house],
    groups: () => houseGroups,
    first: () => ({ altitude: 0 }),
    removal: null,
  },
  node: {
    word: 'field node',
    create: NodeCreate,
    amend: NodeAmend,
    list: (yard) => yard.nodes,
    groups: (yard, id) => nodeGroups(yard.nodes.find((one) => one.id === id) ?? null),
    first: () => ({ kind: 'socket', reportEvery: 30, channels: 8, ...busesAtFirst }),
    removal:
      'Its token ends at once and its relays fall to their safe states. Its points and channels must be moved or removed first.',
  },
  point: {
    word: 'point',
    create: PointCreate,
    amend: PointAmend,
    list: (yard) => yard.points,
    groups: (yard, id) => pointGroups(yard, yard.points.find((one) => one.id === id) ?? null),
    first: (yard) => ({ unit: 'Cel', node: yard.nodes[0]?.key ?? '', min: -40, max: 85, offset: 0, gain: 1 }),
    removal:
      'Its readings stay, and it takes no more. A rule, source or loop that uses it must let go of it first.',
  },
  source: {
    word: 'source',
    create: SourceCreate,
    amend: SourceAmend,
    list: (yard) => yard.sources,
    groups: sourceGroups,
    first: () => ({ kind: 'heap' }),
    removal: 'Its nights and its book stay. Channels and loops must let go of it first.',
  },
  channel: {
    word: 'channel',
    create: ChannelCreate,
    amend: ChannelAmend,
    list: (yard) => yard.channels,
    groups: channelGroups,
    first: (yard) => ({
      number: nextNumber(yard),
      node: yard.nodes.find((one) => one.channels > 0)?.key ?? '',
      contact: 'NO',
      load: { kind: 'motor' },
      minOn: 120,
      minOff: 120,
    }),
    removal:
      'Its load goes off, and the relay is spare. What it did stays on record. Its rules must be retired first.',
  },
  loop: {
    word: 'loop',
    create: LoopCreate,
    amend: LoopAmend,
    list: (yard) => yard.loops,
    groups: loopGroups,
    first: () => ({}),
    removal: 'The heat of this loop is reckoned no more.',
  },
  interlock: {
    word: 'interlock',
    create: InterlockCreate,
    amend: InterlockAmend,
    list: (yard) => yard.interlocks,
    groups: interlockGroups,
    first: () => ({ kind: 'never-with', delay: 5 }),
    removal: 'The two channels no longer wait for one another.',
  },
  // made as one, then two channels and an interlock, each changed by its own form
  'reversing-vent': {
    word: 'reversing vent',
    create: ReversingVentCreate,
    amend: ReversingVentCreate,
    list: () => [],
    groups: reversingVentGroups,
    first: (yard) => ({
      node: yard.nodes.find((one) => one.channels > 1)?.key ?? '',
      open: { number: nextNumber(yard) },
      shut: { number: nextNumber(yard) + 1 },
      deadTime: DEAD_TIME_S,
    }),
    removal: null,
  },
};
