/** From rows to the core's configuration: references between parts become keys and slugs, as people write them. */
import type { rule, ruleVersion } from '@/db/schema/rule';
import type { channel, interlock, loop, source } from '@/db/schema/channel';
import type { house } from '@/db/schema/house';
import type { node, point } from '@/db/schema/node';
import type {
  ChannelConfig,
  HouseConfig,
  InterlockConfig,
  LoopConfig,
  PointConfig,
  SourceConfig,
} from '@/lib/control/types';

export interface HouseRows {
  head: typeof house.$inferSelect;
  nodes: (typeof node.$inferSelect)[];
  points: (typeof point.$inferSelect)[];
  sources: (typeof source.$inferSelect)[];
  channels: (typeof channel.$inferSelect)[];
  loops: (typeof loop.$inferSelect)[];
  interlocks: (typeof interlock.$inferSelect)[];
  rules: { rule: typeof rule.$inferSelect; version: typeof ruleVersion.$inferSelect }[];
}

const DEFAULT_REPORT_EVERY_S = 30;

export function houseConfig(rows: HouseRows): HouseConfig {
  const { id, name, zone, latitude, longitude, altitude, frostLimit, frostAlarm } = rows.head;
  const pointKeys = new Map(rows.points.map((row) => [row.id, row.key]));
  const channelKeys = new Map(rows.channels.map((row) => [row.id, row.key]));
  const slugs = new Map(rows.sources.map((row) => [row.id, row.slug]));
  const nodes = new Map(rows.nodes.map((row) => [row.id, row]));
  const keyOf = (keys: Map<string, string>, key: string | null) =>
    key === null ? null : (keys.get(key) ?? null);
  return {
    house: { id, name, zone, latitude, longitude, altitude, frostLimit, frostAlarm },
    points: rows.points.map((row) => pointConfig(row, nodes.get(row.nodeId ?? '')?.reportEveryS)),
    sources: rows.sources.map((row): SourceConfig => ({
      id: row.id,
      slug: row.slug,
      name: row.name,
      kind: sourceKind(row.kind),
      corePoint: keyOf(pointKeys, row.corePointId),
      basePoint: keyOf(pointKeys, row.basePointId),
      coreFloor: row.coreFloor,
      dailyLimitS: row.dailyLimitS,
      ready:
        row.readyLevel === null || row.readyForS === null
          ? null
          : { level: row.readyLevel, forS: row.readyForS },
    })),
    loops: rows.loops.map((row): LoopConfig => ({
      id: row.id,
      name: row.name,
      source: keyOf(slugs, row.sourceId),
      channel: keyOf(channelKeys, row.channelId),
      intake: keyOf(pointKeys, row.intakePointId),
      return: keyOf(pointKeys, row.returnPointId),
    })),
    channels: rows.channels.map((row) => channelConfig(row, keyOf(slugs, row.sourceId))),
    interlocks: rows.interlocks.flatMap((row): InterlockConfig[] => {
      const one = channelKeys.get(row.channelId);
      const other = channelKeys.get(row.otherId);
      // An interlock with a channel that was taken out of use has nothing left to guard.
      if (one === undefined || other === undefined) return [];
      const kind = row.kind === 'needs' ? 'needs' : 'never-with';
      return [
        { id: row.id, channel: one, kind, other, delayS: row.delayS, frostMayBreak: row.frostMayBreak },
      ];
    }),
    rules: rows.rules.flatMap(({ rule, version }) => {
      const channel = channelKeys.get(rule.channelId);
      if (channel === undefined) return [];
      const { id, name } = rule;
      return [{ id, name, channel, versionId: version.id, version: version.number, body: version.body }];
    }),
  };
}

function pointConfig(row: HouseRows['points'][number], reportEveryS = DEFAULT_REPORT_EVERY_S): PointConfig {
  const { id, key, name, role, unit, min, max, staleAfterS, maxRate, frozenAfterS, sensor, derived } = row;
  return {
    ...{ id, key, name, role, unit, min, max, staleAfterS, reportEveryS, maxRate, frozenAfterS, sensor },
    derived:
      derived === null
        ? null
        : {
            of: derived.of,
            points: derived.points,
            ...(derived.window === undefined ? {} : { windowS: derived.window }),
          },
  };
}

const LOAD_KINDS = ['motor', 'vent', 'heater', 'valve', 'lamp'] as const;

function channelConfig(row: HouseRows['channels'][number], source: string | null): ChannelConfig {
  const { id, number, key, label, relay, frostHelp, minOnS, minOffS, longestOnS, highLimit, runProof } = row;
  return {
    ...{ id, number, key, label, relay, source, frostHelp, minOnS, minOffS, longestOnS, highLimit, runProof },
    node: row.nodeId,
    contact: row.contact === 'NC' ? 'NC' : 'NO',
    loadKind: LOAD_KINDS.find((kind) => kind === row.load.kind) ?? 'other',
    loadW: row.load.watts ?? null,
    flowM3S: row.flow === null ? null : row.flow.litresPerSecond / 1000,
  };
}

const SOURCE_KINDS = ['heap', 'ground', 'heater'] as const;

function sourceKind(kind: string): SourceConfig['kind'] {
  return SOURCE_KINDS.find((one) => one === kind) ?? 'other';
}
