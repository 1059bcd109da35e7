/** Settings as they were made: unlike a measured figure, none of them is rounded. */
import { difference, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';

const space = '\u00a0';

/**
 * Whole seconds: seconds where they fill no minute, minutes under 2 h, then hours, then days.
 * @example exactly(1500) === '25 min', exactly(90) === '90 s', exactly(22200) === '6 h 10 min'
 */
export function exactly(seconds: number): string {
  const rest = seconds % 60;
  if (seconds < 120 && (rest !== 0 || seconds === 0)) return `${seconds}${space}s`;
  const minutes = Math.floor(seconds / 60);
  const tail = rest === 0 ? '' : ` ${rest}${space}s`;
  if (minutes < 120) return `${minutes}${space}min${tail}`;
  if (seconds % 86_400 === 0 && seconds >= 3 * 86_400) return `${seconds / 86_400}${space}days`;
  const over = minutes % 60;
  return `${Math.floor(minutes / 60)}${space}h${over === 0 ? '' : ` ${over}${space}min`}${tail}`;
}

/** Levels are set in whole degrees mostly: "43 °C", but "43.5 °C" where it is so. */
export function level(celsius: number, preferences: Preferences): string {
  return withoutZero(temperature(celsius, preferences));
}

/** @example amount(-0.5, preferences) === '−0.5 °C', amount(3, preferences) === '3 °C' */
export function amount(kelvin: number, preferences: Preferences): string {
  return withoutZero(difference(kelvin, preferences));
}

/** @example withoutZero('43.0 °C') === '43 °C' */
export function withoutZero(text: string): string {
  return text.replace(/\.0(?=\u00a0)/, '');
}
