/** Check values for house, heap, loop and ground, each with its source. */

/**
 * Cardinal temperature model, least 5, best 20, most 30 °C, at 1 to 30 °C: vector of the public documentation
 * of a package that implements Rosso, Lobry and Flandrois 1993; ± 1e-7.
 */
export const cardinalPublished = {
  cardinal: { leastC: 5, bestC: 20, mostC: 30 },
  activity: [
    0, 0, 0, 0, 0, 0.02, 0.07215686, 0.14666667, 0.23578947, 0.33333333, 0.43428571, 0.53454545, 0.63072464,
    0.72, 0.8, 0.86871795, 0.92444444, 0.96571429, 0.99126437, 1, 0.99096774, 0.96333333, 0.91636364,
    0.84941176, 0.76190476, 0.65333333, 0.52324324, 0.37122807, 0.19692308, 0,
  ],
} as const;

/** The same formula with a set used for composting (5, 59, 82 °C), recomputed; ± 1e-5. */
export const cardinalCompost: ReadonlyArray<readonly [tempC: number, activity: number]> = [
  [-10, 0],
  [0, 0],
  [5, 0],
  [10, 0.0204],
  [20, 0.16624],
  [30, 0.40831],
  [40, 0.68348],
  [50, 0.91324],
  [55, 0.98116],
  [60, 0.99871],
  [65, 0.94919],
  [70, 0.8136],
  [75, 0.57018],
  [82, 0],
  [87, 0],
];

/** Haug's moisture factor (1993), recomputed from coefficients quoted from memory; ± 1e-3. */
export const moistureActivities: ReadonlyArray<readonly [moisture: number, activity: number]> = [
  [0.2, 0.0286],
  [0.3, 0.1472],
  [0.4, 0.5028],
  [0.5, 0.8557],
  [0.6, 0.972],
  [0.7, 0.9951],
];

/** ε = 1 − exp(−NTU); ± 1e-5. */
export const effectivenesses: ReadonlyArray<readonly [ntu: number, effectiveness: number]> = [
  [0.1, 0.09516],
  [0.5, 0.39347],
  [1, 0.63212],
  [2, 0.86466],
  [3, 0.95021],
];

/**
 * Kusuda and Achenbach 1965, form with the depth lag as in public model documentation: mean 10 °C, swing
 * 12 K, coldest surface on day 35, 0.05 m²/day; ± 1e-3 °C.
 */
export const kusuda = {
  place: { meanC: 10, swingK: 12, coldestDay: 35, diffusivityM2PerDay: 0.05 },
  days: [1, 35, 126, 217, 309],
  byDepthM: [
    [0, [-0.0027, -2.0, 9.9484, 21.9996, 9.9484]],
    [1, [5.7194, 2.7475, 6.7743, 17.2247, 13.1633]],
    [2, [9.1883, 6.4672, 6.1235, 13.4995, 13.8461]],
    [4, [11.4248, 10.2024, 7.7273, 9.778, 12.2744]],
  ],
} as const;
