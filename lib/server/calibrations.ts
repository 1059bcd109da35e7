import 'server-only';
import type { Holding } from '@/db/client';
import { addCalibration, rawReadings } from '@/db/queries/calibration';
import { Refusal } from '@/db/queries/refusal';
import {
  correctionOf,
  LEAST_SPAN_K,
  residualOf,
  unusual,
  type CalibrationPlace,
} from '@/lib/analysis/calibrate';
import { referenceOf } from '@/lib/analysis/reference-place';
import { steadiness } from '@/lib/analysis/steadiness';
import type { Calibration, CalibrationCreate, RawReading } from '@/lib/schema/calibration';
import type { House, Point } from '@/lib/schema/yard-view';
import { unusualWords } from '@/lib/wording/calibration';
import { isoIn } from './wire';

const WINDOW_S = 300;
/** Reports of a slow node in which it still counts as lying still. */
const REPORTS = 6;

/** What a point reads, uncorrected, and whether it has come to rest. */
export async function rawReading(
  holding: Holding,
  house: House,
  point: Point,
  reportEveryS: number,
  now: Date,
): Promise<RawReading> {
  const windowS = Math.max(WINDOW_S, REPORTS * reportEveryS);
  // a node's clock may be a little ahead of ours
  const to = now.getTime() + 60_000;
  const readings = await rawReadings(holding, point.id, now.getTime() - windowS * 1000, to);
  const last = readings.at(-1);
  return {
    at: last === undefined ? null : isoIn(house.zone, last.at),
    raw: last?.value ?? null,
    ...steadiness(readings, now.getTime(), point.staleAfter ?? 3 * reportEveryS),
  };
}

/**
 * A calibration out of what was read at one place or two.
 * @throws Refusal at `places` for a point that is no temperature, or two places too close; without a path where the
 *   correction is unusual and nobody said that it is meant so
 */
export async function calibratePoint(
  holding: Holding,
  house: House,
  point: Point,
  given: CalibrationCreate,
  act: { by: string; now: Date },
): Promise<Calibration> {
  if (point.unit !== 'Cel' || point.derived !== null)
    throw new Refusal(
      'places',
      'Ice and boiling water are for a measured temperature. Type the offset and gain of this point in its form.',
    );
  const places = given.places.map((one): CalibrationPlace => {
    const { at, raw, rawSd, readings } = one;
    const known =
      at === 'thermometer'
        ? { reference: one.reference ?? 0, referenceSd: one.referenceSd ?? 0 }
        : referenceOf(at, house.altitude);
    return { at, raw, rawSd, readings, ...known };
  });
  const correction = through(places, point.gain);
  const asked = unusual(correction, places);
  if (asked.length > 0 && !given.acceptUnusual) throw new Refusal(null, unusualWords(asked));
  if (Math.abs(correction.offset) > 50 || correction.gain < 0.1 || correction.gain > 10)
    throw new Refusal('places', 'No probe is as wrong as that. Look at the places and what was read there.');
  return addCalibration(
    holding,
    house.id,
    point.id,
    {
      ...correction,
      kind: places.length === 1 ? 'one-place' : 'two-places',
      places,
      residual: residualOf(places, correction.gain),
      note: given.note,
    },
    act,
  );
}

function through(places: CalibrationPlace[], gain: number) {
  try {
    return correctionOf(places, gain);
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    throw new Refusal(
      'places',
      `Two places want ${LEAST_SPAN_K} °C between them, or a small error turns the line.`,
    );
  }
}
