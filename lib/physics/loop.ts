/**
 * A closed air loop: a fan blows air of the house into a pipe through a medium, and it comes back warmer
 * (or cooler, if the medium is colder). Sensible heat only: good while the pipe is warmer than the dew point of the
 * house's air, as a heap's and in winter a ground tube's is.
 *
 * The fan is a constant-volume machine, so its rated flow is at the density of the air that it takes in.
 * Round the loop the mass is the same, the volume is not (some 10 % between 7 and 40 °C).
 */
import { heatCapacityFlow } from './air';

export interface Loop {
  /** at the fan, m³/s */
  flowM3PerS: number;
  /** from the medium to the air in the pipe, bed included, W/K: the film alone would allow four times as much */
  pipeWPerK: number;
  /** electricity of the fan, W; its motor sits in the air, so all of it becomes heat there */
  fanW: number;
  pressurePa: number;
}

export interface LoopFlow {
  /** ṁ·cp, W/K */
  capacityWPerK: number;
  /** out of the medium into the air, W; negative where the loop warms the medium */
  fromMediumW: number;
  /** into the house, W: that and the fan's heat */
  intoHouseW: number;
  returnC: number;
}

/**
 * Effectiveness of a pipe in a medium of one temperature: 1 − exp(−NTU) (ε-NTU, capacity ratio 0).
 * @example effectiveness(1) is 0.63212
 */
export function effectiveness(ntu: number): number {
  return -Math.expm1(-ntu);
}

/** Transfer units that an effectiveness stands for. @example ntuOf(0.1538) is 0.167 */
export function ntuOf(effectivenessShare: number): number {
  return -Math.log1p(-effectivenessShare);
}

/** What a running loop moves, with the air at `intakeC` and the medium beside the pipe at `mediumC`. */
export function loopFlow(loop: Loop, intakeC: number, mediumC: number): LoopFlow {
  const capacityWPerK = heatCapacityFlow(loop.flowM3PerS, intakeC, loop.pressurePa);
  const pipeInC = intakeC + loop.fanW / capacityWPerK;
  const fromMediumW = capacityWPerK * effectiveness(loop.pipeWPerK / capacityWPerK) * (mediumC - pipeInC);
  return {
    capacityWPerK,
    fromMediumW,
    intoHouseW: fromMediumW + loop.fanW,
    returnC: pipeInC + fromMediumW / capacityWPerK,
  };
}
