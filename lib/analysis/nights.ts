/**
 * One source over one night: what it gave, for how long, for how much power, and how low the house came. Made of what
 * was kept, so making it again gives the same; Watch, Duty, the CSV and the interface all read this one summary.
 */
import { dawnOf } from './dawn';
import { type Flow, type Heat, loopHeat } from './heat';
import { hoursBetween, type Night } from './night';
import { coverageOf, lowestOf, nearest, secondsUnder, type Series } from './series';
import { channelSpans, type ChannelRecord, secondsOf, type Span, type SpanKind, startsOf } from './spans';

/** How a summary is made; a summary of an older make is made anew. */
export const SUMMARY_VERSION = 1;

export interface NightChannel {
  number: number;
  label: string;
  /** Of its load while on, W; null where nobody entered it. */
  powerW: number | null;
  flow: Flow | null;
  /** Keys of the points of its loop. */
  loop: { intake: string; return: string } | null;
  record: ChannelRecord;
}

export interface NightInput {
  night: Night;
  /** Epoch ms; a night is summed up to here while it lasts. */
  nowMs: number;
  house: { zone: string; latitude: number; longitude: number; altitudeM: number; frostLimitC: number | null };
  source: { slug: string; core: string | null; base: string | null };
  channels: NightChannel[];
  /** Every point of the house that the summary may need, by key. */
  points: ReadonlyMap<string, Series>;
}

export type Missing =
  'no-channel' | 'no-loop' | 'no-flow' | 'no-readings' | 'no-power' | 'no-limit' | 'not-fitted';

/** °C, s, kWh; instants epoch ms. Nulls have their reason in `missing`. */
export interface NightSummary {
  version: number;
  night: string;
  source: string;
  from: number;
  /** End of what is summed: the noon, or now. */
  to: number;
  /** Its second noon. */
  ends: number;
  complete: boolean;
  /** Of the night, or of what has passed of it. */
  hours: number;
  /** Channel-seconds, of all channels of the source. */
  onSeconds: number;
  restSeconds: number;
  /** Share of the channels' time that they ran, 0 to 1. */
  dutyOfNight: number;
  /** Run ÷ (run + rest); null on a night with neither. */
  dutyOfDraw: number | null;
  starts: number;
  heat: { kWh: number; sd: number } | null;
  /** Share of the run in which both ends of the loop were read. */
  heatMeasured: number | null;
  electricity: { kWh: number } | null;
  lowest: { point: string; name: string; value: number; at: number } | null;
  belowFrostLimitSeconds: number;
  outdoorsLowest: { value: number; at: number } | null;
  coreAtDawn: { value: number; at: number } | null;
  /** A fit of the rests; none is made yet. */
  recovery: null;
  /** Share of the time in which the points that matter here had good readings, 0 to 1. */
  coverage: number;
  /** Good readings that it was made of: where more are kept by now, it is due anew. */
  readings: number;
  missing: Partial<Record<'heat' | 'electricity' | 'lowest' | 'belowFrostLimit' | 'recovery', Missing>>;
  strips: { channel: number; label: string; spans: StripSpan[] }[];
}

/** Kind, begin and end in whole seconds from the night's first noon, and whether the load ran. */
export type StripSpan = [kind: SpanKind, from: number, to: number, on: boolean];

const round = (value: number, decimals: number) => Number(value.toFixed(decimals));

/**
 * Sums one source's night up.
 * @returns figures cut to what they can bear: kWh to 1 Wh, shares to a thousandth, seconds whole
 */
export function summarise(input: NightInput): NightSummary {
  const { night, house, source, channels, points } = input;
  const to = Math.max(night.from, Math.min(night.to, input.nowMs));
  const spans = channels.map((channel) => channelSpans(channel.record, night.from, to));
  const all = spans.flat();
  const onSeconds = Math.round(secondsOf(all, (span) => span.on));
  const restSeconds = Math.round(secondsOf(all, (span) => span.kind === 'rest'));
  const passedS = ((to - night.from) / 1000) * Math.max(channels.length, 1);

  const ofHouse = [...points.values()].filter(({ role }) => role === 'house-air' || role === 'bench');
  const outdoors = [...points.values()].filter(({ role }) => role === 'outdoors');
  const lowest = lowestOf(ofHouse, night.from, to);
  const coldest = lowestOf(outdoors, night.from, to);
  const heat = heatOf(input, spans);
  const electricity = electricityOf(channels, spans);
  const core = source.core === null ? undefined : points.get(source.core);
  const dawn = dawnOf(night, house.zone, house.latitude, house.longitude);
  const atDawn = core === undefined || dawn > to ? null : nearest(core, dawn);

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
    dutyOfNight: passedS === 0 ? 0 : round(onSeconds / passedS, 4),
    dutyOfDraw: onSeconds + restSeconds === 0 ? null : round(onSeconds / (onSeconds + restSeconds), 4),
    starts: spans.reduce((sum, one) => sum + startsOf(one), 0),
    heat: 'why' in heat ? null : { kWh: round(heat.kWh, 3), sd: round(heat.sd, 3) },
    heatMeasured: 'why' in heat || onSeconds === 0 ? null : round(Math.min(1, heat.measuredS / onSeconds), 3),
    electricity: 'why' in electricity ? null : { kWh: round(electricity.kWh, 4) },
    lowest: lowest && { ...lowest, value: round(lowest.value, 2) },
    belowFrostLimitSeconds:
      house.frostLimitC === null ? 0 : Math.round(secondsUnder(ofHouse, house.frostLimitC, night.from, to)),
    outdoorsLowest: coldest && { value: round(coldest.value, 2), at: coldest.at },
    coreAtDawn: atDawn && { value: round(atDawn.value, 2), at: atDawn.at },
    recovery: null,
    coverage: round(coverage(input, ofHouse, to), 4),
    readings: readingsOf(input, to),
    missing: {
      ...('why' in heat ? { heat: heat.why } : {}),
      ...('why' in electricity ? { electricity: electricity.why } : {}),
      ...(lowest === null ? { lowest: 'no-readings' as const } : {}),
      ...(house.frostLimitC === null ? { belowFrostLimit: 'no-limit' as const } : {}),
      recovery: 'not-fitted',
    },
    strips: channels.map((channel, i) => ({
      channel: channel.number,
      label: channel.label,
      spans: stripOf(spans[i] ?? [], night.from),
    })),
  };
}

function readingsOf({ night, points }: NightInput, to: number): number {
  let count = 0;
  for (const { good } of points.values())
    for (const { at } of good) if (at >= night.from && at < to) count += 1;
  return count;
}

function stripOf(spans: readonly Span[], fromMs: number): StripSpan[] {
  const whole = (at: number) => Math.round((at - fromMs) / 1000);
  // what is plainly off is the strip's ground; a strip holds what is drawn on it
  return spans
    .filter((span) => span.kind !== 'off')
    .map((span) => [span.kind, whole(span.from), whole(span.to), span.on] satisfies StripSpan);
}

/** Heat of all loops of the source; their deviations add as they are, since a wrong probe is wrong for each. */
function heatOf(input: NightInput, spans: readonly Span[][]): Heat | { why: Missing } {
  if (input.channels.length === 0) return { why: 'no-channel' };
  const sum: Heat = { kWh: 0, sd: 0, measuredS: 0 };
  let ranS = 0;
  for (const [i, channel] of input.channels.entries()) {
    if (channel.loop === null) return { why: 'no-loop' };
    if (channel.flow === null || channel.flow.m3PerS <= 0) return { why: 'no-flow' };
    const intake = input.points.get(channel.loop.intake);
    const back = input.points.get(channel.loop.return);
    if (intake === undefined || back === undefined) return { why: 'no-readings' };
    const runs = (spans[i] ?? []).filter((span) => span.on);
    const one = loopHeat(runs, intake, back, channel.flow, input.house.altitudeM);
    sum.kWh += one.kWh;
    sum.sd += one.sd;
    sum.measuredS += one.measuredS;
    ranS += secondsOf(runs, () => true);
  }
  // a figure from less than half of the run would pass for the whole of it
  return sum.measuredS < ranS / 2 ? { why: 'no-readings' } : sum;
}

function electricityOf(
  channels: readonly NightChannel[],
  spans: readonly Span[][],
): { kWh: number } | { why: Missing } {
  if (channels.length === 0) return { why: 'no-channel' };
  let kWh = 0;
  for (const [i, channel] of channels.entries()) {
    if (channel.powerW === null) return { why: 'no-power' };
    kWh += (channel.powerW * secondsOf(spans[i] ?? [], (span) => span.on)) / 3_600_000;
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
