/** How a house stands, as pages, browsers and the interface are told: names for ids, ISO times with the house's offset. */
import type { HouseRecord } from '@/db/queries/plan';
import { isInstant } from '@/lib/control/because';
import type { StepResult } from '@/lib/control/step-result';
import type { DataValue, State } from '@/lib/control/types';
import type { HouseState } from '@/lib/schema/house-state';
import { isoIn } from '@/lib/server/wire';

export interface NodeStanding {
  online: boolean;
  lastHeardAt: number | null;
  /** Three connections took over from each other within ten minutes. */
  isCloned: boolean;
  /** It reports a command of an epoch that nobody can have led in. */
  isEpochTooFar: boolean;
}

export function houseState(
  record: HouseRecord,
  result: StepResult,
  reported: ReadonlyMap<string, State | null>,
  nodes: ReadonlyMap<string, NodeStanding>,
  now: number,
): HouseState {
  const { zone } = record.config.house;
  const iso = isoOf(zone);
  const points = new Map(result.points.map((point) => [point.id, point]));
  const channels = new Map(result.channels.map((channel) => [channel.id, channel]));
  const sources = new Map(result.sources.map((source) => [source.id, source]));
  return {
    at: isoIn(zone, now),
    points: record.points.map(({ id, key, name, role, unit }) => {
      const point = points.get(id);
      const last = point?.lastDoubt ?? null;
      return {
        key,
        name,
        role,
        unit,
        value: point?.value ?? null,
        at: iso(point?.at ?? null),
        quality: point?.quality ?? 'bad',
        why: point?.why ?? null,
        doubtSince: iso(point?.doubtSince ?? null),
        lastDoubt:
          last === null ? null : { why: last.why, from: isoIn(zone, last.from), to: isoIn(zone, last.to) },
      };
    }),
    channels: record.channels.flatMap((wiring) => {
      const channel = channels.get(wiring.id);
      if (channel === undefined) return [];
      return {
        number: wiring.number,
        key: wiring.key,
        label: wiring.label,
        state: channel.state,
        reported: reported.get(wiring.id) ?? null,
        claim: channel.claim,
        because: Object.fromEntries(
          Object.entries(channel.because).map(([field, value]) => [field, wire(zone, field, value)]),
        ),
        until: iso(channel.until),
        mode: channel.mode,
        proved: wiring.proved,
        lockedOut: wiring.lockedOut || channel.mode === 'locked',
      };
    }),
    sources: record.config.sources.flatMap(({ id, slug, name, kind }) => {
      const source = sources.get(id);
      if (source === undefined) return [];
      return {
        slug,
        name,
        kind,
        credit: source.credit,
        restSince: iso(source.restSince),
        restUntil: iso(source.restUntil),
        restAtMostUntil: iso(source.restAtMostUntil),
        drawnToday: Math.round(source.drawnTodayS),
        drawing: source.drawing,
        underFloor: source.underFloor,
      };
    }),
    nodes: record.nodes.map(({ id, key }) => {
      const standing = nodes.get(id);
      return { key, online: standing?.online ?? false, lastHeardAt: iso(standing?.lastHeardAt ?? null) };
    }),
  };
}

/** The points of a pack share its instant: most are told as the one before. */
function isoOf(zone: string): (at: number | null) => string | null {
  let last: number | null = null;
  let text: string | null = null;
  return (at) => {
    if (at !== last) {
      last = at;
      text = at === null ? null : isoIn(zone, at);
    }
    return text;
  };
}

export function isoUtc(at: number): string {
  return isoIn('utc', at);
}

function wire(zone: string, field: string, value: DataValue): DataValue {
  if (typeof value === 'number') return isInstant(field) ? isoIn(zone, value) : value;
  if (Array.isArray(value)) return value.map((one) => wire(zone, field, one));
  if (value === null || typeof value !== 'object') return value;
  return Object.fromEntries(Object.entries(value).map(([inner, one]) => [inner, wire(zone, inner, one)]));
}
