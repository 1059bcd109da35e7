/** From a house as the database keeps it to a plan that `step` can run. */
import { compileCalendar, compileTimeFacts, place } from './calendar';
import {
  addOwnSources,
  compileChannel,
  compilePoint,
  compileRule,
  compileSource,
  usedPoints,
  type Find,
} from './compile-parts';
import { derivedOrder } from './derived';
import { needsOrder, type PlanInterlock } from './interlocks';
import { partByChannel, partsByPoint, partsOf } from './parts';
import type { Plan, PlanChannel, PlanRule } from './plan';
import type { HouseConfig } from './types';

/**
 * Compiles a house. Never throws for a configuration that the forms accepted: a key that leads nowhere (a point
 * removed under a rule) is noted in `plan.missing`, and what hangs on it counts as bad.
 */
export function compile(config: HouseConfig): Plan {
  const missing = new Set<string>();
  const finder = (keys: string[]): Find => {
    const places = new Map(keys.map((key, index) => [key, index]));
    return (key) => {
      if (key === null) return null;
      const found = places.get(key);
      if (found === undefined) missing.add(key);
      return found ?? null;
    };
  };
  const point = finder(config.points.map((one) => one.key));
  const source = finder(config.sources.map((one) => one.slug));
  const channel = finder(config.channels.map((one) => one.key));
  const where = place(config.house);

  const rules: PlanRule[] = [];
  for (const rule of config.rules) {
    const place = channel(rule.channel);
    if (place !== null) rules.push(compileRule(rule, place, point, compileCalendar(rule.body, where)));
  }
  const interlocks: PlanInterlock[] = [];
  for (const lock of config.interlocks) {
    const first = channel(lock.channel);
    const other = channel(lock.other);
    if (first === null || other === null) continue;
    interlocks.push({
      kind: lock.kind,
      channel: first,
      other,
      delayMs: lock.delayS * 1000,
      frostMayBreak: lock.frostMayBreak,
    });
  }
  const channels = config.channels.map((one, index) =>
    compileChannel(one, index, rules, interlocks, point, source),
  );
  const sources = config.sources.map((one, index) => compileSource(one, index, channels, rules, point));
  addOwnSources(channels, sources, rules);
  const points = config.points.map((one) => compilePoint(one, config, point));
  const pointPlaces = new Map(points.map((one, index) => [one.key, index]));
  const order = channels
    .map((_, index) => index)
    .sort((a, b) => numberOf(channels, a) - numberOf(channels, b));
  const joined = {
    ...{ points, pointPlaces, sources, channels, rules, order },
    needsOrder: needsOrder(channels.length, interlocks),
  };
  const parts = partsOf(joined);
  return {
    ...joined,
    shape: [points, rules, sources, channels].map((list) => list.map((one) => one.id).join(',')).join(';'),
    house: config.house,
    parts,
    partOf: partByChannel(parts),
    askedBy: partsByPoint({ ...joined, parts }),
    usedPoints: usedPoints(points, pointPlaces, rules, channels),
    interlocks,
    derivedOrder: derivedOrder(points),
    housePoints: points.flatMap((one, index) => (one.isHouse ? [index] : [])),
    timeFacts: compileTimeFacts(where),
    usesTimeFacts: rules.some((rule) => rule.only?.facts.some((fact) => fact.startsWith('time.')) === true),
    missing: [...missing],
  };
}

const numberOf = (channels: PlanChannel[], index: number): number => channels[index]?.number ?? 0;
