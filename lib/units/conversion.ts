/**
 * Between SI, which everything inside keeps to, and the units that people read. Used at the edge only.
 * Factors are exact by definition: 1 ft = 0.3048 m, 1 Btu (IT) = 1055.05585262 J, 1 lb = 0.45359237 kg.
 *
 * A temperature and a temperature difference are different functions on purpose: 10 °F of difference is
 * 5.56 K, and put through the offset formula it would be −12.2.
 */

const metresPerFoot = 0.3048;
const joulesPerBtu = 1055.05585262;
const kilogramsPerPound = 0.45359237;

/** °C to °F. @example fahrenheit(55) === 131 */
export function fahrenheit(celsius: number): number {
  return (celsius * 9) / 5 + 32;
}

/** °F to °C. @example celsius(131) === 55 */
export function celsius(fahrenheitDegrees: number): number {
  return ((fahrenheitDegrees - 32) * 5) / 9;
}

/** A difference in K (or °C) to one in °F. */
export function fahrenheitDifference(kelvin: number): number {
  return (kelvin * 9) / 5;
}

/** A difference in °F to one in K. */
export function kelvinDifference(fahrenheitDegrees: number): number {
  return (fahrenheitDegrees * 5) / 9;
}

/** °C to absolute K. */
export function kelvinAbsolute(celsiusDegrees: number): number {
  return celsiusDegrees + 273.15;
}

/** m³/s to L/s. */
export function litresPerSecond(cubicMetresPerSecond: number): number {
  return cubicMetresPerSecond * 1000;
}

/** L/s to m³/s. */
export function cubicMetresPerSecond(litres: number): number {
  return litres / 1000;
}

/** m³/s to cubic feet a minute. @example cfm(0.04247527) is 90.0 */
export function cfm(cubicMetresEachSecond: number): number {
  return (cubicMetresEachSecond * 60) / metresPerFoot ** 3;
}

/** Cubic feet a minute to m³/s. */
export function cubicMetresPerSecondFromCfm(cubicFeetPerMinute: number): number {
  return (cubicFeetPerMinute * metresPerFoot ** 3) / 60;
}

/** m to ft. */
export function feet(metres: number): number {
  return metres / metresPerFoot;
}

/** ft to m. */
export function metres(feetLong: number): number {
  return feetLong * metresPerFoot;
}

/** m² to ft². */
export function squareFeet(squareMetres: number): number {
  return squareMetres / metresPerFoot ** 2;
}

/** ft² to m². */
export function squareMetres(squareFeetBroad: number): number {
  return squareFeetBroad * metresPerFoot ** 2;
}

/** m³ to ft³. */
export function cubicFeet(cubicMetres: number): number {
  return cubicMetres / metresPerFoot ** 3;
}

/** ft³ to m³. */
export function cubicMetres(cubicFeetLarge: number): number {
  return cubicFeetLarge * metresPerFoot ** 3;
}

/** J to kWh. */
export function kilowattHours(joules: number): number {
  return joules / 3_600_000;
}

/** kWh to J. */
export function joules(kilowattHoursOfEnergy: number): number {
  return kilowattHoursOfEnergy * 3_600_000;
}

/** J to Btu (IT). */
export function btu(energyJ: number): number {
  return energyJ / joulesPerBtu;
}

/** W to Btu an hour. */
export function btuPerHour(watts: number): number {
  return (watts * 3600) / joulesPerBtu;
}

/** Btu an hour to W. @example watts(1) is 0.29307107 */
export function watts(btuEachHour: number): number {
  return (btuEachHour * joulesPerBtu) / 3600;
}

/** W/(m²·K) to Btu/(h·ft²·°F). */
export function btuPerHourSquareFootFahrenheit(wattsPerSquareMetreKelvin: number): number {
  return wattsPerSquareMetreKelvin / wattsPerSquareMetreKelvinOfOne;
}

/** Btu/(h·ft²·°F) to W/(m²·K). @example wattsPerSquareMetreKelvin(1) is 5.678263 */
export function wattsPerSquareMetreKelvin(btuEach: number): number {
  return btuEach * wattsPerSquareMetreKelvinOfOne;
}
const wattsPerSquareMetreKelvinOfOne = joulesPerBtu / 3600 / metresPerFoot ** 2 / (5 / 9);

/** kg to lb. */
export function pounds(kilograms: number): number {
  return kilograms / kilogramsPerPound;
}

/** lb to kg. */
export function kilograms(poundsHeavy: number): number {
  return poundsHeavy * kilogramsPerPound;
}

/** Pa to hPa. */
export function hectopascals(pascals: number): number {
  return pascals / 100;
}

/** A share from 0 to 1 to per cent. */
export function percent(share: number): number {
  return share * 100;
}
