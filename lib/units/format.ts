/**
 * Figures as people read them: their unit, a true minus sign, the decimals that mean something. SI comes in; only the
 * text carries the reader's unit.
 */
import { fahrenheit, fahrenheitDifference } from './conversion';

/** What a reader prefers; everything inside stays SI and 24 h. */
export interface Reader {
  temperature: 'C' | 'F';
  clock: '24' | '12';
}

/** Narrow no-break space would be finer typography, but it is missing in the mono face; a no-break space is in all three. */
const space = '\u00a0';

/**
 * A number with a true minus sign; `least` decimals are always shown, more up to `most` only where they are not zero.
 * @example figure(-12.25, 1) === '−12.3' @example figure(43, 0, 1) === '43'
 */
export function figure(value: number, least: number, most = least): string {
  const factor = 10 ** most;
  // halves away from zero, as people round, and no "−0.0"
  const rounded = (Math.sign(value) * Math.round(Math.abs(value) * factor + 1e-9)) / factor;
  let text = Math.abs(rounded).toFixed(most);
  while (most > least && text.endsWith('0') && text.includes('.')) {
    text = text.slice(0, -1);
    most -= 1;
  }
  if (text.endsWith('.')) text = text.slice(0, -1);
  return rounded < 0 ? `−${text}` : text;
}

export function temperatureUnit(reader: Reader): string {
  return reader.temperature === 'F' ? '°F' : '°C';
}

/** °C as the reader's number, without the unit. */
export function temperatureFigure(celsius: number, reader: Reader, least = 1, most = least): string {
  return figure(reader.temperature === 'F' ? fahrenheit(celsius) : celsius, least, most);
}

/** @example temperature(4, {temperature: 'C', clock: '24'}) === '4.0 °C' */
export function temperature(celsius: number, reader: Reader, least = 1, most = least): string {
  return `${temperatureFigure(celsius, reader, least, most)}${space}${temperatureUnit(reader)}`;
}

/** A difference in K, as degrees of the reader. @example difference(-0.5, f) === '−0.9 °F' */
export function difference(kelvin: number, reader: Reader, least = 1, most = least): string {
  const value = reader.temperature === 'F' ? fahrenheitDifference(kelvin) : kelvin;
  return `${figure(value, least, most)}${space}${temperatureUnit(reader)}`;
}

/**
 * Seconds as people say them: seconds under 2 min where they fill no minute, minutes under 2 h, then hours, then days.
 * @example duration(1500) === '25 min' @example duration(22200) === '6 h 10 min'
 */
export function duration(seconds: number): string {
  const whole = Math.round(seconds);
  if (whole === 0 || (whole < 120 && whole % 60 !== 0)) return `${whole}${space}s`;
  if (whole < 7200) {
    const minutes = `${Math.floor(whole / 60)}${space}min`;
    return whole % 60 === 0 ? minutes : `${minutes} ${whole % 60}${space}s`;
  }
  const minutes = Math.round(whole / 60);
  if (minutes >= 3 * 1440 && minutes % 1440 === 0) return `${minutes / 1440}${space}days`;
  const hours = `${Math.floor(minutes / 60)}${space}h`;
  return minutes % 60 === 0 ? hours : `${hours} ${minutes % 60}${space}min`;
}

/** `HH:MM` by the reader's clock. @example clockTime('18:05', {…, clock: '12'}) === '6:05 pm' */
export function clockTime(time: string, reader: Reader): string {
  if (reader.clock === '24') return time;
  const hour = Number(time.slice(0, 2));
  return `${hour % 12 === 0 ? 12 : hour % 12}:${time.slice(3, 5)}${space}${hour < 12 ? 'am' : 'pm'}`;
}

/**
 * A reading in its point's unit: degrees by the reader, ratios in per cent, others as they are.
 * @example reading(0.84, '/', reader) === '84 %'
 */
export function reading(value: number, unit: string, reader: Reader): string {
  switch (unit) {
    case 'Cel':
      return temperature(value, reader);
    case 'K':
      return difference(value, reader);
    case '%RH':
      return `${figure(value, 0)}${space}%${space}RH`;
    case '/':
    case '%':
      return `${figure(value * 100, 0)}${space}%`;
    case 'W/m2':
      return `${figure(value, 0)}${space}W/m²`;
    case 'm3/s':
      return `${figure(value * 1000, 1)}${space}L/s`;
    case 'ppm':
    case 'Pa':
    case 'W':
    case 'Wh':
      return `${figure(value, 0)}${space}${unit}`;
    case 'V':
    case 'A':
      return `${figure(value, 2)}${space}${unit}`;
    default:
      return `${figure(value, 1, 2)}${space}${unit}`;
  }
}
