/**
 * Check values for moist air. ASHRAE stands for the ASHRAE Handbook of Fundamentals 2017, chapter 1.
 */

/** Saturation pressure, °C and Pa: ASHRAE eq. 5 (ice) and 6 (water), recomputed; relative 2e-5. */
export const saturationPressures: ReadonlyArray<readonly [tempC: number, pa: number]> = [
  [-20, 103.26],
  [-10, 259.903],
  [-5, 401.764],
  [0, 611.154],
  [5, 872.487],
  [10, 1227.995],
  [15, 1705.448],
  [20, 2338.804],
  [25, 3169.216],
  [30, 4246.03],
  [40, 7383.46],
  [60, 19943.761],
];

/** Saturation pressure as printed in ASHRAE Table 3; relative 3e-4. */
export const saturationTable: ReadonlyArray<readonly [tempC: number, pa: number]> = [
  [-20, 103.24],
  [-5, 401.74],
  [5, 872.6],
  [25, 3169.7],
  [50, 12351.3],
];

/** Saturation humidity ratio at 101 325 Pa: ASHRAE eq. 20, recomputed; relative 2e-4. */
export const saturationHumidity: ReadonlyArray<readonly [tempC: number, kgPerKg: number]> = [
  [-20, 0.0006345],
  [-10, 0.0015994],
  [0, 0.0037741],
  [5, 0.0054019],
  [10, 0.0076301],
  [20, 0.0146951],
  [25, 0.0200811],
  [30, 0.0272026],
  [40, 0.0488826],
];

/** Standard atmosphere: ASHRAE Table 1 as printed; ± 1 Pa. */
export const atmosphereTable: ReadonlyArray<readonly [altitudeM: number, pa: number]> = [
  [-500, 107478],
  [0, 101325],
  [500, 95461],
  [1000, 89875],
  [4000, 61640],
  [10000, 26436],
];

/** Standard atmosphere: ASHRAE eq. 3, recomputed; ± 1 Pa. */
export const atmosphere: ReadonlyArray<readonly [altitudeM: number, pa: number]> = [
  [300, 97772.6],
  [1500, 84555.9],
  [1829, 81197.5],
  [2400, 75625.6],
  [3000, 70108.4],
];

/** States at 101 325 Pa: ASHRAE eq. 20, 26, 30, 33 to 37, recomputed by other code. */
export const states = [
  { tempC: 25, rh: 0.5, w: 0.009881, dewC: 13.864, wetC: 17.889, kJ: 50.322, rho: 1.17696, vpdPa: 1584.6 },
  { tempC: 20, rh: 0.6, w: 0.008734, dewC: 12.007, wetC: 15.143, kJ: 42.29, rho: 1.19785, vpdPa: 935.5 },
  { tempC: 20, rh: 0.5, w: 0.007262, dewC: 9.272, wetC: 13.784, kJ: 38.552, rho: 1.1989, vpdPa: 1169.4 },
  { tempC: 10, rh: 0.8, w: 0.006089, dewC: 6.713, wetC: 8.29, kJ: 25.402, rho: 1.24211, vpdPa: 245.6 },
  { tempC: 5, rh: 0.9, w: 0.004858, dewC: 3.498, wetC: 4.301, kJ: 17.224, rho: 1.26537, vpdPa: 87.2 },
  { tempC: 35, rh: 0.4, w: 0.014132, dewC: 19.385, wetC: 23.935, kJ: 71.473, rho: 1.13592, vpdPa: 3376.7 },
];

/** ASHRAE Example 1: 40 °C dry, 20 °C wet bulb, 101 325 Pa; as printed, so loosely. */
export const exampleOne = { tempC: 40, wetC: 20, w: 0.0065, dewC: 7, rh: 0.14, kJ: 56.7 };

/** Dry bulb, wet bulb, Pa, humidity ratio: a public test suite of ASHRAE eq. 33 and (ice) 35; relative 3e-4. */
export const wetBulbs: ReadonlyArray<readonly [tempC: number, wetC: number, pa: number, kgPerKg: number]> = [
  [-1, -5, 95461, 0.00120399819933844],
  [30, 25, 95461, 0.0192281274241096],
];

/** Density of moist air at 2400 m of the standard atmosphere: ASHRAE eq. 3, 20, 26; ± 0.001 kg/m³. */
export const highDensities: ReadonlyArray<readonly [tempC: number, rh: number, kgPerM3: number]> = [
  [20, 0, 0.8987],
  [20, 0.5, 0.8935],
  [10, 0.5, 0.9276],
  [0, 0.5, 0.9631],
];

/** Heat carried a kelvin by 90 cfm (0.042475 m³/s) of dry air at 20 °C: ρ·V·cp; ± 0.1 W/K. */
export const carriedSeaLevelWPerK = 51.45;
export const carried2400mWPerK = 38.4;
