/** One channel over one night: its seconds, its draws, and the heat and electricity of each. */
import { type Heat, heatSum, loopHeat, NO_HEAT } from './heat';
import type { ChannelNight, DrawHeat, HeatForPower, Missing, NightChannel, NightHeat } from './nights';
import { round } from './rounding';
import { running, type Running } from './running';
import { runsOf } from './runs';
import type { Extent, Series } from './series';
import { channelSpans, secondsOf, type Span, startsOf } from './spans';

/** What of a channel is known to more digits than it is shown with, for sums over channels. */
export interface ChannelWork {
  spans: Span[];
  night: ChannelNight;
  draws: DrawHeat[];
  heat: (Heat & { assumed: boolean; ranS: number }) | { why: Missing };
  powerKWh: number | { why: Missing };
  /** Of it, what the load took while its heat was known, standing included; nothing where the heat is not known. */
  heatPowerKWh: number;
}

/** @returns a channel's night over [night.from, to); figures are cut to what they can bear */
export function channelNight(
  channel: NightChannel,
  points: ReadonlyMap<string, Series>,
  altitudeM: number,
  extent: Extent,
): ChannelWork {
  const spans = channelSpans(channel.record, extent.from, extent.to);
  const seconds = (passes: (span: Span) => boolean) => Math.round(secondsOf(spans, passes));
  const onSeconds = seconds((span) => span.on);
  const restSeconds = seconds((span) => span.kind === 'rest');
  const passedS = (extent.to - extent.from) / 1000;
  const { runProof } = channel;
  const proof = runProof && { series: points.get(runProof.point), above: runProof.above };
  const runs = runsOf(spans).map(({ from, to }) => ({ from, to }));
  const draws = runs.map((run) => ({ run, running: running(run, proof) }));
  const loop = loopOf(channel, points);
  const heats = draws.map((draw) => drawHeat(draw.running, loop, altitudeM));
  const heat = heatOf(heats, draws, loop);
  const powerKWh =
    channel.powerW === null
      ? { why: 'no-power' as const }
      : (channel.powerW * secondsOf(spans, (span) => span.on)) / 3_600_000;
  const standingS = draws.reduce((sum, draw) => sum + draw.running.standingS, 0);
  const night: ChannelNight = {
    number: channel.number,
    label: channel.label,
    onSeconds,
    restSeconds,
    heldSeconds: seconds((span) => span.kind === 'held'),
    handSeconds: seconds((span) => span.kind === 'hand'),
    dutyOfNight: passedS === 0 ? 0 : round(onSeconds / passedS, 4),
    dutyOfDraw: onSeconds + restSeconds === 0 ? null : round(onSeconds / (onSeconds + restSeconds), 4),
    starts: startsOf(spans),
    standingSeconds: Math.round(standingS),
    heat: 'why' in heat ? null : shownHeat(heat, heat.assumed),
    electricity: typeof powerKWh === 'number' ? { kWh: round(powerKWh, 4) } : null,
  };
  return {
    spans,
    night,
    draws: draws.map((draw, i) => shownDraw(channel.number, draw, heats[i] ?? null)),
    heat,
    powerKWh,
    heatPowerKWh: 'why' in heat || typeof powerKWh !== 'number' ? 0 : powerKWh * knownShare(heat, standingS),
  };
}

/** Share of the time on in which the heat is known: read at both ends, or none because the load stood. */
function knownShare({ measuredS, ranS }: { measuredS: number; ranS: number }, standingS: number): number {
  const onS = ranS + standingS;
  return onS === 0 ? 0 : Math.min(1, (measuredS + standingS) / onS);
}

/** Share of the run in which both ends of the loops were read; null where nothing ran. */
export function measuredShare(heats: readonly { measuredS: number; ranS: number }[]): number | null {
  const sum = (of: (one: (typeof heats)[number]) => number) => heats.reduce((all, one) => all + of(one), 0);
  const ranS = sum((one) => one.ranS);
  return ranS === 0 ? null : round(Math.min(1, sum((one) => one.measuredS) / ranS), 3);
}

interface Draw {
  run: Extent;
  running: Running;
}

type LoopRead = Pick<NightChannel, 'flow'> & { intake: Series; back: Series };

function loopOf(
  { loop, flow }: NightChannel,
  points: ReadonlyMap<string, Series>,
): LoopRead | { why: Missing } {
  if (loop === null) return { why: 'no-loop' };
  if (flow === null || flow.m3PerS <= 0) return { why: 'no-flow' };
  const [intake, back] = [points.get(loop.intake), points.get(loop.return)];
  return intake === undefined || back === undefined ? { why: 'no-readings' } : { flow, intake, back };
}

function drawHeat({ ran }: Running, loop: LoopRead | { why: Missing }, altitudeM: number): Heat | null {
  if ('why' in loop || loop.flow === null) return null;
  return loopHeat(ran, loop.intake, loop.back, loop.flow, altitudeM);
}

function heatOf(
  heats: readonly (Heat | null)[],
  draws: readonly Draw[],
  loop: LoopRead | { why: Missing },
): ChannelWork['heat'] {
  if ('why' in loop) return loop;
  const sum = heats.reduce<Heat>((all, heat) => (heat === null ? all : heatSum(all, heat)), NO_HEAT);
  const ranS = draws.reduce((all, draw) => all + ranSeconds(draw.running), 0);
  // a figure from less than half of the run would pass for the whole of it
  if (sum.measuredS < ranS / 2) return { why: 'no-readings' };
  return { ...sum, assumed: draws.some((draw) => draw.running.assumed), ranS };
}

const ranSeconds = ({ ran }: Running) => ran.reduce((sum, { from, to }) => sum + (to - from) / 1000, 0);

export function shownHeat(heat: Heat, assumedRunning: boolean): NightHeat {
  return { kWh: round(heat.kWh, 3), sd: round(heat.sd, 3), assumedRunning };
}

function shownDraw(channel: number, { run, running: load }: Draw, heat: Heat | null): DrawHeat {
  const ranS = ranSeconds(load);
  const measured = heat === null ? 0 : ranS === 0 ? 1 : Math.min(1, heat.measuredS / ranS);
  return {
    channel,
    ...run,
    heat: heat === null || measured < 0.5 ? null : shownHeat(heat, load.assumed),
    measured: round(measured, 3),
    standingSeconds: Math.round(load.standingS),
  };
}

/**
 * kWh of heat for 1 kWh of the electricity that was used while it was measured: a loop that was read for half of its run
 * would else look half as good. Null where either is not known or hardly anything ran.
 */
export function heatForPower(
  heat: NightHeat | null,
  electricity: { kWh: number } | null,
): HeatForPower | null {
  if (heat === null || electricity === null || electricity.kWh < LEAST_POWER_KWH) return null;
  return { ratio: round(heat.kWh / electricity.kWh, 2), sd: round(heat.sd / electricity.kWh, 2) };
}

/** Under 1 Wh a ratio is a quotient of roundings. */
export const LEAST_POWER_KWH = 0.001;
