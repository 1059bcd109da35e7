/** The demo holding Larkmoor Growers, in the same bodies that a person or program would send. Invented throughout. */
import type { z } from 'zod';
import type { RuleBodyInput } from '@/lib/schema/rule';
import type {
  ChannelCreate,
  HouseCreate,
  InterlockCreate,
  LoopCreate,
  NodeCreate,
  PointCreate,
  SourceCreate,
} from '@/lib/schema/yard';

export interface DemoHouse {
  house: z.input<typeof HouseCreate>;
  nodes: z.input<typeof NodeCreate>[];
  points: z.input<typeof PointCreate>[];
  sources: z.input<typeof SourceCreate>[];
  channels: z.input<typeof ChannelCreate>[];
  loops: z.input<typeof LoopCreate>[];
  interlocks: z.input<typeof InterlockCreate>[];
  rules: { name: string; channel: string; why: string; body: RuleBodyInput }[];
  /** Keys of channels whose wiring was proved in the autumn. */
  proved: string[];
}

type Point = z.input<typeof PointCreate>;

/** A one-wire temperature probe on a node, with limits that its place can honestly reach. */
export function probe(
  node: string,
  key: string,
  name: string,
  role: Point['role'],
  more: Partial<Point> = {},
): Point {
  return { key, node, name, role, unit: 'Cel', min: -40, max: 85, sensor: 'one-wire', ...more };
}

const winter = { from: '10-01', to: '04-30' };

export const longHouse: DemoHouse = {
  house: {
    name: 'Long house',
    zone: 'Europe/London',
    latitude: 54.2,
    longitude: -2.3,
    altitude: 310,
    frostLimit: 3,
    frostAlarm: 2,
  },
  nodes: [{ key: 'LH-1', kind: 'socket', reportEvery: 30, channels: 8 }],
  points: [
    probe('LH-1', 'house-air', 'House air', 'house-air', { maxRate: 0.5, frozenAfter: 14_400 }),
    probe('LH-1', 'bench-1', 'Bench probe 1', 'bench', { maxRate: 0.5, frozenAfter: 14_400 }),
    probe('LH-1', 'bench-2', 'Bench probe 2', 'bench', { maxRate: 0.5, frozenAfter: 14_400 }),
    {
      key: 'humidity',
      node: 'LH-1',
      name: 'House humidity',
      role: 'humidity',
      unit: '%RH',
      min: 0,
      max: 110,
    },
    probe('LH-1', 'outdoors', 'Outdoors', 'outdoors', { maxRate: 0.5, frozenAfter: 14_400 }),
    { key: 'light', node: 'LH-1', name: 'Light', role: 'light', unit: 'W/m2', min: 0, max: 1400 },
    probe('LH-1', 'loop-intake', 'Loop intake', 'loop-intake', { maxRate: 1 }),
    probe('LH-1', 'loop-return', 'Loop return', 'loop-return', { maxRate: 2 }),
    probe('LH-1', 'gate-core', 'Gate heap core', 'heap-core', { maxRate: 0.1 }),
    probe('LH-1', 'gate-base', 'Gate heap beside the pipe', 'heap-base', { maxRate: 0.2 }),
    probe('LH-1', 'gate-edge', 'Gate heap edge', 'heap-edge', { maxRate: 0.2 }),
    probe('LH-1', 'ground', 'Ground at 1.5 m', 'ground', { maxRate: 0.2 }),
    probe('LH-1', 'ground-return', 'Ground tubes return', 'loop-return', { maxRate: 2 }),
    {
      key: 'fan-amps',
      node: 'LH-1',
      name: 'Gate-heap fan current',
      role: 'current',
      unit: 'A',
      min: 0,
      max: 5,
    },
  ],
  sources: [
    {
      name: 'Gate heap',
      kind: 'heap',
      corePoint: 'gate-core',
      basePoint: 'gate-base',
      coreFloor: 38,
      dailyLimit: 28_800,
      ready: { level: 50, for: 259_200 },
    },
    { name: 'Ground tubes', kind: 'ground', corePoint: 'ground' },
    { name: 'Bench mat', kind: 'heater' },
  ],
  channels: [
    {
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
      runProof: { point: 'fan-amps', above: 0.2 },
      fallback: { point: 'bench-1', below: 2, above: 5, onFor: 1200, offFor: 2400 },
      flow: { litresPerSecond: 42.5, from: 'measured', sd: 4 },
    },
    {
      number: 2,
      node: 'LH-1',
      relay: 2,
      key: 'ground-fan',
      label: 'Ground fan',
      source: 'ground-tubes',
      frostHelp: true,
      contact: 'NO',
      load: { kind: 'motor', watts: 18, volts: 24, supply: 'dc', contactAmps: 5 },
      minOn: 180,
      minOff: 180,
      startsPerHour: 6,
      flow: { litresPerSecond: 60, from: 'curve', sd: 9 },
    },
    {
      number: 3,
      node: 'LH-1',
      relay: 3,
      key: 'bench-mat',
      label: 'Bench mat',
      source: 'bench-mat',
      frostHelp: true,
      contact: 'NO',
      load: { kind: 'heater', watts: 240, volts: 230, supply: 'ac', contactAmps: 10 },
      minOn: 60,
      minOff: 60,
      startsPerHour: 12,
      highLimit: { point: 'bench-2', above: 28 },
    },
    {
      number: 4,
      node: 'LH-1',
      relay: 4,
      key: 'ridge-vent',
      label: 'Ridge vent',
      contact: 'NO',
      load: { kind: 'vent', watts: 36, volts: 24, supply: 'dc', contactAmps: 5 },
      minOn: 300,
      minOff: 300,
      startsPerHour: 6,
    },
  ],
  loops: [
    {
      name: 'Gate loop',
      source: 'gate-heap',
      channel: 'gate-heap-fan',
      intake: 'loop-intake',
      return: 'loop-return',
    },
    {
      name: 'Ground loop',
      source: 'ground-tubes',
      channel: 'ground-fan',
      intake: 'house-air',
      return: 'ground-return',
    },
  ],
  interlocks: [
    { channel: 'ridge-vent', kind: 'never-with', other: 'gate-heap-fan', delay: 5, frostMayBreak: false },
  ],
  rules: [
    {
      name: 'Gate-heap fan by the bench',
      channel: 'gate-heap-fan',
      why: 'First winter with the heap: start carefully.',
      body: {
        purpose: 'warm',
        point: 'bench-1',
        standIns: [{ point: 'house-air', offset: -0.5 }],
        band: [{ from: '00:00', low: 4, high: 7.5 }],
        rest: {
          longestDraw: 1200,
          least: 1800,
          most: 5400,
          until: { point: 'gate-base', level: 43 },
          leastGain: { kelvin: 3, after: 600, intake: 'loop-intake', return: 'loop-return' },
          frostMayBreak: true,
        },
        season: winter,
      },
    },
    {
      name: 'Ground fan by the house',
      channel: 'ground-fan',
      why: 'The ground gives first; it is a small store, so it rests too.',
      body: {
        purpose: 'warm',
        point: 'house-air',
        band: [{ from: '00:00', low: 5, high: 7 }],
        rest: { longestDraw: 3600, least: 3600, frostMayBreak: true },
        season: winter,
      },
    },
    {
      name: 'Bench mat by probe 2',
      channel: 'bench-mat',
      why: 'Last resort for the seedlings; it costs money.',
      body: {
        purpose: 'warm',
        point: 'bench-2',
        standIns: [{ point: 'house-air', offset: 0 }],
        band: [{ from: '00:00', low: 2.5, high: 3.5 }],
        season: winter,
      },
    },
    {
      name: 'Ridge vent on bright days',
      channel: 'ridge-vent',
      why: 'A closed house is hot in an hour of sun.',
      body: {
        purpose: 'cool',
        point: 'house-air',
        band: [{ from: '00:00', low: 18, high: 22 }],
        hours: { from: '09:00', to: '17:00' },
      },
    },
  ],
  proved: ['gate-heap-fan', 'ground-fan', 'bench-mat'],
};

export const propHouse: DemoHouse = {
  house: {
    name: 'Prop house',
    zone: 'Europe/London',
    latitude: 54.2,
    longitude: -2.3,
    altitude: 310,
    frostLimit: 4,
    frostAlarm: 2.5,
  },
  nodes: [{ key: 'PH-1', kind: 'socket', reportEvery: 30, channels: 4 }],
  points: [
    probe('PH-1', 'house-air', 'House air', 'house-air', { maxRate: 0.5, frozenAfter: 14_400 }),
    probe('PH-1', 'bench-1', 'Bench probe 1', 'bench', { maxRate: 0.5, frozenAfter: 14_400 }),
    {
      key: 'humidity',
      node: 'PH-1',
      name: 'House humidity',
      role: 'humidity',
      unit: '%RH',
      min: 0,
      max: 110,
    },
    probe('PH-1', 'outdoors', 'Outdoors', 'outdoors', { maxRate: 0.5, frozenAfter: 14_400 }),
    probe('PH-1', 'loop-intake', 'Loop intake', 'loop-intake', { maxRate: 1 }),
    probe('PH-1', 'loop-return', 'Loop return', 'loop-return', { maxRate: 2 }),
    probe('PH-1', 'yew-core', 'Yew heap core', 'heap-core', { maxRate: 0.1 }),
    probe('PH-1', 'yew-base', 'Yew heap beside the pipe', 'heap-base', { maxRate: 0.2 }),
    {
      key: 'fan-amps',
      node: 'PH-1',
      name: 'Yew-heap fan current',
      role: 'current',
      unit: 'A',
      min: 0,
      max: 5,
    },
    { key: 'light', node: 'PH-1', name: 'Light', role: 'light', unit: 'W/m2', min: 0, max: 1400 },
  ],
  sources: [
    {
      name: 'Yew heap',
      kind: 'heap',
      corePoint: 'yew-core',
      basePoint: 'yew-base',
      coreFloor: 38,
      dailyLimit: 28_800,
    },
    { name: 'Cuttings mat', kind: 'heater' },
  ],
  channels: [
    {
      number: 1,
      node: 'PH-1',
      relay: 1,
      key: 'yew-heap-fan',
      label: 'Yew-heap fan',
      source: 'yew-heap',
      frostHelp: true,
      contact: 'NO',
      load: { kind: 'motor', watts: 9, volts: 24, supply: 'dc', contactAmps: 5 },
      minOn: 120,
      minOff: 120,
      startsPerHour: 6,
      runProof: { point: 'fan-amps', above: 0.2 },
      flow: { litresPerSecond: 33, from: 'measured', sd: 4 },
    },
    {
      number: 2,
      node: 'PH-1',
      relay: 2,
      key: 'cuttings-mat',
      label: 'Cuttings mat',
      source: 'cuttings-mat',
      frostHelp: true,
      contact: 'NO',
      load: { kind: 'heater', watts: 160, volts: 230, supply: 'ac', contactAmps: 10 },
      minOn: 60,
      minOff: 60,
      startsPerHour: 12,
      highLimit: { point: 'bench-1', above: 28 },
    },
    {
      number: 3,
      node: 'PH-1',
      relay: 3,
      key: 'gable-vent',
      label: 'Gable vent',
      contact: 'NO',
      load: { kind: 'vent', watts: 24, volts: 24, supply: 'dc', contactAmps: 5 },
      minOn: 300,
      minOff: 300,
      startsPerHour: 6,
    },
  ],
  loops: [
    {
      name: 'Yew loop',
      source: 'yew-heap',
      channel: 'yew-heap-fan',
      intake: 'loop-intake',
      return: 'loop-return',
    },
  ],
  interlocks: [{ channel: 'gable-vent', kind: 'never-with', other: 'yew-heap-fan', delay: 5 }],
  rules: [
    {
      name: 'Yew-heap fan by the bench',
      channel: 'yew-heap-fan',
      why: 'Cuttings want it a little warmer than the long house.',
      body: {
        purpose: 'warm',
        point: 'bench-1',
        standIns: [{ point: 'house-air', offset: 0 }],
        band: [
          { from: '07:00', low: 5, high: 9 },
          { from: '18:00', low: 6, high: 10 },
        ],
        rest: {
          longestDraw: 1800,
          least: 1800,
          most: 5400,
          until: { point: 'yew-base', level: 40 },
          frostMayBreak: true,
        },
        season: winter,
      },
    },
    {
      name: 'Cuttings mat by the bench',
      channel: 'cuttings-mat',
      why: 'Cuttings do not stand a night under 4 °C.',
      body: {
        purpose: 'warm',
        point: 'bench-1',
        standIns: [{ point: 'house-air', offset: 0 }],
        band: [{ from: '00:00', low: 4, high: 5 }],
        season: winter,
      },
    },
    {
      name: 'Gable vent on bright days',
      channel: 'gable-vent',
      why: 'Cuttings scorch sooner than they freeze.',
      body: {
        purpose: 'cool',
        point: 'house-air',
        band: [{ from: '00:00', low: 17, high: 21 }],
        hours: { from: '09:00', to: '17:00' },
      },
    },
  ],
  proved: ['yew-heap-fan', 'cuttings-mat'],
};
