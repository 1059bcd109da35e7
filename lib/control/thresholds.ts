/**
 * Every value of a reading that the claims compare something with, as far as it bears on one channel. Which of them
 * would really change anything now is for look-ahead.ts to try.
 */
import type { RuleCalendar } from './calendar';
import { waitingRules } from './credit';
import { coldestPoint } from './claims/frost';
import type { Condition, ConditionNode } from './rule-body';
import { entry, type Run } from './run';
import type { Claim } from './types';

export interface Threshold {
  /** null: the coldest point of the house. */
  point: number | null;
  side: 'above' | 'below';
  value: number;
  /** The claim that compares. */
  of: Claim;
  /** What is compared counts over time, so nothing need change at once. */
  overTime: boolean;
}

/** @param laterAt when the clock alone turns the channel: bands of that hour count too; null: it does not */
export function thresholdsOf(run: Run, channel: number, claim: Claim, laterAt: number | null): Threshold[] {
  const { rules, neverWith, needs, neededBy } = entry(run.plan.channels, channel);
  // an interlock's other channel is turned by readings of its own, and turns this one
  const others = [
    ...neverWith.map((one) => one.other),
    ...needs.map((one) => one.other),
    ...neededBy.map((one) => one.channel),
  ];
  return [
    ...frostLimits(run, channel),
    ...sourceLevels(run, channel),
    ...highLimit(run, channel),
    ...rules.flatMap((rule) => leastGain(run, channel, rule)),
    ...[channel, ...others].flatMap((one) =>
      entry(run.plan.channels, one).rules.flatMap((rule) => [
        ...band(run, rule, entry(run.calendars, rule), false),
        ...(laterAt === null ? [] : band(run, rule, entry(run.plan.rules, rule).calendar(laterAt), true)),
        ...conditions(run, rule),
      ]),
    ),
  ];
}

/** On which side of a value a point would have to get from where it is; null: it is not to be trusted. */
function across(run: Run, point: number | null, value: number): Pick<Threshold, 'point' | 'side'> | null {
  if (point === null || run.usable[point] !== 'good') return null;
  const now = entry(run.points, point).value;
  if (now === null) return null;
  return { point, side: now >= value ? 'below' : 'above' };
}

function one(
  run: Run,
  point: number | null,
  value: number,
  of: Claim,
  overTime = false,
  side?: Threshold['side'],
): Threshold[] {
  const place = across(run, point, value);
  if (place === null) return [];
  return [{ point: place.point, side: side ?? place.side, value, of, overTime }];
}

function band(run: Run, rule: number, hour: RuleCalendar, isLater: boolean): Threshold[] {
  const { warm, points } = entry(run.plan.rules, rule);
  const { inSeason, inHours, low, high } = hour;
  if (!inSeason || !inHours) return [];
  const { using, latch } = entry(run.rules, rule);
  const { point, offset } = entry(points, using);
  // a latch turns on at one end of the band and off at the other
  const side = warm === latch ? 'above' : 'below';
  const value = (side === 'above' ? high : low) - offset;
  // the last digits of a subtraction are nobody's setting
  return one(run, point, Math.round(value * 1e9) / 1e9, 'band', isLater, side);
}

function conditions(run: Run, rule: number): Threshold[] {
  const { only } = entry(run.plan.rules, rule);
  if (only === null) return [];
  return leaves(only.tree).flatMap(({ fact, value, operator }) => {
    const point = run.plan.pointPlaces.get(fact);
    const ordered = operator.startsWith('lessThan') || operator.startsWith('greaterThan');
    if (point === undefined || typeof value !== 'number' || !ordered) return [];
    return one(run, point, value, 'band');
  });
}

function leaves(node: ConditionNode): Condition[] {
  if ('all' in node) return node.all.flatMap(leaves);
  if ('any' in node) return node.any.flatMap(leaves);
  return 'not' in node ? leaves(node.not) : [node];
}

function frostLimits(run: Run, channel: number): Threshold[] {
  const { frostLimit } = run.plan.house;
  const { inFrost } = entry(run.plan.channels, channel);
  if (frostLimit === null || inFrost === null || coldestPoint(run) === null) return [];
  const common = { point: null, of: 'frost', overTime: false } as const;
  return run.frost.on
    ? [{ ...common, side: 'above', value: frostLimit + 1 }]
    : [{ ...common, side: 'below', value: frostLimit }];
}

function sourceLevels(run: Run, channel: number): Threshold[] {
  const place = entry(run.plan.channels, channel).source;
  if (place === null) return [];
  const source = entry(run.plan.sources, place);
  const { resting, underFloor, ready } = entry(run.sources, place);
  const { coreFloor, ready: readiness } = source.config;
  const core = source.core;
  return [
    ...(coreFloor === null ? [] : one(run, core, underFloor ? coreFloor + 1 : coreFloor, 'source-guard')),
    ...(readiness === null || ready ? [] : one(run, core, readiness.level, 'source-guard', true)),
    ...(resting
      ? waitingRules(run, source).flatMap(({ rest }) =>
          rest === null || rest.until === null
            ? []
            : one(run, rest.until.point, rest.until.level, 'rest', true),
        )
      : []),
  ];
}

function highLimit(run: Run, channel: number): Threshold[] {
  const { config, highLimitPoint } = entry(run.plan.channels, channel);
  if (config.highLimit === null) return [];
  const { overHighLimit } = entry(run.channels, channel);
  const { above } = config.highLimit;
  return overHighLimit
    ? one(run, highLimitPoint, above - 1, 'limit', false, 'below')
    : one(run, highLimitPoint, above, 'limit', false, 'above');
}

function leastGain(run: Run, channel: number, rule: number): Threshold[] {
  const gain = entry(run.plan.rules, rule).rest?.leastGain ?? null;
  if (gain === null || gain.intake === null || entry(run.channels, channel).counted === 'off') return [];
  const intake = entry(run.points, gain.intake).value;
  return intake === null ? [] : one(run, gain.return, intake + gain.kelvin, 'rest', true);
}
