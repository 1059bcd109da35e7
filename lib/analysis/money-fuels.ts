/**
 * What a kWh of heat costs from a fuel that is bought. Energy is given as each fuel is usually reckoned: gross (with the
 * heat of the water vapour) for propane and oil, whose boilers' efficiencies are told on the gross value in North America;
 * net for wood. Efficiency must be on the same footing; both figures are the owner's to change.
 */
export const FUELS = ['propane', 'oil', 'wood'] as const;
export type Fuel = (typeof FUELS)[number];

export interface FuelUnit {
  unit: string;
  kWh: number;
  source: string;
}

const EIA_PROPANE =
  '91 452 Btu a US gallon, gross: U.S. Energy Information Administration, Units and calculators (from memory)';
const EIA_OIL =
  '138 500 Btu a US gallon, gross: U.S. Energy Information Administration, Units and calculators (from memory)';
const WOOD =
  'logs dried to 20 % water, net, hardwood and softwood mixed: Forest Research, Typical calorific values of fuels (from memory)';

export const FUEL_UNITS: Record<Fuel, readonly FuelUnit[]> = {
  propane: [
    { unit: 'kg', kWh: 13.99, source: '50.35 MJ/kg, gross: NIST Chemistry WebBook (from memory)' },
    { unit: 'L', kWh: 7.08, source: EIA_PROPANE },
    { unit: 'US gal', kWh: 26.8, source: EIA_PROPANE },
    { unit: 'kWh', kWh: 1, source: 'as it is billed' },
  ],
  oil: [
    { unit: 'L', kWh: 10.72, source: EIA_OIL },
    { unit: 'US gal', kWh: 40.59, source: EIA_OIL },
    { unit: 'kWh', kWh: 1, source: 'as it is billed' },
  ],
  wood: [
    { unit: 'kg', kWh: 4.1, source: WOOD },
    { unit: 'stere', kWh: 1700, source: WOOD },
    { unit: 'kWh', kWh: 1, source: 'as it is billed' },
  ],
};

/** Of a boiler or stove in use, until the owner says better: our own guess from common practice, no source. */
export const USUAL_EFFICIENCY: Record<Fuel, number> = { propane: 0.85, oil: 0.85, wood: 0.7 };

export interface FuelPrice {
  fuel: Fuel;
  unit: string;
  /** Micros a unit. */
  price: number;
  /** Energy in a unit, kWh; null takes the published one. */
  kWh: number | null;
  /** Heat got out of the energy in it, 0 to 1.1. */
  efficiency: number;
}

/** @returns energy in a unit and where it comes from; null for a unit that the fuel is not sold in */
export function energyOf({ fuel, unit, kWh }: Pick<FuelPrice, 'fuel' | 'unit' | 'kWh'>): FuelUnit | null {
  const known = FUEL_UNITS[fuel].find((one) => one.unit === unit);
  if (known === undefined) return null;
  return kWh === null ? known : { unit, kWh, source: 'entered' };
}

/**
 * Micros a kWh of heat.
 * @example 3.00 a US gal with 26.82 kWh in it, at 80 %, is 0.1398
 */
export function heatPrice(price: FuelPrice): number | null {
  const energy = energyOf(price);
  return energy === null ? null : price.price / (energy.kWh * price.efficiency);
}
