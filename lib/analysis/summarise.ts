/** Sums a night of a source up from what was recorded: making it again gives the same. */
import { channelNight, type ChannelWork, heatForPower, measuredShare, shownHeat } from './channel-night';
import { climateOf } from './climate';
import { dawnOf } from './dawn';
import { type Heat, heatSum, NO_HEAT } from './heat';
import { hoursBetween } from './night';
import {
  LEAST_COVERAGE,
  type Missing,
  type NightInput,
  type NightSummary,
  type StripSpan,
  SUMMARY_VERSION,
} from './nights';
import { coverageOf, type Extent, lowestOf, nearest, secondsUnder, type Series } from './series';
import type { RestFit } from './rest-fit';
import { nightRecovery, restsOf } from './rests';
import { round } from './rounding';
import type { Span } from './spans';

/**
 * Sums one source's night up.
 * @returns figures cut to what they can bear: kWh to 1 Wh, shares to a thousandth, seconds whole
 */
export function summarise(input: NightInput): NightSummary {
  const { night, house, source, points } = input;
  const to = Math.max(night.from, Math.min(night.to, input.nowMs));
  const extent = { from: night.from, to };
  const work = input.channels.map((one) => channelNight(one, points, house.altitudeM, extent));
  const channels = work.map((one) => one.night);
  const sum = (of: (one: (typeof channels)[number]) => number) =>
    channels.reduce((all, one) => all + of(one), 0);
  const onSeconds = sum((one) => one.onSeconds);
  const restSeconds = sum((one) => one.restSeconds);
  const passedS = ((to - night.from) / 1000) * Math.max(channels.length, 1);

  const ofHouse = [...points.values()].filter(({ role }) => role === 'house-air' || role === 'bench');
  const lowest = lowestOf(ofHouse, night.from, to);
  const coldest = lowestOf(
    [...points.values()].filter(({ role }) => role === 'outdoors'),
    night.from,
    to,
  );
  const heat = heatOf(work);
  const shown = 'why' in heat ? null : shownHeat(heat, heat.assumed);
  const electricity = electricityOf(work);
  const power = 'why' in electricity ? null : { kWh: round(electricity.kWh, 4) };
  const heatMeasured = 'why' in heat ? null : measuredShare([heat]);
  const heatElectricity =
    'why' in heat || power === null
      ? null
      : {
          kWh: round(
            work.reduce((all, one) => all + one.heatPowerKWh, 0),
            4,
          ),
        };
  const core = source.core === null ? undefined : points.get(source.core);
  const dawn = dawnOf(night, house.zone, house.latitude, house.longitude);
  const atDawn = core === undefined || dawn > to ? null : nearest(core, dawn);
  const covered = round(coverage(input, ofHouse, to), 4);
  const rests = restsOfNight(input, work, extent);
  const recovery = nightRecovery(rests);
  const { missing: climateMissing, ...climate } = climateOf(points, night.from, to);

  return {
    version: SUMMARY_VERSION,
    night: night.night,
    source: source.slug,
    from: night.from,
    to,
    ends: night.to,
    complete: to === night.to,
    hours: round(hoursBetween(night.from, to), 4),
    onSeconds,
    restSeconds,
    heldSeconds: sum((one) => one.heldSeconds),
    handSeconds: sum((one) => one.handSeconds),
    dutyOfNight: passedS === 0 ? 0 : round(onSeconds / passedS, 4),
    dutyOfDraw: onSeconds + restSeconds === 0 ? null : round(onSeconds / (onSeconds + restSeconds), 4),
    starts: sum((one) => one.starts),
    heat: shown,
    heatMeasured,
    electricity: power,
    heatElectricity,
    heatForPower: heatForPower(shown, heatElectricity),
    lowest: lowest && { ...lowest, value: round(lowest.value, 2) },
    belowFrostLimitSeconds:
      house.frostLimitC === null || lowest === null
        ? null
        : Math.round(secondsUnder(ofHouse, house.frostLimitC, night.from, to)),
    outdoorsLowest: coldest && { value: round(coldest.value, 2), at: coldest.at },
    coreAtDawn: atDawn && { value: round(atDawn.value, 2), at: atDawn.at },
    recovery,
    rests,
    draws: work.flatMap((one) => one.draws),
    channels,
    ...climate,
    coverage: covered,
    coverageLow: Math.min(covered, heatMeasured ?? 1) < LEAST_COVERAGE,
    readings: readingsOf(points, night.from, to),
    missing: {
      ...('why' in heat ? { heat: heat.why } : {}),
      ...('why' in electricity ? { electricity: electricity.why } : {}),
      ...(lowest === null ? { lowest: 'no-readings' as const } : {}),
      ...(lowest === null ? { belowFrostLimit: 'no-readings' as const } : {}),
      ...(house.frostLimitC === null ? { belowFrostLimit: 'no-limit' as const } : {}),
      ...climateMissing,
      ...(recovery === null ? { recovery: whyNotRecovered(rests, source.base) } : {}),
    },
    strips: input.channels.map((channel, i) => ({
      channel: channel.number,
      label: channel.label,
      spans: stripOf(work[i]?.spans ?? [], night.from),
    })),
  };
}

function restsOfNight(
  { source, points }: NightInput,
  work: readonly ChannelWork[],
  extent: Extent,
): RestFit[] {
  const base = source.base === null ? undefined : points.get(source.base);
  if (base === undefined) return [];
  const core = source.core === null ? undefined : points.get(source.core);
  const spans = work.map((one) => one.spans);
  return restsOf(spans, base, core ?? null, extent);
}

function whyNotRecovered(rests: readonly RestFit[], base: string | null): Missing {
  if (base === null) return 'no-base';
  return rests.length === 0 ? 'no-rest' : 'not-fitted';
}

/** Good readings of [fromMs, toMs), of all points. */
export function readingsOf(points: ReadonlyMap<string, Series>, fromMs: number, toMs: number): number {
  let count = 0;
  for (const { good } of points.values())
    for (const { at } of good) if (at >= fromMs && at < toMs) count += 1;
  return count;
}

function stripOf(spans: readonly Span[], fromMs: number): StripSpan[] {
  const whole = (at: number) => Math.round((at - fromMs) / 1000);
  // what is plainly off is the strip's ground; a strip holds what is drawn on it
  return spans
    .filter((span) => span.kind !== 'off')
    .map((span) => [span.kind, whole(span.from), whole(span.to), span.on] satisfies StripSpan);
}

/** Heat of all loops of the source: known only where that of each is. */
function heatOf(work: readonly ChannelWork[]): ChannelWork['heat'] {
  if (work.length === 0) return { why: 'no-channel' };
  let all: Heat = NO_HEAT;
  let ranS = 0;
  let assumed = false;
  for (const { heat } of work) {
    if ('why' in heat) return heat;
    all = heatSum(all, heat);
    ranS += heat.ranS;
    assumed ||= heat.assumed;
  }
  return { ...all, ranS, assumed };
}

function electricityOf(work: readonly ChannelWork[]): { kWh: number } | { why: Missing } {
  if (work.length === 0) return { why: 'no-channel' };
  let kWh = 0;
  for (const { powerKWh } of work) {
    if (typeof powerKWh !== 'number') return powerKWh;
    kWh += powerKWh;
  }
  return { kWh };
}

/** Mean over the house's own points, the source's and its loops': those that the figures above are made of. */
function coverage(input: NightInput, ofHouse: readonly Series[], to: number): number {
  const { source, channels, points, night } = input;
  const keys = new Set(ofHouse.map((series) => series.key));
  for (const key of [
    source.core,
    source.base,
    ...channels.flatMap(({ loop }) => [loop?.intake, loop?.return]),
  ])
    if (typeof key === 'string') keys.add(key);
  if (keys.size === 0) return 0;
  let sum = 0;
  for (const key of keys) {
    const series = points.get(key);
    sum += series === undefined ? 0 : coverageOf(series, night.from, to);
  }
  return sum / keys.size;
}
