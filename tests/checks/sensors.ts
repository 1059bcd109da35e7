/** What sensors can say, in our own form. `practice` is common practice or engineering judgement, without a source. */

/** G-RATE, practice: fastest plausible changes. Kelvin, and seconds in which it may be that much. */
export const FASTEST = [
  { what: 'house air', kelvin: 1, seconds: 60 },
  { what: 'house air by fan or vent', kelvin: 3, seconds: 60 },
  { what: 'heap core', kelvin: 2, seconds: 3600 },
  { what: 'air of a loop', kelvin: 1, seconds: 60 },
  { what: 'soil at 1 m', kelvin: 0.1, seconds: 3600 },
] as const;

/**
 * G-1W-85, as public kernel bug reports have it: a one-wire digital thermometer reads 85.0 °C with a good check sum
 * right after power-up, in about one of 20 reads on a weak supply. −127 °C is what drivers give for a broken line.
 */
export const ONE_WIRE_FAULTS = [85, -127] as const;
