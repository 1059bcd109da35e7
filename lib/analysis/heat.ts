/**
 * Heat that a loop moved into the house: Q = ρ V̇ c_p (T_return − T_intake), integrated over the time in which its
 * channel ran. Negative where the loop cooled the house, and left so.
 *
 * Volume flow is meant where the fan is, at the intake, so the air's mass is taken at the intake's temperature and at the
 * pressure of the house's altitude. The air counts as dry: at 10 °C and saturated the difference is under 1 %.
 *
 * Uncertainty. Neither a wrong flow nor a sensor's offset averages out over a night: both are the same all the time. So
 * the flow's share is |Q| · sd(V̇)/V̇, the sensors' is (ρ V̇ c_p) · sd(ΔT) · time, and the two, being independent of each
 * other, add in squares. sd(ΔT) = √(sd² + sd²) supposes that the two sensors' offsets are independent; sensors of one
 * batch in one bath share part of it, and the true figure is then smaller. For the same reason sums over nights, and over
 * loops, add these deviations as they are, not in squares.
 */
import { heatCapacityFlow, pressureAtAltitude } from '@/lib/physics/air';
import { type Extent, liner, type Series } from './series';

/** K, one sensor, where no calibration says better: a digital probe within ±0.5 K taken as evenly spread. */
export const SENSOR_SD_K = 0.3;

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
}

/**
 * Heat over the extents in which the fan ran.
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
  for (const [from, to] of pieces(runs, intake, back)) {
    // both points silent together: the lines that meet at its ends must not bridge it
    if (to - from > longestMs) continue;
    const start = difference(intakeAt, backAt, from);
    const end = difference(intakeAt, backAt, to);
    if (start === null || end === null) continue;
    const seconds = (to - from) / 1000;
    const wattPerK = heatCapacityFlow(flow.m3PerS, (start.intake + end.intake) / 2, pressurePa);
    joule += (wattPerK * seconds * (start.gain + end.gain)) / 2;
    perKelvinJ += wattPerK * seconds;
    measuredMs += to - from;
  }
  const ofFlow = flow.sdM3PerS === null ? (FLOW_SD[flow.from] ?? 0.4) : flow.sdM3PerS / flow.m3PerS;
  const sdJ = Math.hypot(joule * ofFlow, perKelvinJ * Math.SQRT2 * SENSOR_SD_K);
  return { kWh: joule / 3_600_000, sd: sdJ / 3_600_000, measuredS: measuredMs / 1000 };
}

function difference(
  intakeAt: (at: number) => number | null,
  backAt: (at: number) => number | null,
  at: number,
): { intake: number; gain: number } | null {
  const intake = intakeAt(at);
  const back = backAt(at);
  return intake === null || back === null ? null : { intake, gain: back - intake };
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
