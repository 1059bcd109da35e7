/**
 * Moist air by the equations of ASHRAE Handbook of Fundamentals 2017, chapter 1, as psychrolib carries
 * them: over ice below 0 °C, over water above. Range −100 to 200 °C. °C, Pa, kg of water a kg of dry air.
 *
 * Relative humidity is a ratio, 0 to 1. A hundredfold mistake (50 for 0.5) gives a dew point above the air
 * and a negative deficit, so a ratio over 1.05 is refused; up to there a wet sensor may read, and it counts
 * as saturated.
 */
import psychrolib from 'psychrolib';

psychrolib.SetUnitSystem(psychrolib.SI);

/** J/(kg·K) of dry air and of water vapour near 0 to 40 °C: the derivatives of ASHRAE's enthalpy, eq. 30. */
export const dryAirJPerKgK = 1006;
export const vapourJPerKgK = 1860;

/** Pressure at sea level, Pa. */
export const seaLevelPa = 101_325;

function ratio(relativeHumidity: number): number {
  if (!(relativeHumidity >= 0 && relativeHumidity <= 1.05)) {
    throw new RangeError(`relative humidity is a ratio from 0 to 1, not ${relativeHumidity}`);
  }
  return Math.min(relativeHumidity, 1);
}

/**
 * Pressure of the standard atmosphere, Pa (eq. 3), −500 to 11 000 m.
 * @example pressureAtAltitude(2400) is 75 625.6: a quarter less air than at sea level
 */
export function pressureAtAltitude(altitudeM: number): number {
  return psychrolib.GetStandardAtmPressure(altitudeM);
}

/** Pressure of saturated vapour, Pa (eq. 5 and 6). */
export function saturationPressure(tempC: number): number {
  return psychrolib.GetSatVapPres(tempC);
}

/** Humidity ratio, kg/kg (eq. 20, perfect gas: some 0.45 % under the handbook's real-gas table). */
export function humidityRatio(tempC: number, relativeHumidity: number, pressurePa: number): number {
  return psychrolib.GetHumRatioFromRelHum(tempC, ratio(relativeHumidity), pressurePa);
}

/** Humidity ratio, kg/kg, from dry and wet bulb (eq. 33 and 35, the latter over ice). */
export function humidityRatioFromWetBulb(tempC: number, wetBulbC: number, pressurePa: number): number {
  return psychrolib.GetHumRatioFromTWetBulb(tempC, wetBulbC, pressurePa);
}

/** Relative humidity, 0 to 1, of air that holds `humidity` kg/kg; over 1 where it would be fog. */
export function relativeHumidity(tempC: number, humidity: number, pressurePa: number): number {
  return psychrolib.GetRelHumFromHumRatio(tempC, humidity, pressurePa);
}

/** Dew point (or frost point), °C; null for air without any vapour, which has none. */
export function dewPoint(tempC: number, relativeHumidity: number): number | null {
  const share = ratio(relativeHumidity);
  return share === 0 ? null : psychrolib.GetTDewPointFromRelHum(tempC, share);
}

/** Wet bulb, °C. */
export function wetBulb(tempC: number, relativeHumidity: number, pressurePa: number): number {
  return psychrolib.GetTWetBulbFromRelHum(tempC, ratio(relativeHumidity), pressurePa);
}

/** Enthalpy, J a kg of dry air (eq. 30), from 0 °C dry. */
export function enthalpy(tempC: number, humidity: number): number {
  return psychrolib.GetMoistAirEnthalpy(tempC, humidity);
}

/** Mass of moist air, kg a m³ (eq. 26 and 31). */
export function moistAirDensity(tempC: number, humidity: number, pressurePa: number): number {
  return psychrolib.GetMoistAirDensity(tempC, humidity, pressurePa);
}

/** Mass of dry air, kg a m³. */
export function dryAirDensity(tempC: number, pressurePa: number): number {
  return psychrolib.GetDryAirDensity(tempC, pressurePa);
}

/** What the air could still take up at its own temperature, Pa. */
export function vapourPressureDeficit(tempC: number, relativeHumidity: number): number {
  return saturationPressure(tempC) * (1 - ratio(relativeHumidity));
}

/** The same seen from a leaf of another temperature, Pa; negative where the leaf is under the dew point. */
export function leafVapourPressureDeficit(leafC: number, tempC: number, relativeHumidity: number): number {
  return saturationPressure(leafC) - ratio(relativeHumidity) * saturationPressure(tempC);
}

/**
 * Heat that a flow of air carries for each kelvin, W/K.
 * @param flowM3PerS volume flow where the air has `tempC`
 * @example heatCapacityFlow(0.042475, 20, 101325) is 51.45; at 2400 m it is 38.4
 */
export function heatCapacityFlow(
  flowM3PerS: number,
  tempC: number,
  pressurePa: number,
  humidity = 0,
): number {
  const dryKgPerM3 = moistAirDensity(tempC, humidity, pressurePa) / (1 + humidity);
  return flowM3PerS * dryKgPerM3 * (dryAirJPerKgK + humidity * vapourJPerKgK);
}
