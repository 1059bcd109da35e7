/**
 * Calibration of a point beside a reference: corrected = raw × gain + offset. One place gives the offset and leaves the
 * gain, two give both. With no more places than unknowns the line goes through them, so what is left is not read off the
 * fit but is what the places themselves are uncertain by: the reference's own deviation and that of the mean of the steady
 * readings, combined as the root of the sum of squares (JCGM 100:2008, 5.1.2).
 */

export const CALIBRATION_KINDS = ['typed', 'one-place', 'two-places'] as const;
export type CalibrationKind = (typeof CALIBRATION_KINDS)[number];

export const REFERENCES = ['ice', 'boiling', 'thermometer'] as const;
export type Reference = (typeof REFERENCES)[number];

export interface CalibrationPlace {
  at: Reference;
  /** °C that are true there. */
  reference: number;
  /** K, deviation of the reference itself. */
  referenceSd: number;
  /** °C as the node sent it, mean of the steady readings. */
  raw: number;
  /** K, of one reading. */
  rawSd: number;
  readings: number;
}

export interface Correction {
  offset: number;
  gain: number;
}

/** K between two places, or a small error of either turns the line. */
export const LEAST_SPAN_K = 10;
/** Over these a correction is asked about: a probe of any class is nearer to the truth than that. */
const UNUSUAL_K = 3;
const [LEAST_GAIN, MOST_GAIN] = [0.9, 1.1];

/**
 * The correction through one place or two.
 * @param gainBefore stays where there is one place
 * @throws RangeError for two places closer than LEAST_SPAN_K, by their references or by what was read
 */
export function correctionOf(places: readonly CalibrationPlace[], gainBefore: number): Correction {
  const [first, second] = places;
  if (first === undefined) throw new RangeError('a calibration wants one place at least');
  if (second === undefined) return { gain: gainBefore, offset: first.reference - first.raw * gainBefore };
  const read = second.raw - first.raw;
  const isNear = Math.min(Math.abs(second.reference - first.reference), Math.abs(read)) < LEAST_SPAN_K;
  if (isNear) throw new RangeError(`two places want ${LEAST_SPAN_K} K between them`);
  const gain = (second.reference - first.reference) / read;
  return { gain, offset: first.reference - first.raw * gain };
}

/** K that are left at the worse of the places. */
export function residualOf(places: readonly CalibrationPlace[], gain: number): number {
  return Math.max(
    ...places.map((one) => Math.hypot(one.referenceSd, (one.rawSd * gain) / Math.sqrt(one.readings))),
  );
}

export type Unusual = { what: 'far'; kelvin: number } | { what: 'gain'; gain: number };

/** What of a correction is so unusual that it is asked about: rather the reference, or the probe, is wrong. */
export function unusual({ offset, gain }: Correction, places: readonly CalibrationPlace[]): Unusual[] {
  const moves = places.map((one) => one.raw * gain + offset - one.raw);
  const far = moves.toSorted((a, b) => Math.abs(b) - Math.abs(a))[0];
  return [
    ...(far !== undefined && Math.abs(far) > UNUSUAL_K ? [{ what: 'far' as const, kelvin: far }] : []),
    ...(gain < LEAST_GAIN || gain > MOST_GAIN ? [{ what: 'gain' as const, gain }] : []),
  ];
}
