import 'server-only';
import type { Holding } from '@/db/client';
import { findAlarm, type Alarm } from '@/db/queries/alarm';
import { findArchive } from '@/db/queries/archive';
import { findPhotograph } from '@/db/queries/attachment';
import { findCalendarLink, type OwnLink } from '@/db/queries/calendar-link';
import { findChannel } from '@/db/queries/channel';
import { findDismissal } from '@/db/queries/finding-dismissal';
import { findHeapEntry } from '@/db/queries/heap-entry';
import { findHeapJob } from '@/db/queries/heap-job';
import { findHouse } from '@/db/queries/house';
import { findImport } from '@/db/queries/import';
import { findInterlock } from '@/db/queries/interlock';
import { findKey, type KeyRow } from '@/db/queries/key';
import { findLockout } from '@/db/queries/lockout';
import { findLoop } from '@/db/queries/loop';
import { findOwnMaterial } from '@/db/queries/material';
import { findHeapCost } from '@/db/queries/money';
import { findNode } from '@/db/queries/node';
import { listInvitations, type InvitationRow } from '@/db/queries/invitation';
import { findMember, type MemberRow } from '@/db/queries/member';
import { findPoint } from '@/db/queries/point';
import { findProbeSet } from '@/db/queries/probe-set';
import { findProof, type KeptProof } from '@/db/queries/proof';
import { findPicture, type FoundPicture } from '@/db/queries/proof-picture';
import { isId } from '@/db/queries/reference';
import { findReportSchedule } from '@/db/queries/report-schedule';
import { findRule, type FoundRule } from '@/db/queries/rule';
import { findSource } from '@/db/queries/source';
import { findTestRead } from '@/db/queries/test-read';
import type { Archive } from '@/lib/schema/archive';
import type { TestRead } from '@/lib/schema/bus';
import type { Dismissal } from '@/lib/schema/heap-finding';
import type { HeapJob } from '@/lib/schema/heap-job';
import type { HeapEntry, Photograph } from '@/lib/schema/heap-view';
import type { Import } from '@/lib/schema/import';
import type { Material } from '@/lib/schema/material';
import type { HeapCost } from '@/lib/schema/money';
import type { ProbeSet } from '@/lib/schema/probe-set';
import type { ReportSchedule } from '@/lib/schema/report';
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
  testRead: TestRead;
  point: Point;
  source: Source;
  channel: Channel;
  loop: Loop;
  interlock: Interlock;
  lockout: Lockout;
  entry: HeapEntry;
  photograph: Photograph;
  proof: KeptProof;
  picture: FoundPicture;
  round: ProbeSet;
  import: Import;
  job: HeapJob;
  dismissal: Dismissal;
  material: Material;
  calendar: OwnLink;
  cost: HeapCost;
  schedule: ReportSchedule;
  rule: FoundRule;
  alarm: Alarm;
  archive: Archive;
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
  testRead: (holding, ref, house) => findTestRead(holding, house, ref),
  point: (holding, ref, house) => findPoint(holding, house, ref),
  source: (holding, ref, house) => findSource(holding, house, ref),
  channel: (holding, ref, house) => findChannel(holding, house, ref),
  loop: (holding, ref, house) => findLoop(holding, house, ref),
  interlock: (holding, ref, house) => findInterlock(holding, house, ref),
  lockout: (holding, ref, house) => findLockout(holding, house, ref),
  entry: (holding, ref, house) => findHeapEntry(holding, house, ref),
  photograph: (holding, ref, house) => findPhotograph(holding, house, ref),
  proof: (holding, ref, house) => findProof(holding, house, ref),
  picture: (holding, ref, house) => findPicture(holding, house, ref),
  import: (holding, ref, house) => findImport(holding, house, ref),
  round: (holding, ref, house) => findProbeSet(holding, house, ref),
  job: (holding, ref, house) => findHeapJob(holding, house, ref),
  dismissal: (holding, ref, house) => findDismissal(holding, house, ref),
  material: findOwnMaterial,
  calendar: findCalendarLink,
  cost: (holding, ref, house) => findHeapCost(holding, house, ref),
  schedule: (holding, ref, house) => findReportSchedule(holding, house, ref),
  rule: findRule,
  alarm: async (holding, ref) => (isId(ref) ? findAlarm(holding, ref) : null),
  archive: findArchive,
  member: findMember,
  invitation: async (holding, ref) =>
    (await listInvitations(holding, new Date())).find((row) => row.id === ref) ?? null,
  key: findKey,
};

export function isThingName(name: string): name is ThingName {
  return Object.hasOwn(FIND, name);
}
