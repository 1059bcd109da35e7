/** A house for tests, built from what differs. */
import type { RuleBody } from '@/lib/control/rule-body';
import type {
  ChannelConfig,
  HouseConfig,
  InterlockConfig,
  PointConfig,
  SourceConfig,
} from '@/lib/control/types';

/** A winter midnight in a place of whole-hour clock: local time is UTC. */
export const START = Date.UTC(2027, 0, 10, 0, 0, 0);
export const S = 1000;
export const MIN = 60 * S;
export const H = 60 * MIN;

export const point = (key: string, role: string, more: Partial<PointConfig> = {}): PointConfig => ({
  id: key,
  key,
  name: key,
  role,
  unit: 'Cel',
  min: -40,
  max: 85,
  staleAfterS: 90,
  reportEveryS: 30,
  maxRate: null,
  frozenAfterS: null,
  sensor: null,
  derived: null,
  ...more,
});

export const source = (slug: string, more: Partial<SourceConfig> = {}): SourceConfig => ({
  id: slug,
  slug,
  name: slug,
  kind: 'heap',
  corePoint: 'core',
  basePoint: 'base',
  coreFloor: null,
  dailyLimitS: null,
  ready: null,
  ...more,
});

export const channel = (key: string, number: number, more: Partial<ChannelConfig> = {}): ChannelConfig => ({
  id: key,
  number,
  key,
  label: key,
  node: 'LH-1',
  relay: number,
  source: null,
  frostHelp: false,
  contact: 'NO',
  loadKind: 'motor',
  loadW: 12,
  minOnS: 0,
  minOffS: 0,
  longestOnS: null,
  highLimit: null,
  runProof: null,
  ...more,
});

export const interlock = (
  kind: InterlockConfig['kind'],
  channelKey: string,
  other: string,
  more: Partial<InterlockConfig> = {},
): InterlockConfig => ({
  id: `${channelKey}-${kind}-${other}`,
  channel: channelKey,
  kind,
  other,
  delayS: 0,
  frostMayBreak: false,
  ...more,
});

export const body = (more: Partial<RuleBody> = {}): RuleBody => ({
  purpose: 'warm',
  point: 'bench',
  standIns: [],
  band: [{ from: '00:00', low: 4, high: 7.5 }],
  ...more,
});

export const rest = (
  longestDraw: number,
  least: number,
  more: object = {},
): NonNullable<RuleBody['rest']> => ({
  longestDraw,
  least,
  frostMayBreak: true,
  ...more,
});

export const rule = (
  channelKey: string,
  ruleBody: RuleBody,
  id = `rule-${channelKey}`,
): HouseConfig['rules'][number] => ({
  id,
  name: id,
  channel: channelKey,
  versionId: `${id}-1`,
  version: 1,
  body: ruleBody,
});

export const house = (more: Partial<HouseConfig> & { frostLimit?: number | null } = {}): HouseConfig => {
  const { frostLimit = null, ...rest_ } = more;
  return {
    house: {
      id: 'house',
      name: 'Long house',
      zone: 'UTC',
      latitude: 54.2,
      longitude: -2.3,
      altitude: 310,
      frostLimit,
      frostAlarm: null,
    },
    points: [
      point('bench', 'bench'),
      point('air', 'house-air'),
      point('core', 'heap-core'),
      point('base', 'heap-base'),
    ],
    sources: [],
    loops: [],
    channels: [channel('fan', 1)],
    interlocks: [],
    rules: [],
    ...rest_,
  };
};
