/**
 * Every value of a reading that the claims compare something with, as far as it bears on one channel. Which of them
 * would really change anything now is for look-ahead.ts to try.
 */
import type { RuleCalendar } from './calendar';
import { waitsOf } from './credit';
import { coldestPoint, ENDS_K } from './claims/frost';
import { gainAsked } from './least-gain';
import { AGAIN_K as LIMIT_AGAIN_K } from './claims/limit';
import { AGAIN_K as FLOOR_AGAIN_K } from './claims/source-guard';
import { conditionThresholds } from './condition-thresholds';
import { plain } from './plain';
import { valueOf } from './readings';
import { entry, type Run } from './run';
import { past, type Threshold } from './threshold';

/** @param laterAt when the clock alone turns the channel: bands of that hour count too; null: it does not */
export function thresholdsOf(run: Run, channel: number, laterAt: number | null): Threshold[] {
  const { neverWith, needs, neededBy } = entry(run.plan.channels, channel);
  // an interlock's other channel is turned by readings of its own, and stops this one or lets it go
  const isStill =
    laterAt === null && run.demandState[channel] === 'off' && entry(run.channels, channel).wanted === 'off';
  const others = [
    ...neverWith.map((one) => one.other),
    ...needs.map((one) => one.other),
    ...neededBy.map((one) => one.channel),
  ];
  return [channel, ...(isStill ? [] : others)].flatMap((one) => ofChannel(run, one, laterAt));
}

function ofChannel(run: Run, channel: number, laterAt: number | null): Threshold[] {
  return [
    ...frostLimits(run, channel),
    ...sourceLevels(run, channel),
    ...highLimit(run, channel),
    ...runProofs(run, channel),
    ...entry(run.plan.channels, channel).rules.flatMap((rule) => [
      ...leastGain(run, channel, rule),
      ...band(run, rule, entry(run.calendars, rule), false),
      ...(laterAt === null ? [] : band(run, rule, entry(run.plan.rules, rule).calendar(laterAt), true)),
      ...conditionThresholds(run, rule, laterAt !== null),
    ]),
  ];
}

function band(run: Run, rule: number, hour: RuleCalendar, isLater: boolean): Threshold[] {
  const { warm, points } = entry(run.plan.rules, rule);
  const { inSeason, inHours, low, high } = hour;
  if (!inSeason || !inHours) return [];
  const { using, latch } = entry(run.rules, rule);
  const { point, offset } = entry(points, using);
  // a latch turns on at one end of the band and off at the other
  const isHigh = warm === latch;
  // the last digits of a subtraction are nobody's setting
  const value = plain((isHigh ? high : low) - offset);
  const side = isHigh ? 'above' : 'below';
  return past(run, point, value, { of: 'band', lowIncludes: isHigh, overTime: isLater, side });
}

function frostLimits(run: Run, channel: number): Threshold[] {
  const { frostLimit } = run.plan.house;
  const { inFrost } = entry(run.plan.channels, channel);
  if (frostLimit === null || inFrost === null || coldestPoint(run) === null) return [];
  const common = { point: null, isEqual: false, of: 'frost', overTime: false } as const;
  return run.frost.on
    ? [{ ...common, side: 'above', value: frostLimit + ENDS_K, orAt: true }]
    : [{ ...common, side: 'below', value: frostLimit, orAt: false }];
}

function sourceLevels(run: Run, channel: number): Threshold[] {
  const place = entry(run.plan.channels, channel).source;
  if (place === null) return [];
  const source = entry(run.plan.sources, place);
  const { resting, underFloor, ready } = entry(run.sources, place);
  const { coreFloor, ready: readiness } = source.config;
  const { core } = source;
  const floor = coreFloor ?? 0;
  const guard = { of: 'source-guard', lowIncludes: false } as const;
  return [
    ...(coreFloor === null
      ? []
      : underFloor
        ? past(run, core, floor + FLOOR_AGAIN_K, { ...guard, side: 'above' })
        : past(run, core, floor, { ...guard, side: 'below' })),
    ...(readiness === null || ready
      ? []
      : past(run, core, readiness.level, { of: 'source-guard', lowIncludes: true, overTime: true })),
    ...(resting
      ? waitsOf(run, source).flatMap(({ until: { point, level } }) =>
          past(run, point, level, { of: 'rest', lowIncludes: false, overTime: true }),
        )
      : []),
  ];
}

function highLimit(run: Run, channel: number): Threshold[] {
  const { config, highLimitPoint } = entry(run.plan.channels, channel);
  if (config.highLimit === null) return [];
  const { overHighLimit } = entry(run.channels, channel);
  const { above } = config.highLimit;
  const limit = { of: 'limit', lowIncludes: true } as const;
  return overHighLimit
    ? past(run, highLimitPoint, above - LIMIT_AGAIN_K, { ...limit, side: 'below' })
    : past(run, highLimitPoint, above, { ...limit, side: 'above' });
}

function leastGain(run: Run, channel: number, rule: number): Threshold[] {
  const gain = gainAsked(run, channel, rule);
  if (gain === null || gain.intake === null || entry(run.channels, channel).counted === 'off') return [];
  const intake = valueOf(run, gain.intake);
  const back = gain.return === null ? null : valueOf(run, gain.return);
  if (intake === null || back === null) return [];
  const common = { of: 'rest', overTime: true } as const;
  return [
    ...past(run, gain.return, intake + gain.kelvin, { ...common, lowIncludes: false }),
    ...past(run, gain.intake, back - gain.kelvin, { ...common, lowIncludes: true }),
  ];
}

/** Of all that draw on the channel's source: one that stands still spends no credit, one that turns again does. */
function runProofs(run: Run, channel: number): Threshold[] {
  const { source } = entry(run.plan.channels, channel);
  if (source === null) return [];
  return entry(run.plan.sources, source).channels.flatMap((one) => {
    const { config, runProofPoint } = entry(run.plan.channels, one);
    if (config.runProof === null || entry(run.channels, one).counted === 'off') return [];
    return past(run, runProofPoint, config.runProof.above, { of: 'rest', lowIncludes: true, overTime: true });
  });
}
