/**
 * Check values for SenML. Examples are those printed in RFC 8428, section 5.1; the section is named
 * beside each. What they resolve to is the RFC's own text or follows from its section 4.6.
 */

/** RFC 8428, 5.1.2: base name, time and unit; an own unit overrides; times before the base. */
export const multipleDatapoints = {
  pack: [
    {
      bn: 'urn:dev:ow:10e2073a0108006:',
      bt: 1276020076.001,
      bu: 'A',
      bver: 5,
      n: 'voltage',
      u: 'V',
      v: 120.1,
    },
    { n: 'current', t: -5, v: 1.2 },
    { n: 'current', t: -4, v: 1.3 },
    { n: 'current', t: -3, v: 1.4 },
    { n: 'current', t: -2, v: 1.5 },
    { n: 'current', t: -1, v: 1.6 },
    { n: 'current', v: 1.7 },
  ],
  /** name after the base, unit, seconds, value: in order of time */
  resolved: [
    ['current', 'A', 1276020071.001, 1.2],
    ['current', 'A', 1276020072.001, 1.3],
    ['current', 'A', 1276020073.001, 1.4],
    ['current', 'A', 1276020074.001, 1.5],
    ['current', 'A', 1276020075.001, 1.6],
    ['voltage', 'V', 1276020076.001, 120.1],
    ['current', 'A', 1276020076.001, 1.7],
  ],
} as const;

/** RFC 8428, 5.1.3, resolved in 5.1.4. */
export const moreMeasurements = {
  pack: [
    { bn: 'urn:dev:ow:10e2073a01080063', bt: 1320067464, bu: '%RH', v: 20 },
    { u: 'lon', v: 24.30621 },
    { u: 'lat', v: 60.07965 },
    { t: 60, v: 20.3 },
    { u: 'lon', t: 60, v: 24.30622 },
    { u: 'lat', t: 60, v: 60.07965 },
    { t: 120, v: 20.7 },
    { u: 'lon', t: 120, v: 24.30623 },
    { u: 'lat', t: 120, v: 60.07966 },
    { u: '%EL', t: 150, v: 98 },
    { t: 180, v: 21.2 },
    { u: 'lon', t: 180, v: 24.30628 },
    { u: 'lat', t: 180, v: 60.07967 },
  ],
  /** unit, seconds, value: all of the one name */
  resolved: [
    ['%RH', 1320067464, 20],
    ['lon', 1320067464, 24.30621],
    ['lat', 1320067464, 60.07965],
    ['%RH', 1320067524, 20.3],
    ['lon', 1320067524, 24.30622],
    ['lat', 1320067524, 60.07965],
    ['%RH', 1320067584, 20.7],
    ['lon', 1320067584, 24.30623],
    ['lat', 1320067584, 60.07966],
    ['%EL', 1320067614, 98],
    ['%RH', 1320067644, 21.2],
    ['lon', 1320067644, 24.30628],
    ['lat', 1320067644, 60.07967],
  ],
} as const;

/** RFC 8428, 5.1.5: a number, text, a boolean and data. */
export const dataTypes = [
  { bn: 'urn:dev:ow:10e2073a01080063:', n: 'temp', u: 'Cel', v: 23.1 },
  { n: 'label', vs: 'Machine Room' },
  { n: 'open', vb: false },
  { n: 'nfv-reader', vd: 'aGkgCg' },
];

/** RFC 8428, 5.1.6: the last record has the base name of the third and the base time of the first. */
export const twoDevices = {
  pack: [
    { bn: '2001:db8::2/', bt: 1320078429, n: 'temperature', u: 'Cel', v: 25.2 },
    { n: 'humidity', u: '%RH', v: 30 },
    { bn: '2001:db8::1/', n: 'temperature', u: 'Cel', v: 12.3 },
    { n: 'humidity', u: '%RH', v: 67 },
  ],
  resolved: [
    ['2001:db8::2/temperature', 'Cel', 1320078429, 25.2],
    ['2001:db8::2/humidity', '%RH', 1320078429, 30],
    ['2001:db8::1/temperature', 'Cel', 1320078429, 12.3],
    ['2001:db8::1/humidity', '%RH', 1320078429, 67],
  ],
} as const;

/** RFC 8428, 5.1.7: the first record holds a base name only. */
export const actuation = [
  { bn: 'urn:dev:ow:10e2073a01080063:' },
  { n: 'temp', u: 'Cel', v: 23.1 },
  { n: 'heat', u: '/', v: 1 },
  { n: 'fan', u: '/', v: 0 },
];

/** RFC 8428, 4.5.1: which names may stand. */
export const names: ReadonlyArray<readonly [name: string, allowed: boolean]> = [
  ['heap/core', true],
  ['_x', false],
  ['a b', false],
  ['2001:db8::1/t', true],
  ['urn:dev:ow:10e2', true],
  ['é', false],
];

/** RFC 8428, 4.5.3: the last relative and the first absolute time; the latter is 1978-07-04T21:24:16Z. */
export const lastRelativeS = 268435455;
export const firstAbsoluteS = 268435456;
