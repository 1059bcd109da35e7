/**
 * How far a sensor may be wrong for good. What a calibration says goes first; else the tolerance of the class that was
 * entered for the sensor, taken as evenly spread over its width, so that the deviation is the tolerance ÷ √3.
 *
 * Tolerances: platinum, IEC 60751 (A 0.15 + 0.002 |t|, B 0.30 + 0.005 |t|); thermocouples of type K, IEC 60584-1 (class 1:
 * 1.5 K); digital one-wire probes ± 0.5 K from −10 to 85 °C, thermistors of 1 % ± 0.3 K: makers' usual statements.
 */

/** K of a sensor of which nothing is said: as a digital probe. */
const UNKNOWN_TOLERANCE_K = 0.5;
/** K, of a probe that was put beside a reference in a stirred bath: what is left is the reference's and the bath's own. */
export const CALIBRATED_SD_K = 0.1;

const CLASSES: [is: RegExp, toleranceK: (absC: number) => number][] = [
  [/pt ?-?100.*\bb\b|\bclass b\b/, (absC) => 0.3 + 0.005 * absC],
  [/pt ?-?100|pt ?-?1000/, (absC) => 0.15 + 0.002 * absC],
  [/thermocouple|type k/, () => 1.5],
  [/ntc|thermistor/, () => 0.3],
];

/**
 * Deviation of a temperature sensor, K.
 * @param sensor as entered, in any words
 * @param atC where it is used, °C
 * @example classSd('one-wire', 10) is 0.289; classSd('Pt100 class B', 60) is 0.6 ÷ √3
 */
export function classSd(sensor: string | null, atC: number): number {
  const said = (sensor ?? '').toLowerCase();
  const tolerance = CLASSES.find(([is]) => is.test(said))?.[1](Math.abs(atC)) ?? UNKNOWN_TOLERANCE_K;
  return tolerance / Math.sqrt(3);
}
