/**
 * Between SI and the text in a field. What was typed stays as it is while it is typed; only what is sent is converted.
 */
import {
  celsius,
  cfm,
  cubicMetresPerSecondFromCfm,
  fahrenheit,
  fahrenheitDifference,
  kelvinDifference,
} from './conversion';
import { degrees } from './format';
import type { Preferences } from './preferences';
import { numberTyped, secondsTyped } from './typed';

/** `minutes`, `seconds` and `hours` are all kept in seconds; they differ in what a bare number means. */
export type Quantity =
  'number' | 'whole' | 'temperature' | 'difference' | 'seconds' | 'minutes' | 'hours' | 'litres-per-second';

export function fieldUnit(quantity: Quantity, preferences: Preferences): string | undefined {
  switch (quantity) {
    case 'temperature':
    case 'difference':
      return degrees(preferences);
    case 'seconds':
      return 's';
    case 'minutes':
      return 'min';
    case 'hours':
      return 'h';
    case 'litres-per-second':
      return preferences.flow;
    case 'number':
    case 'whole':
      return undefined;
  }
}

/** At most `places` decimals, none of them an idle zero; a plain hyphen, since this text is typed on. */
function trimmed(value: number, places: number): string {
  return String(Number(value.toFixed(places)));
}

/**
 * What stands in the field for a value; empty for null.
 * @example fieldText(4, 'temperature', {…, temperature: 'F'}) === '39.2', fieldText(90, 'minutes', …) === '90 s'
 */
export function fieldText(
  value: number | null | undefined,
  quantity: Quantity,
  preferences: Preferences,
): string {
  if (value === null || value === undefined) return '';
  const isF = preferences.temperature === 'F';
  switch (quantity) {
    case 'temperature':
      return trimmed(isF ? fahrenheit(value) : value, 2);
    case 'difference':
      return trimmed(isF ? fahrenheitDifference(value) : value, 2);
    case 'litres-per-second':
      return trimmed(preferences.flow === 'cfm' ? cfm(value / 1000) : value, 2);
    case 'minutes':
      return value % 60 === 0 ? String(value / 60) : `${value} s`;
    case 'hours':
      return value % 3600 === 0
        ? String(value / 3600)
        : value % 60 === 0
          ? `${value / 60} min`
          : `${value} s`;
    default:
      return trimmed(value, 6);
  }
}

/**
 * Reads a field into SI; null where it cannot be read. Durations come out in whole seconds.
 * @example fieldValue('39,2', 'temperature', {…, temperature: 'F'}) === 4
 */
export function fieldValue(text: string, quantity: Quantity, preferences: Preferences): number | null {
  if (quantity === 'minutes') return secondsTyped(text);
  const bare = numberTyped(text);
  if (quantity === 'seconds' || quantity === 'hours') {
    if (bare === null) return secondsTyped(text);
    return Math.round(bare * (quantity === 'hours' ? 3600 : 1));
  }
  if (bare === null) return null;
  const isF = preferences.temperature === 'F';
  switch (quantity) {
    case 'temperature':
      return clean(isF ? celsius(bare) : bare);
    case 'difference':
      return clean(isF ? kelvinDifference(bare) : bare);
    case 'litres-per-second':
      return clean(preferences.flow === 'cfm' ? cubicMetresPerSecondFromCfm(bare) * 1000 : bare);
    case 'whole':
      return Number.isInteger(bare) ? bare : null;
    default:
      return bare;
  }
}

/** 39.2 °F is 4 °C, not 4.000000000000001. */
function clean(value: number): number {
  return Math.round(value * 1e6) / 1e6;
}

/** What to say where a field could not be read. */
export function unreadable(quantity: Quantity, preferences: Preferences): string {
  switch (quantity) {
    case 'minutes':
      return 'Give minutes, such as 40, or 1 h 30, or 90 s.';
    case 'hours':
      return 'Give hours, such as 8, or 7 h 30.';
    case 'seconds':
      return 'Give seconds, such as 90, or 2 min.';
    case 'whole':
      return 'Give a whole number, such as 4.';
    default: {
      const unit = fieldUnit(quantity, preferences);
      return unit === undefined ? 'Give a number, such as 4.5.' : `Give a number in ${unit}, such as 4.5.`;
    }
  }
}
