// SOURCE: the bodies that the description of the interface shows, letter by letter.
export const house = {
  name: 'Long house',
  zone: 'Europe/London',
  latitude: 54.2,
  longitude: -2.3,
  altitude: 310,
  frostLimit: 3.0,
  frostAlarm: 2.0,
};
export const node = { key: 'LH-1', kind: 'socket', reportEvery: 30, channels: 8 };
/** SOURCE: the product's own docs/buses.md. */
export const board = {
  key: 'MB-1',
  kind: 'modbus',
  reportEvery: 10,
  channels: 4,
  modbus: { host: '127.0.0.1', port: 502, unit: 1, timeout: 2, firstCoil: 0, watchdog: null },
  registers: [
    {
      ...{ point: 'bench-2', table: 'input', address: 0, type: 's16', wordOrder: 'high-first' },
      ...{ scale: 0.1, offset: 0, unit: 'Cel' },
    },
  ],
};
export const bench = {
  key: 'bench-1',
  node: 'LH-1',
  name: 'Bench probe 1',
  role: 'bench',
  unit: 'Cel',
  min: -40,
  max: 85,
  staleAfter: 90,
  maxRate: 0.5,
  frozenAfter: 14400,
  offset: 0,
  gain: 1,
  sensor: 'one-wire',
};
const point = (key: string, role: string, unit = 'Cel') => ({ key, node: 'LH-1', name: key, role, unit });
/** What the bodies below name. */
export const otherPoints = [
  point('house-air', 'house-air'),
  point('outdoors', 'outdoors'),
  point('gate-core', 'heap-core'),
  point('gate-base', 'heap-base'),
  point('loop-intake', 'loop-intake'),
  point('loop-return', 'loop-return'),
  point('fan-amps', 'current', 'A'),
];
export const lift = {
  key: 'lift',
  name: 'Lift over outdoors',
  role: 'other',
  unit: 'K',
  derived: { of: 'difference', points: ['house-air', 'outdoors'] },
};
export const source = {
  name: 'Gate heap',
  kind: 'heap',
  corePoint: 'gate-core',
  basePoint: 'gate-base',
  coreFloor: 38,
  dailyLimit: 28800,
  ready: { level: 50, for: 259200 },
};
export const fan = {
  number: 1,
  node: 'LH-1',
  relay: 1,
  key: 'gate-heap-fan',
  label: 'Gate-heap fan',
  source: 'gate-heap',
  frostHelp: true,
  contact: 'NO',
  load: { kind: 'motor', watts: 12, volts: 24, supply: 'dc', contactAmps: 5 },
  minOn: 120,
  minOff: 120,
  startsPerHour: 6,
  longestOn: null,
  highLimit: null,
  runProof: { point: 'fan-amps', above: 0.2 },
  fallback: { point: 'bench-1', below: 2, above: 5, onFor: 1200, offFor: 2400 },
  flow: { litresPerSecond: 42.5, from: 'measured', sd: 4 },
};
export const vent = {
  number: 2,
  node: 'LH-1',
  relay: 2,
  key: 'ridge-vent',
  label: 'Ridge vent',
  contact: 'NO',
  load: { kind: 'vent' },
  minOn: 0,
  minOff: 0,
};
export const loop = {
  name: 'Gate loop',
  source: 'gate-heap',
  channel: 'gate-heap-fan',
  intake: 'loop-intake',
  return: 'loop-return',
};
export const interlock = {
  channel: 'ridge-vent',
  kind: 'never-with',
  other: 'gate-heap-fan',
  delay: 5,
  frostMayBreak: false,
};
export const rule = {
  name: 'Gate-heap fan by the bench',
  channel: 'gate-heap-fan',
  body: {
    purpose: 'warm',
    point: 'bench-1',
    standIns: [{ point: 'house-air', offset: -0.5 }],
    band: [{ from: '00:00', low: 4.0, high: 7.5 }],
    rest: {
      longestDraw: 2400,
      least: 1800,
      most: 5400,
      until: { point: 'gate-base', level: 43 },
      leastGain: { kelvin: 3, after: 900, intake: 'loop-intake', return: 'loop-return' },
      frostMayBreak: true,
    },
    only: { all: [{ fact: 'gate-core', operator: 'greaterThanInclusive', value: 38 }] },
    season: { from: '10-01', to: '04-30' },
    hours: { from: 'sunset-01:00', to: 'sunrise+01:00' },
  },
};

// What follows is of our own making: the description leaves it out.
export const round = {
  source: 'gate-heap',
  at: '2026-12-01T08:20:00.000Z',
  section: { widthM: 3, heightM: 1.2, sunkM: 0.5, columns: 4, rows: 3, left: 'N', right: 'S' },
  places: [
    { column: 0, row: 0, celsius: 14.8 },
    { column: 2, row: 1, celsius: 45.4 },
  ],
  text: 'North edge dry to the hand.',
};
export const material = {
  name: 'Gate stable bedding',
  density: 420,
  moisture: 0.61,
  carbon: 0.42,
  nitrogen: 0.015,
  from: 'Weighed and dried in the oven.',
};
