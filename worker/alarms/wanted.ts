/** Which alarms ought to stand in a house: level-triggered, from its faults and its nodes. Pure. */
import type { AlarmAbout } from '@/db/queries/alarm';
import type { HouseRecord, NodeWiring, PointWiring } from '@/db/queries/plan';
import type { StepResult } from '@/lib/control/step-result';
import type { Fault } from '@/lib/control/events';
import type { AlarmKind } from '@/lib/schema/alarm';
import type { NodeStanding } from '../control/state';

export interface WantedAlarm {
  key: string;
  kind: AlarmKind;
  about: AlarmAbout;
  data: Record<string, unknown>;
  since: number;
}

/** A node is lost this long after its points are taken as silent. */
const LOST_AFTER_SILENCE_MS = 60_000;
const SILENT_INTERVALS = 3;

export interface WantedAlarms {
  alarms: WantedAlarm[];
  /** Keys of which nothing can be said yet: they stay as they are. `others`: all that are not wanted. */
  undecided: ReadonlySet<string> | 'others';
}

/**
 * App time at which a node that says nothing more is lost. Silence counts from the worker's own start, for before it the
 * silence may have been ours. Null: it is here, or was never heard of.
 */
export function lostAt(
  node: NodeWiring,
  standing: NodeStanding | undefined,
  startedAt: number,
): number | null {
  if (standing === undefined || standing.lastHeardAt === null) return null;
  if (isLinked(node) && standing.online) return null;
  const heardAt = Math.max(standing.lastHeardAt, startedAt);
  return heardAt + SILENT_INTERVALS * node.reportEveryS * 1000 + LOST_AFTER_SILENCE_MS;
}

/** It is here while its link stands; one that only posts is here while it does. */
const isLinked = (node: NodeWiring) => node.kind !== 'http';

/** What stands while a house's own step fails: nothing is known of the rest. */
export function controlFailed(houseId: string, why: string, since: number): WantedAlarms {
  const key = keyOf('control-not-running', houseId, 'step');
  return {
    alarms: [{ key, kind: 'control-not-running', about: {}, data: { why }, since }],
    undecided: 'others',
  };
}

export function wantedAlarms(
  record: HouseRecord,
  result: StepResult,
  nodes: ReadonlyMap<string, NodeStanding>,
  startedAt: number,
  now: number,
): WantedAlarms {
  const alarms: WantedAlarm[] = [];
  const undecided = new Set<string>();
  /** One cause leads: of a node that is away, or was never there, its points have nothing to add. */
  const away = new Set<string>();
  for (const node of record.nodes) {
    const standing = nodes.get(node.id);
    const at = lostAt(node, standing, startedAt);
    const key = keyOf('node-lost', record.id, node.id);
    if (at !== null && now >= at) {
      const data = { lastHeardAt: standing?.lastHeardAt ?? null };
      alarms.push({ key, kind: 'node-lost', about: { node: node.key }, data, since: at });
    } else if (at !== null && standing?.lastHeardAt !== null && (standing?.lastHeardAt ?? 0) < startedAt) {
      undecided.add(key);
    }
    const about = { node: node.key };
    if (standing?.isCloned === true) {
      alarms.push({
        key: keyOf('cloned-token', record.id, node.id),
        kind: 'cloned-token',
        about,
        data: {},
        since: now,
      });
    }
    if (standing?.isEpochTooFar === true) {
      alarms.push({
        key: keyOf('epoch-too-far', record.id, node.id),
        kind: 'epoch-too-far',
        about,
        data: {},
        since: now,
      });
    }
    const isHere = isLinked(node) ? standing?.online === true : at !== null && now < at;
    if (!isHere) away.add(node.id);
  }
  for (const fault of result.faults) {
    const alarm = fromFault(record, fault);
    const point = waitsFor(record, fault);
    const node = record.nodes.find((one) => one.id === point?.nodeId);
    const lastAt = result.points.find((one) => one.id === point?.id)?.at ?? -Infinity;
    // After a gap of the worker's own a point is uncertain till it speaks again: that is no news of the point.
    const isSettling =
      node !== undefined &&
      lastAt < startedAt &&
      now < startedAt + SILENT_INTERVALS * node.reportEveryS * 1000;
    if (node !== undefined && away.has(node.id)) continue;
    if (isSettling) undecided.add(alarm.key);
    else alarms.push(alarm);
  }
  return { alarms, undecided };
}

function fromFault(record: HouseRecord, fault: Fault): WantedAlarm {
  const { kind, data, since } = fault;
  const about = named(record, fault.about);
  if (kind !== 'point-bad') return { key: keyOf(kind, record.id, fault.key), kind, about, data, since };
  const alarm = isSilence(fault) ? 'point-silent' : 'point-not-trusted';
  return { key: keyOf(alarm, record.id, fault.about.point ?? fault.key), kind: alarm, about, data, since };
}

const isSilence = ({ data }: Fault) => data['why'] === 'silent' || data['why'] === 'never-spoke';

/** The point without whose readings this fault says nothing new; undefined for faults that stand by themselves. */
function waitsFor(record: HouseRecord, fault: Fault): PointWiring | undefined {
  const { kind, about } = fault;
  if (kind === 'point-bad' && isSilence(fault)) return record.points.find((one) => one.id === about.point);
  if (kind !== 'core-not-good') return undefined;
  const core = record.config.sources.find((one) => one.id === about.source)?.corePoint;
  return record.points.find((one) => one.key === core);
}

/** Ids become what people call the thing: key or slug. */
function named(record: HouseRecord, { point, channel, source }: Fault['about']): AlarmAbout {
  const keyIn = (list: readonly { id: string; key: string }[], id: string) =>
    list.find((one) => one.id === id)?.key ?? id;
  return {
    ...(point === undefined ? {} : { point: keyIn(record.points, point) }),
    ...(channel === undefined ? {} : { channel: keyIn(record.channels, channel) }),
    ...(source === undefined
      ? {}
      : { source: record.config.sources.find((one) => one.id === source)?.slug ?? source }),
  };
}

function keyOf(kind: string, houseId: string, about: string): string {
  return `${kind}:${houseId}:${about}`;
}
