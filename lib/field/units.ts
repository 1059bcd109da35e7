/**
 * Units on the wire: those that a point may be kept in, and those that are converted to them.
 * Names and factors are RFC 8428 (primary) and RFC 8798 (secondary) with the registry's later `Far`;
 * names are case-sensitive there, so they are here.
 */

/** The units that a point may be kept in. */
export const pointUnits = [
  'Cel',
  'K',
  '%RH',
  '/',
  '%',
  'W/m2',
  'ppm',
  'Pa',
  'm/s',
  'W',
  'Wh',
  'V',
  'A',
  'm3/s',
] as const;
export type PointUnit = (typeof pointUnits)[number];

/**
 * `times / over` brings a value, less `zero`, to its quantity's own unit. Kept as a fraction of whole
 * numbers so that 131 Far is 55 Cel to the last bit, as the hygiene rules need it.
 */
interface WireUnit {
  quantity: string;
  times: number;
  over: number;
  zero: number;
}

function unit(quantity: string, times = 1, over = 1, zero = 0): WireUnit {
  return { quantity, times, over, zero };
}

const temperature = 'a temperature';
const difference = 'a temperature difference';
const ratio = 'a ratio from 0 to 1';
const pressure = 'a pressure';
const speed = 'a speed';
const power = 'a power';
const energy = 'an energy';
const voltage = 'a voltage';
const current = 'a current';
const flow = 'a volume flow';

const wireUnits: ReadonlyMap<string, WireUnit> = new Map([
  ['Cel', unit(temperature)],
  ['Far', unit(temperature, 5, 9, 32)],
  // In SenML a kelvin would be an absolute temperature too. Here it is only ever a difference, for a
  // difference put through an offset formula is the costliest mistake of the trade.
  ['K', unit(difference)],
  ['%RH', unit('a relative humidity from 0 to 100')],
  ['/', unit(ratio)],
  // RFC 8428's own trap: `%` is no percentage but the old name of the same ratio.
  ['%', unit(ratio)],
  ['/100', unit(ratio, 1, 100)],
  ['/1000', unit(ratio, 1, 1000)],
  ['ppm', unit(ratio, 1, 1e6)],
  ['ppb', unit(ratio, 1, 1e9)],
  ['W/m2', unit('an irradiance')],
  ['Pa', unit(pressure)],
  ['hPa', unit(pressure, 100)],
  ['m/s', unit(speed)],
  ['km/h', unit(speed, 5, 18)],
  ['m/h', unit(speed, 1, 3600)],
  ['mm/h', unit(speed, 1, 3_600_000)],
  ['W', unit(power)],
  ['kW', unit(power, 1000)],
  ['J', unit(energy)],
  ['Wh', unit(energy, 3600)],
  ['kWh', unit(energy, 3_600_000)],
  ['V', unit(voltage)],
  ['mV', unit(voltage, 1, 1000)],
  ['A', unit(current)],
  ['mA', unit(current, 1, 1000)],
  ['m3/s', unit(flow)],
  ['l/s', unit(flow, 1, 1000)],
]);

/** Whether a SenML unit is one that this program reads. @example isWireUnit('Far') */
export function isWireUnit(name: string): boolean {
  return wireUnits.has(name);
}

export type Converted = { ok: true; value: number } | { ok: false; why: string };

/**
 * A value as sent, in the unit of its point.
 *
 * @param value as sent; a number that is not finite is refused (JSON's 1e999 arrives as Infinity)
 * @param from the unit as sent; without one the value is taken to be in the point's own unit, since
 *   RFC 8428 lets a record go without
 * @param to the point's unit
 * @returns the value, or the reason for refusing it
 * @example toPointUnit(131, 'Far', 'Cel') // { ok: true, value: 55 }
 */
export function toPointUnit(value: number, from: string | undefined, to: PointUnit): Converted {
  if (!Number.isFinite(value)) return { ok: false, why: 'the value is not a finite number' };
  const target = wireUnits.get(to);
  const sent = from === undefined ? target : wireUnits.get(from);
  if (target === undefined || sent === undefined)
    return { ok: false, why: `the unit ${quoted(from)} is not known` };
  if (sent.quantity !== target.quantity) {
    return {
      ok: false,
      why: `the unit ${quoted(from)} is ${sent.quantity}, but this point is kept in ${to}`,
    };
  }
  // The same scale is passed on untouched: what a node sent comes back to the last bit.
  if (sent.times * target.over === target.times * sent.over && sent.zero === target.zero) {
    return { ok: true, value };
  }
  const own = ((value - sent.zero) * sent.times) / sent.over;
  const converted = (own * target.over) / target.times + target.zero;
  return Number.isFinite(converted)
    ? { ok: true, value: converted }
    : { ok: false, why: `the value is too great for ${to}` };
}

/** Quotes what a stranger sent, cut short so that a reason stays readable. */
function quoted(text: string | undefined): string {
  return `"${(text ?? '').slice(0, 40)}"`;
}
