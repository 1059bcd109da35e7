/** The second demo holding, Stonebeck Nursery, whose rows Larkmoor must never see. Invented throughout. */
import { gauge, probe, type DemoHouse } from './demo-house';

export const beckHouse: DemoHouse = {
  house: {
    name: 'Beck house',
    zone: 'Europe/London',
    latitude: 54.4,
    longitude: -2.6,
    altitude: 140,
    frostLimit: 2,
    frostAlarm: 1,
  },
  nodes: [{ key: 'SN-1', kind: 'socket', reportEvery: 30, channels: 4 }],
  points: [
    probe('SN-1', 'house-air', 'House air', 'house-air', { maxRate: 0.5, frozenAfter: 14_400 }),
    probe('SN-1', 'bench-1', 'Bench probe 1', 'bench', { maxRate: 0.5, frozenAfter: 14_400 }),
    gauge('SN-1', 'humidity', 'House humidity', { role: 'humidity', unit: '%RH' }, [0, 110]),
    probe('SN-1', 'outdoors', 'Outdoors', 'outdoors', { maxRate: 0.5, frozenAfter: 14_400 }),
    probe('SN-1', 'loop-intake', 'Loop intake', 'loop-intake', { maxRate: 1 }),
    probe('SN-1', 'loop-return', 'Loop return', 'loop-return', { maxRate: 2 }),
    probe('SN-1', 'beck-core', 'Beck heap core', 'heap-core', { maxRate: 0.1 }),
    probe('SN-1', 'beck-base', 'Beck heap beside the pipe', 'heap-base', { maxRate: 0.2 }),
    gauge('SN-1', 'fan-amps', 'Beck-heap fan current', { role: 'current', unit: 'A' }, [0, 5]),
  ],
  sources: [
    {
      name: 'Beck heap',
      kind: 'heap',
      corePoint: 'beck-core',
      basePoint: 'beck-base',
      coreFloor: 38,
      dailyLimit: 28_800,
    },
  ],
  channels: [
    {
      number: 1,
      node: 'SN-1',
      relay: 1,
      key: 'beck-heap-fan',
      label: 'Beck-heap fan',
      source: 'beck-heap',
      frostHelp: true,
      contact: 'NO',
      load: { kind: 'motor', watts: 10, volts: 24, supply: 'dc', contactAmps: 5 },
      minOn: 120,
      minOff: 120,
      startsPerHour: 6,
      flow: { litresPerSecond: 35, from: 'rated' },
    },
  ],
  loops: [
    {
      name: 'Beck loop',
      source: 'beck-heap',
      channel: 'beck-heap-fan',
      intake: 'loop-intake',
      return: 'loop-return',
    },
  ],
  interlocks: [],
  rules: [
    {
      name: 'Beck-heap fan by the house',
      channel: 'beck-heap-fan',
      why: 'Frost free is enough here.',
      body: {
        purpose: 'warm',
        point: 'house-air',
        band: [{ from: '00:00', low: 3, high: 6.5 }],
        rest: { longestDraw: 2400, least: 1800, frostMayBreak: true },
      },
    },
  ],
  proved: [],
};
