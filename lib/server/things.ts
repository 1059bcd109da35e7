import 'server-only';
import type { Holding } from '@/db/client';
import { findAlarm, type Alarm } from '@/db/queries/alarm';
import { findChannel } from '@/db/queries/channel';
import { findHeapEntry } from '@/db/queries/heap-entry';
import { findHouse } from '@/db/queries/house';
import { findInterlock } from '@/db/queries/interlock';
import { findKey, type KeyRow } from '@/db/queries/key';
import { findLockout } from '@/db/queries/lockout';
import { findLoop } from '@/db/queries/loop';
import { findNode } from '@/db/queries/node';
import { listInvitations, type InvitationRow } from '@/db/queries/invitation';
import { findMember, type MemberRow } from '@/db/queries/member';
import { findPoint } from '@/db/queries/point';
import { isId } from '@/db/queries/reference';
import { findRule, type FoundRule } from '@/db/queries/rule';
import { findSource } from '@/db/queries/source';
import type { HeapEntry } from '@/lib/schema/heap-view';
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

/** What the braces of a path stand for. */
export interface Things {
  house: House;
  node: FieldNode;
  point: Point;
  source: Source;
  channel: Channel;
  loop: Loop;
  interlock: Interlock;
  lockout: Lockout;
  entry: HeapEntry;
  rule: FoundRule;
  alarm: Alarm;
  member: MemberRow;
  invitation: InvitationRow;
  key: KeyRow;
}
export type ThingName = keyof Things;

type Find<T> = (holding: Holding, ref: string, houseId: string) => Promise<T | null>;

/** Each looks in the given holding only, so another holding's thing is as absent as one that never was. */
export const FIND: { [K in ThingName]: Find<Things[K]> } = {
  house: findHouse,
  node: (holding, ref, house) => findNode(holding, house, ref),
  point: (holding, ref, house) => findPoint(holding, house, ref),
  source: (holding, ref, house) => findSource(holding, house, ref),
  channel: (holding, ref, house) => findChannel(holding, house, ref),
  loop: (holding, ref, house) => findLoop(holding, house, ref),
  interlock: (holding, ref, house) => findInterlock(holding, house, ref),
  lockout: (holding, ref, house) => findLockout(holding, house, ref),
  entry: (holding, ref, house) => findHeapEntry(holding, house, ref),
  rule: findRule,
  alarm: async (holding, ref) => (isId(ref) ? findAlarm(holding, ref) : null),
  member: findMember,
  invitation: async (holding, ref) =>
    (await listInvitations(holding, new Date())).find((row) => row.id === ref) ?? null,
  key: findKey,
};

export function isThingName(name: string): name is ThingName {
  return Object.hasOwn(FIND, name);
}
