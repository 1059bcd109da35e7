/** Calibrations, steadiness and a sensor's health in words. */
import type { CalibrationKind, Reference, Unusual } from '@/lib/analysis/calibrate';
import type { HealthFinding } from '@/lib/analysis/sensor-health';
import type { Steadiness } from '@/lib/analysis/steadiness';
import { change, decimal, difference } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { duration } from '@/lib/units/time';
import { USUAL } from '@/lib/units/preferences';
import { counted } from './counts';

export const KIND_WORDS: Record<CalibrationKind, string> = {
  typed: 'typed in',
  'one-place': 'one place: offset',
  'two-places': 'two places: offset and gain',
};

export const REFERENCE_WORDS: Record<Reference, string> = {
  ice: 'ice bath',
  boiling: 'boiling water',
  thermometer: 'beside a thermometer',
};

/** How each place is made; what goes wrong is what people forget. */
export const REFERENCE_HOW: Record<Reference, string> = {
  ice: 'Fill a flask with crushed ice, pour in just so much water that it fills the gaps, stir, and wait five minutes. The probe hangs in the middle, not on the wall, and the ice must still reach the bottom. Sealed probes only: keep the joint of the cable dry.',
  boiling:
    'Rolling boil, the probe in the water and off the bottom. What is true is reckoned from the altitude of the house; the weather moves it by some tenths. Only a probe whose maker allows 100 °C.',
  thermometer:
    'A thermometer whose error you know, in the same stirred water as the probe, their tips side by side.',
};

/** What is said while a probe comes to rest. */
export function steadyWords(
  steady: Pick<Steadiness, 'why' | 'readings' | 'seconds' | 'change' | 'sd'>,
  preferences: Preferences,
): string {
  const over = `${counted(steady.readings, 'reading')} over ${duration(steady.seconds)}`;
  switch (steady.why) {
    case null:
      return `It is steady: ${over}.`;
    case 'silent':
      return 'It is silent. Is its node up, and the probe plugged in?';
    case 'few':
      return `Wait: ${over} so far; five over two minutes are wanted.`;
    case 'moving':
      return `It still moves: ${change(steady.change, preferences)} in ${duration(steady.seconds)}. Leave it where it is.`;
    case 'scattered':
      return `It scatters by ${difference(steady.sd, preferences)}: stir, and look at its cable.`;
  }
}

/** Why a correction is asked about. */
export function unusualWords(asked: readonly Unusual[], preferences: Preferences = USUAL): string {
  const told = asked.map((one) =>
    one.what === 'far'
      ? `it moves what is read by ${change(one.kelvin, preferences)}`
      : `its gain would be ${decimal(one.gain, 3)}`,
  );
  return `This is more than a sound probe is wrong by: ${told.join(', and ')}. Rather the bath or the probe is at fault. Look at both; if it is meant so, say that it is.`;
}

/** @example correctionWords({ gain: 1, offset: -0.3 }, USUAL) === '−0.30' */
export function correctionWords({ offset, gain }: { offset: number; gain: number }): string {
  const times = gain === 1 ? '' : `× ${decimal(gain, 4)} `;
  const plus = offset === 0 ? '' : `${offset > 0 ? '+' : ''}${decimal(offset, 2)}`;
  return `${times}${plus}`.trim() || 'none';
}

export function healthWords(finding: HealthFinding, preferences: Preferences): string {
  switch (finding.what) {
    case 'noisy':
      return `It scattered by ${difference(finding.noise, preferences, 2)} last night (most nights ${difference(finding.usual, preferences, 2)}): a loose joint, or a cable beside a motor’s.`;
    case 'drifts':
      return `It moves away from its siblings by ${change(finding.perWeek, preferences)} a week, ± ${difference(finding.give, preferences)}: calibrate it again, or find what has changed about its place.`;
    case 'apart':
      return `It stands ${change(finding.difference, preferences)} from its siblings: hold the probes together in one cup of water before you believe either.`;
    case 'gaps':
      return `It fell silent in ${counted(finding.nights, 'night')}: look at its cable, and at its node’s link.`;
  }
}
