/**
 * Figures as they are read: unit always beside, true minus sign, one rounding for one kind of thing wherever it stands,
 * so that a sentence, a table and a chart say the same. Null is "not known yet", never a dash that could be a minus.
 */
import { cfm, fahrenheit, fahrenheitDifference, feet } from './conversion';
import type { Preferences } from './preferences';

export const UNKNOWN = 'not known yet';
/** No-break: a figure and its unit stay on one line. A narrow one would be finer, but the mono face lacks it. */
const space = '\u00a0';

/**
 * Rounded to `places`, halves away from zero as people round, with a true minus; never "−0.0".
 * @example decimal(-12.25, 1) === '−12.3'
 */
export function decimal(value: number, places: number): string {
  const factor = 10 ** places;
  const rounded = Math.round(Math.abs(value) * factor + 1e-9) / factor;
  const text = rounded.toFixed(places);
  return value < 0 && rounded !== 0 ? `−${text}` : text;
}

/** The degree sign with its letter: what stands in a field or a table head. */
export function degrees(preferences: Preferences): '°C' | '°F' {
  return preferences.temperature === 'F' ? '°F' : '°C';
}

/** A temperature without its unit, for a table whose head has it and for a chart's axis. */
export function temperatureFigure(celsius: number, preferences: Preferences, places = 1): string {
  return decimal(preferences.temperature === 'F' ? fahrenheit(celsius) : celsius, places);
}

/** @example temperature(-12.34, USUAL) === '−12.3 °C' */
export function temperature(celsius: number | null, preferences: Preferences, places = 1): string {
  if (celsius === null) return UNKNOWN;
  return `${temperatureFigure(celsius, preferences, places)}${space}${degrees(preferences)}`;
}

/** A difference of temperatures in the reader's degrees. @example difference(3, USUAL) === '3.0 °C' */
export function difference(kelvin: number | null, preferences: Preferences, places = 1): string {
  if (kelvin === null) return UNKNOWN;
  const shown = preferences.temperature === 'F' ? fahrenheitDifference(kelvin) : kelvin;
  return `${decimal(shown, places)}${space}${degrees(preferences)}`;
}

/** @example warmer(3, USUAL) === '3.0 °C warmer' */
export function warmer(kelvin: number | null, preferences: Preferences): string {
  if (kelvin === null) return UNKNOWN;
  const amount = difference(Math.abs(kelvin), preferences);
  if (Number.parseFloat(amount) === 0) return 'just as warm';
  return `${amount} ${kelvin < 0 ? 'colder' : 'warmer'}`;
}

/** A difference with its sign, for a table. @example change(0.2, USUAL) === '+0.2 °C' */
export function change(kelvin: number | null, preferences: Preferences): string {
  if (kelvin === null) return UNKNOWN;
  const text = difference(kelvin, preferences);
  return kelvin > 0 && Number.parseFloat(text) !== 0 ? `+${text}` : text;
}

/** Whole watts under 10 kW. @example power(714.3) === '714 W' */
export function power(watts: number | null): string {
  if (watts === null) return UNKNOWN;
  return Math.abs(watts) < 10_000 ? `${decimal(watts, 0)}${space}W` : `${decimal(watts / 1000, 1)}${space}kW`;
}

/**
 * Heat takes one place, a fan's electricity three. `sd` only where the figure is an estimate.
 * @example energy(2.71, 1, 0.4) === '2.7 ± 0.4 kWh'
 */
export function energy(kWh: number | null, places = 1, sd?: number | null): string {
  if (kWh === null) return UNKNOWN;
  const give = sd === undefined || sd === null ? '' : `${space}±${space}${decimal(sd, places)}`;
  return `${decimal(kWh, places)}${give}${space}kWh`;
}

/** @example share(0.308) === '31 %' */
export function share(part: number | null, places = 0): string {
  return part === null ? UNKNOWN : `${decimal(part * 100, places)}${space}%`;
}

export function humidity(percent: number | null): string {
  return percent === null ? UNKNOWN : `${decimal(percent, 0)}${space}%${space}RH`;
}

/** Air flow, from m³/s. */
export function flow(cubicMetresASecond: number | null, preferences: Preferences): string {
  if (cubicMetresASecond === null) return UNKNOWN;
  return preferences.flow === 'cfm'
    ? `${decimal(cfm(cubicMetresASecond), 0)}${space}cfm`
    : `${decimal(cubicMetresASecond * 1000, 1)}${space}L/s`;
}

/** Of ground above the sea: nobody knows it to the centimetre. */
export function altitude(metresHigh: number, preferences: Preferences): string {
  return preferences.length === 'ft'
    ? `${decimal(feet(metresHigh), 0)}${space}ft`
    : `${decimal(metresHigh, 0)}${space}m`;
}

/** A value of a point in the unit it is kept in (SenML's name of it). A ratio, `/`, reads in per cent. */
export function pointValue(value: number | null, unit: string, preferences: Preferences): string {
  if (value === null) return UNKNOWN;
  switch (unit) {
    case 'Cel':
      return temperature(value, preferences);
    case 'K':
      return difference(value, preferences);
    case '%RH':
      return humidity(value);
    case '/':
    case '%':
      return share(value);
    case 'W':
      return power(value);
    case 'm3/s':
      return flow(value, preferences);
    case 'W/m2':
      return `${decimal(value, 0)}${space}W/m²`;
    case 'Wh':
    case 'ppm':
    case 'Pa':
      return `${decimal(value, 0)}${space}${unit}`;
    default:
      return `${decimal(value, 2)}${space}${unit}`;
  }
}

/** A count with its noun, in groups of three. @example count(2419162, 'reading') === '2 419 162 readings' */
export function count(many: number, one: string, more = `${one}s`): string {
  return `${grouped(many)}${space}${many === 1 ? one : more}`;
}

/** Whole numbers of five digits and more in groups of three, as ISO 80000-1 has them. */
export function grouped(many: number): string {
  const digits = String(many);
  return digits.length < 5 ? digits : digits.replaceAll(/\B(?=(\d{3})+$)/g, space);
}
