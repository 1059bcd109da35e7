/**
 * Heat that a loop moved into the house: Q = ρ V̇ c_p (T_return − T_intake), integrated over the time in which its
 * channel ran. Negative where the loop cooled the house, and left so.
 *
 * Volume flow is meant where the fan is, at the intake, so the air's mass is taken at the intake's temperature and at the
 * pressure of the house's altitude. The air counts as dry: at 10 °C and saturated the difference is under 1 %.
 *
 * Warm-up counts as it is read. A probe follows the air with a delay, so the air is ahead of what is read by delay × (rate at
 * which the reading rises), and over a draw that is missed: (ρ V̇ c_p) · delay · (rise of the reading from its beginning to
 * its end). Nobody knows a probe's delay in its place, so the figure stays what anybody reckons from the readings, and what
 * may be missed is in the deviation. The intake's air is the same before a draw as in it, and needs none of this.
 *
 * Uncertainty. None of the three things that may be wrong averages out over a night, since each is wrong all the time: the
 * flow, |Q| · sd(V̇)/V̇; the two probes, (ρ V̇ c_p) · sd(ΔT) · time, sd(ΔT) = √(sd² + sd²) of their calibrations or classes
 * (probes of one batch share part of their error: the true figure is then smaller); and the delay, by what it hides.
 * They are independent of each other and add in squares; over draws, loops and nights the deviations add as they are.
 */
import { heatCapacityFlow, pressureAtAltitude } from '@/lib/physics/air';
import { type Extent, liner, type Series } from './series';

/**
 * s until a probe shows 63 % of a step of the air that moves past it: makers' tables of sheathed thermometers give 55 to
 * 155 s for sheaths of 6 to 8 mm in slow air. The slow end, since the figure itself makes nothing good of it.
 */
const PROBE_DELAY_S = 155;

const J_PER_KWH = 3_600_000;

/** Relative deviation of a flow whose own is not given, by where it comes from. Ours: a rated flow is a free-air one. */
const FLOW_SD: Record<string, number> = { measured: 0.1, curve: 0.15, rated: 0.3, guessed: 0.4 };

export interface Flow {
  m3PerS: number;
  /** m³/s; null: by where the flow comes from. */
  sdM3PerS: number | null;
  from: string;
}

export interface Heat {
  kWh: number;
  sd: number;
  /** Seconds of the run in which both temperatures were good. */
  measuredS: number;
  /** kWh that the deviation is made of; the flow's and the delay's have the sign of what they belong to. */
  parts: HeatParts;
}

export interface HeatParts {
  flow: number;
  probes: number;
  delay: number;
}

export const NO_HEAT: Heat = { kWh: 0, sd: 0, measuredS: 0, parts: { flow: 0, probes: 0, delay: 0 } };

/** Heat of two draws, loops or nights together: a wrong flow and wrong probes are as wrong in the one as in the other. */
export function heatSum(one: Heat, other: Heat): Heat {
  const parts = {
    flow: one.parts.flow + other.parts.flow,
    probes: one.parts.probes + other.parts.probes,
    delay: one.parts.delay + other.parts.delay,
  };
  return {
    kWh: one.kWh + other.kWh,
    sd: deviation(parts),
    measuredS: one.measuredS + other.measuredS,
    parts,
  };
}

function deviation({ flow, probes, delay }: HeatParts): number {
  return Math.hypot(flow, probes, delay);
}

/**
 * Heat over the extents of one draw in which the fan ran.
 * @returns kWh with its standard deviation, and how much of the run had readings; zeros where the fan did not run
 * @example 0.042475 m³/s at sea level and 20 °C, 5.556 K apart: 0.286 kWh an hour, a quarter less at 2400 m
 */
export function loopHeat(
  runs: readonly Extent[],
  intake: Series,
  back: Series,
  flow: Flow,
  altitudeM: number,
): Heat {
  const pressurePa = pressureAtAltitude(altitudeM);
  const longestMs = Math.min(intake.holdS, back.holdS) * 1000;
  const intakeAt = liner(intake);
  const backAt = liner(back);
  let joule = 0;
  let perKelvinJ = 0;
  let measuredMs = 0;
  let behindJ = 0;
  for (const [from, to] of pieces(runs, intake, back)) {
    // both points silent together: the lines that meet at its ends must not bridge it
    if (to - from > longestMs) continue;
    const start = difference(intakeAt, backAt, from);
    const end = difference(intakeAt, backAt, to);
    if (start === null || end === null) continue;
    const seconds = (to - from) / 1000;
    const wattPerK = heatCapacityFlow(flow.m3PerS, (start.intake + end.intake) / 2, pressurePa);
    joule += (wattPerK * seconds * (start.gain + end.gain)) / 2;
    behindJ += wattPerK * PROBE_DELAY_S * (end.back - start.back);
    perKelvinJ += wattPerK * seconds;
    measuredMs += to - from;
  }
  const ofFlow = flow.sdM3PerS === null ? (FLOW_SD[flow.from] ?? 0.4) : flow.sdM3PerS / flow.m3PerS;
  const parts = {
    flow: (joule * ofFlow) / J_PER_KWH,
    probes: (perKelvinJ * Math.hypot(intake.sd, back.sd)) / J_PER_KWH,
    delay: behindJ / J_PER_KWH,
  };
  return { kWh: joule / J_PER_KWH, sd: deviation(parts), measuredS: measuredMs / 1000, parts };
}

function difference(
  intakeAt: (at: number) => number | null,
  backAt: (at: number) => number | null,
  at: number,
): { intake: number; back: number; gain: number } | null {
  const intake = intakeAt(at);
  const back = backAt(at);
  return intake === null || back === null ? null : { intake, back, gain: back - intake };
}

/** The runs cut at every reading of either point, ascending: in each piece both lines are straight. */
function pieces(runs: readonly Extent[], intake: Series, back: Series): [number, number][] {
  const times = [...new Set([...intake.good, ...back.good].map((reading) => reading.at))].sort(
    (a, b) => a - b,
  );
  const cut: [number, number][] = [];
  let next = 0;
  for (const run of runs) {
    let from = run.from;
    while (next < times.length && (times[next] ?? Infinity) <= from) next += 1;
    while (next < times.length && (times[next] ?? Infinity) < run.to) {
      const at = times[next] ?? run.to;
      cut.push([from, at]);
      from = at;
      next += 1;
    }
    cut.push([from, run.to]);
  }
  return cut;
}
