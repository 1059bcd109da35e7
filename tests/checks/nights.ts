/** Check values for nights and their heat. */

/**
 * Noon-to-noon nights: UTC difference of the two local noons by the IANA time zone database, recomputed; hours, exact.
 */
export const nightLengths: ReadonlyArray<
  readonly [zone: string, night: string, from: string, to: string, hours: number]
> = [
  ['Europe/Zurich', '2026-03-28', '2026-03-28T11:00:00Z', '2026-03-29T10:00:00Z', 23],
  ['Europe/Zurich', '2026-10-24', '2026-10-24T10:00:00Z', '2026-10-25T11:00:00Z', 25],
  ['America/Denver', '2026-03-07', '2026-03-07T19:00:00Z', '2026-03-08T18:00:00Z', 23],
  ['America/Denver', '2026-10-31', '2026-10-31T18:00:00Z', '2026-11-01T19:00:00Z', 25],
  ['America/New_York', '2026-06-01', '2026-06-01T16:00:00Z', '2026-06-02T16:00:00Z', 24],
  ['Australia/Lord_Howe', '2026-04-04', '2026-04-04T01:00:00Z', '2026-04-05T01:30:00Z', 24.5],
  ['Australia/Lord_Howe', '2026-10-03', '2026-10-03T01:30:00Z', '2026-10-04T01:00:00Z', 23.5],
];

/**
 * The trade's rule of thumb, 1.08 Btu/h a cfm and °F at sea level: 90 cfm and 10 °F carry 972 Btu/h, 284.87 W; ± 0.1 W.
 * The rule rounds the air's mass and heat, so a figure from moist-air tables agrees with it to 1 % only.
 */
export const thumbRule = { m3PerS: 0.042475, kelvin: 10 / 1.8, watts: 284.87 };
/** The same at 2400 m by the standard atmosphere (ASHRAE Handbook of Fundamentals 2017, ch. 1, eq. 3): 212.6 W. */
export const thumbRuleAt2400 = 212.6;

/** A 12 W fan all day: 0.288 kWh, by definition of the kilowatt hour. */
export const fanDay = { powerW: 12, kWh: 0.288 };

/**
 * Heat for each watt of a 12 W fan that moves 90 cfm by 10 °F (common practice: "24 to 1"), and the same at 2400 m: the
 * rule of thumb ÷ 12 W, recomputed.
 */
export const gain = { seaLevel: 23.74, at2400m: 17.72 };
