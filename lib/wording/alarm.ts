/** Each alarm in three parts: what is wrong, what it means for the crop, what to do. */
import { temperature } from '@/lib/units/format';
import { alarmRemedies } from './alarm-remedies';
import { faultWords } from './because-held';
import { becauseInstant } from './instants';
import { midSentence } from './rule-names';
import { begin, channelName, pointName, sourceName, timeWords, type Scene } from './scene';

export interface AlarmFacts {
  kind: string;
  about: { point?: string; channel?: string; source?: string; node?: string };
  data: Record<string, unknown>;
  /** Epoch ms. */
  raisedAt: number;
}

export interface AlarmWords {
  /** `alarm`: a crop, a load or the control of it is at stake; `warn`: it wants looking at by day. */
  level: 'alarm' | 'warn';
  title: string;
  effect: string;
  remedy: string;
}

const GRAVE = new Set([
  'frost',
  'node-lost',
  'control-not-running',
  'frost-without-reading',
  'hand-off-in-frost',
  'hand-on-in-frost',
  'interlock-blocks-frost',
  'high-limit',
  'relay-does-not-follow',
  'fan-standing',
  'runs-though-off',
  'cloned-token',
]);

/** @example alarmWords({kind: 'point-silent', …}, scene).title === 'Bench probe 3 has sent nothing since 05:31' */
export function alarmWords(alarm: AlarmFacts, scene: Scene): AlarmWords {
  const { effect, remedy } = alarmRemedies(alarm.kind);
  return {
    level: GRAVE.has(alarm.kind) ? 'alarm' : 'warn',
    title: title(alarm, scene),
    effect,
    remedy,
  };
}

/** An order for a list: what is grave first, of equals the newest. */
export function byGravity<Alarm extends AlarmFacts>(alarms: readonly Alarm[]): Alarm[] {
  const weight = (alarm: AlarmFacts) =>
    alarm.kind === 'control-not-running' ? 0 : alarm.kind === 'frost' ? 1 : GRAVE.has(alarm.kind) ? 2 : 3;
  return [...alarms].sort((one, other) => weight(one) - weight(other) || other.raisedAt - one.raisedAt);
}

function title(alarm: AlarmFacts, scene: Scene): string {
  const { about, data } = alarm;
  const point = about.point === undefined ? 'a sensor' : pointName(about.point, scene);
  const channel = about.channel === undefined ? 'a load' : channelName(about.channel, scene);
  const source = about.source === undefined ? 'a source' : sourceName(about.source, scene);
  const number = (field: string) => (typeof data[field] === 'number' ? data[field] : null);
  const degrees = (field: string) => temperature(number(field), scene.preferences);
  const since =
    timeWords(becauseInstant(data['lastAt'] ?? data['lastHeardAt']) ?? alarm.raisedAt, scene) ?? '';
  switch (alarm.kind) {
    case 'frost': {
      const where = typeof data['point'] === 'string' ? pointName(data['point'], scene) : point;
      const name = about.point === undefined && typeof data['point'] !== 'string' ? 'the house' : where;
      return number('value') === null
        ? `Frost near: ${name} is under its alarm`
        : `Frost near: ${name} fell to ${degrees('value')}`;
    }
    case 'point-silent':
      return `${begin(point)} has sent nothing since ${since}`;
    case 'point-not-trusted':
      return `${begin(point)} cannot be trusted: ${faultWords(typeof data['why'] === 'string' ? data['why'] : null)}`;
    case 'point-unsteady':
      return `${begin(point)} comes and goes`;
    case 'node-lost':
      return `Node ${about.node ?? ''} has not been heard since ${since}`;
    case 'control-not-running':
      return 'Control is not running';
    case 'core-under-floor':
      return number('value') === null
        ? `The core of ${source} is under its floor`
        : `The core of ${source} is at ${degrees('value')}, under its floor`;
    case 'core-not-good':
      return `The core of ${source} cannot be read, so its floor does not guard it`;
    case 'frost-without-reading':
      return 'Frost, and no sensor of the house answers';
    case 'hand-off-in-frost':
      return `Frost, and ${channel} is off by hand`;
    case 'hand-on-in-frost':
      return `Frost, and ${channel} is on by hand and cools`;
    case 'interlock-blocks-frost':
      return `Frost, and an interlock keeps ${channel} off`;
    case 'high-limit':
      return `${begin(channel)} was turned off by its high limit`;
    case 'no-gain':
      return `${begin(channel)} moves air but no heat`;
    case 'daily-limit':
      return `${begin(source)} has been drawn on to its daily limit`;
    case 'rest-ran-to-most':
      return `${begin(source)} did not come back in its longest rest`;
    case 'fan-standing':
      return `${begin(channel)} is ordered on but stands still`;
    case 'runs-though-off':
      return `${begin(channel)} is off but runs all the same`;
    case 'relay-does-not-follow':
      return `The relay of ${channel} does not do what it is told`;
    case 'frozen-point-in-frost':
      return `${begin(point)} stands at one value in frost`;
    case 'cloned-token':
      return `Two devices call themselves node ${about.node ?? ''}`;
    case 'epoch-too-far':
      return `Node ${about.node ?? ''} obeys a later control than this one`;
    default:
      return begin(midSentence(alarm.kind.replaceAll('-', ' ')));
  }
}
