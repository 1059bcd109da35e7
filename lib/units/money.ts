/**
 * Money. Amounts are whole millionths of the currency's unit ("micros"), so that sums of entered prices are exact and a
 * price a kWh may have more places than a coin; they are rounded where they are shown, and nowhere before.
 */
import { decimal, UNKNOWN } from './format';

export const MICROS = 1_000_000;
const space = '\u00a0';

/**
 * An entered amount, read as text so that no binary fraction comes between.
 * @returns whole micros, or null for what is no amount from 0 to under 1 000 000 000 with six places at most
 * @example microsOf('0.2875') === 287500
 */
export function microsOf(text: string): number | null {
  const found = /^(\d{1,9})(?:[.,](\d{1,6}))?$/.exec(text.trim());
  if (found === null) return null;
  return Number(found[1]) * MICROS + Number((found[2] ?? '').padEnd(6, '0'));
}

/** The amount as it is entered again. @example microsText(287500) === '0.2875' */
export function microsText(micros: number): string {
  const part = String(Math.abs(micros) % MICROS)
    .padStart(6, '0')
    .replace(/0+$/, '');
  return `${Math.floor(micros / MICROS)}${part === '' ? '' : `.${part}`}`;
}

/** Places of a currency's smallest coin, by ISO 4217. @example minorPlaces('JPY') === 0 */
export function minorPlaces(currency: string): number {
  return (
    new Intl.NumberFormat('en', { style: 'currency', currency }).resolvedOptions().maximumFractionDigits ?? 2
  );
}

/** @example money(1_234_500, 'EUR') === '1.23 EUR' */
export function money(micros: number | null, currency: string, sd?: number): string {
  if (micros === null) return UNKNOWN;
  const places = minorPlaces(currency);
  const give = sd === undefined ? '' : `${space}±${space}${decimal(sd / MICROS, places)}`;
  return `${decimal(micros / MICROS, places)}${give}${space}${currency}`;
}

/** Without its currency, for a table whose head has it. */
export function moneyFigure(micros: number, currency: string): string {
  return decimal(micros / MICROS, minorPlaces(currency));
}

/** A price of a kWh as a figure, for a table whose head has the unit. */
export function priceFigure(micros: number, currency: string): string {
  return decimal(micros / MICROS, minorPlaces(currency) + 1);
}

/** A price of a kWh, to a tenth of the smallest coin. @example perKWh(148_000, 'EUR') === '0.148 EUR/kWh' */
export function perKWh(micros: number | null, currency: string, sd?: number): string {
  if (micros === null) return UNKNOWN;
  const places = minorPlaces(currency) + 1;
  const give = sd === undefined ? '' : `${space}±${space}${decimal(sd / MICROS, places)}`;
  return `${decimal(micros / MICROS, places)}${give}${space}${currency}/kWh`;
}
