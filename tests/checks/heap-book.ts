/** Check values for the heap book, each with its source. */

/** Cornell Composting, Science and Engineering: 10 kg of grass, brought to 60 % water with leaves; ± 0.05 kg. */
export const cornellMoisture = {
  grass: { massKg: 10, moisture: 0.77, carbon: 0.45, nitrogen: 0.024 },
  leaves: { moisture: 0.35, carbon: 0.5, nitrogen: 0.0075 },
  target: 0.6,
  leavesKg: 6.8,
} as const;

/** The same two to 30 : 1, by Cornell's formula, recomputed; ± 0.005 kg. Each amount misses the other goal; ± 0.02. */
export const cornellCn = {
  target: 30,
  leavesKg: 3.474,
  cnOfMoistureMix: 36.73,
  moistureOfCnMix: 0.6617,
  /** Equal wet masses of both: the ratio of the sums, and what averaging the ratios would give. */
  equalMasses: { correct: 41.22, naive: 42.71 },
} as const;

/** Free of rounding: (130 − 32) / 1.8. */
export const C_OF_130F = 54.444;

/** 40 CFR 503 appendix B: method, hours of the spell, coldest in it, turnings, and whether the rule's figures are reached. */
export const appendixB: ReadonlyArray<
  readonly ['still' | 'windrow', hours: number, leastC: number, turnings: number, reached: boolean]
> = [
  ['still', 72, 55, 0, true],
  ['still', 71.9, 55, 0, false],
  ['still', 72, 54.99, 0, false],
  ['windrow', 360, 55, 5, true],
  ['windrow', 360, 55, 4, false],
  ['windrow', 359, 60, 6, false],
  ['still', 72, 60, 0, true],
];

/** The same appendix, significant reduction: hours of the spell, coldest in it, hours over 55 °C in it. */
export const fiveDays: ReadonlyArray<
  readonly [hours: number, leastC: number, overHot: number, reached: boolean]
> = [
  [120, 40, 4, true],
  [120, 40, 3.9, false],
  [119, 45, 10, false],
  [120, 39.9, 8, false],
];

/** 40 CFR 503.32(a)(3)(ii), table as in a state rule that mirrors it; relative 2e-4 (its last digit). */
export const requiredDaysTable: ReadonlyArray<readonly [tempC: number, days: number]> = [
  [50, 13.17],
  [55, 2.62776],
  [60, 0.52431],
  [65, 0.10461],
  [70, 0.02087],
];

/** 7 CFR 205.203(c)(2): 131 to 170 °F, and initial C:N. */
export const organicRule = { fromC: 55, toC: 76.6667, cn: [25, 40] } as const;

/** USDA NRCS practice standard 317, job sheet 2002: 165 and 185 °F; ± 0.01 °C. */
export const selfHeating = { watchC: 73.89, actC: 85 } as const;
