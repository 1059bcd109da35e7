/** The parts of a plan, one from each part of the configuration. */
import { compileConditions } from './conditions';
import { compileDerived } from './derived';
import type { PlanInterlock } from './interlocks';
import { pointsOfRule } from './parts';
import type { PlanChannel, PlanPoint, PlanRest, PlanRule, PlanSource } from './plan';
import type { ChannelConfig, HouseConfig, PointConfig, RuleConfig, SourceConfig } from './types';

/** Points that may honestly stand still, by role. */
const NEVER_FROZEN = new Set(['light', 'contact', 'ground', 'heap-core', 'heap-base', 'heap-edge']);

/** A place by name, noting the names that lead nowhere. */
export type Find = (key: string | null) => number | null;

export function compilePoint(config: PointConfig, house: HouseConfig, find: Find): PlanPoint {
  return {
    id: config.id,
    key: config.key,
    config,
    staleMs: (config.staleAfterS ?? 3 * config.reportEveryS) * 1000,
    frozenMs:
      config.frozenAfterS === null || NEVER_FROZEN.has(config.role) ? null : config.frozenAfterS * 1000,
    maxRateMs: config.maxRate === null ? null : config.maxRate / 1000,
    oneWire: config.sensor === 'one-wire',
    isHouse: config.role === 'house-air' || config.role === 'bench',
    derived: config.derived === null ? null : compileDerived(config.derived, house, find),
  };
}

export function compileRule(
  config: RuleConfig,
  channel: number,
  find: Find,
  calendar: PlanRule['calendar'],
): PlanRule {
  const { body } = config;
  const own = { point: find(body.point), key: body.point, offset: 0 };
  const standIns = body.standIns.map((one) => ({
    point: find(one.point),
    key: one.point,
    offset: one.offset,
  }));
  const only = body.only === undefined ? null : compileConditions(body.only);
  const points = [own, ...standIns];
  return {
    id: config.id,
    config,
    channel,
    warm: body.purpose === 'warm',
    points,
    calendar,
    only,
    rest: compileRest(body.rest, find),
  };
}

function compileRest(rest: RuleConfig['body']['rest'], find: Find): PlanRest | null {
  if (rest === undefined) return null;
  const gain = rest.leastGain;
  return {
    longestDrawMs: rest.longestDraw * 1000,
    leastMs: rest.least * 1000,
    mostMs: rest.most === undefined ? null : rest.most * 1000,
    until:
      rest.until === undefined
        ? null
        : { point: find(rest.until.point), key: rest.until.point, level: rest.until.level },
    leastGain:
      gain === undefined
        ? null
        : {
            kelvin: gain.kelvin,
            afterMs: gain.after * 1000,
            intake: find(gain.intake),
            return: find(gain.return),
          },
  };
}

export function compileChannel(
  config: ChannelConfig,
  index: number,
  rules: PlanRule[],
  interlocks: PlanInterlock[],
  point: Find,
  source: Find,
): PlanChannel {
  const own = rules.flatMap((rule, place) => (rule.channel === index ? [place] : []));
  const cools =
    config.loadKind === 'vent' || (own.length > 0 && own.every((place) => rules[place]?.warm === false));
  return {
    id: config.id,
    key: config.key,
    number: config.number,
    config,
    source: source(config.source),
    rules: own,
    safe: config.contact === 'NC' ? 'on' : 'off',
    minOnMs: config.minOnS * 1000,
    minOffMs: config.minOffS * 1000,
    highLimitPoint: point(config.highLimit?.point ?? null),
    runProofPoint: point(config.runProof?.point ?? null),
    inFrost: config.frostHelp ? 'helps' : cools ? 'cools' : null,
    frostMayBreakRest: own.every((place) => rules[place]?.config.body.rest?.frostMayBreak !== false),
    neverWith: interlocks.flatMap((lock) => {
      if (lock.kind !== 'never-with' || (lock.channel !== index && lock.other !== index)) return [];
      return [{ lock, other: lock.channel === index ? lock.other : lock.channel }];
    }),
    needs: interlocks.filter((lock) => lock.kind === 'needs' && lock.channel === index),
    neededBy: interlocks.filter((lock) => lock.kind === 'needs' && lock.other === index),
  };
}

/**
 * A rest needs a source to keep its credit. A channel whose rules have one and that names no source draws on a
 * source of its own, known by the channel's id and key, so that its longest draw is kept all the same.
 */
export function addOwnSources(channels: PlanChannel[], sources: PlanSource[], rules: PlanRule[]): void {
  channels.forEach((channel, place) => {
    const own = channel.rules.filter((rule) => rules[rule]?.rest !== null);
    if (channel.source !== null || own.length === 0) return;
    const nothing = { corePoint: null, basePoint: null, coreFloor: null, dailyLimitS: null, ready: null };
    const { id, key, config } = channel;
    channel.source = sources.length;
    sources.push({
      id,
      slug: key,
      config: { id, slug: key, name: config.label, kind: 'other', ...nothing },
      core: null,
      channels: [place],
      rules: own,
      hasRest: true,
      dailyLimitMs: null,
    });
  });
}

export function usedPoints(
  points: PlanPoint[],
  places: Map<string, number>,
  rules: PlanRule[],
  channels: PlanChannel[],
): Set<number> {
  const used = new Set<number>();
  const use = (index: number | null | undefined): void => {
    if (index === null || index === undefined || index < 0 || used.has(index)) return;
    used.add(index);
    for (const input of points[index]?.derived?.inputs ?? []) use(input);
  };
  for (const rule of rules) for (const point of pointsOfRule(rule, places)) use(point);
  for (const { highLimitPoint, runProofPoint } of channels) {
    use(highLimitPoint);
    use(runProofPoint);
  }
  return used;
}

export function compileSource(
  config: SourceConfig,
  index: number,
  channels: PlanChannel[],
  rules: PlanRule[],
  point: Find,
): PlanSource {
  const own = channels.flatMap((channel, place) => (channel.source === index ? [place] : []));
  const restRules = rules.flatMap((rule, place) =>
    own.includes(rule.channel) && rule.rest !== null ? [place] : [],
  );
  return {
    id: config.id,
    slug: config.slug,
    config,
    core: point(config.corePoint),
    channels: own,
    rules: restRules,
    hasRest: restRules.length > 0,
    dailyLimitMs: config.dailyLimitS === null ? null : config.dailyLimitS * 1000,
  };
}
