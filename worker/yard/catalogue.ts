/**
 * What stands in the simulated yard: houses, what heats them, and the nodes with their relays and points.
 * Data only. Whoever registers these nodes uses the same keys; a node's relay does what is said here.
 * Powers W, conductances W/K, capacities J/K, temperatures °C. The Long house is sized like a small
 * winter tunnel with half a ton of water in it; the others are scaled from it.
 */
import type { GroundPlace, SoilRing } from '@/lib/physics/ground';
import type { Heap, HeapState } from '@/lib/physics/heap';
import type { House } from '@/lib/physics/house';

export type Quantity =
  | 'air'
  | 'bench'
  | 'sheltered-bench'
  | 'humidity'
  | 'outdoors'
  | 'heap-intake'
  | 'heap-return'
  | 'heap-core'
  | 'heap-base'
  | 'heap-edge'
  | 'soil'
  | 'soil-return'
  | 'fan-current'
  | 'light';

/** A sensor: what it sees, in the unit in which it reports. */
export interface YardPoint {
  key: string;
  of: Quantity;
  unit: 'Cel' | '%RH' | 'A' | 'W/m2';
  /** its own constant error */
  offset: number;
  /** standard deviation of its noise */
  noise: number;
  /** its smallest step */
  resolution: number;
}

export interface YardFan {
  relay: number;
  flowM3PerS: number;
  pipeWPerK: number;
  fanW: number;
  volts: number;
}

export interface YardHouse {
  key: string;
  node: string;
  relays: number;
  altitudeM: number;
  /** K by which its valley is warmer than the uplands' weather */
  shelterK: number;
  house: House;
  start: { airC: number; massC: number };
  heap: Heap;
  heapStart: HeapState;
  heapFan: YardFan;
  ground?: SoilRing & { depthM: number; fan: YardFan };
  mat?: { relay: number; watts: number };
  vent?: { relay: number };
  points: YardPoint[];
}

/** How often a node of the yard reports its readings, s of app time. */
export const reportEveryS = 30;

/** Surface of the ground at an upland place, as in the middle of winter in every month, like the weather. */
export const groundPlace: GroundPlace = { meanC: 8.8, swingK: 8, coldestDay: 35, diffusivityM2PerDay: 0.05 };
export const winterDay = 350;
export const heapFloorDepthM = 2;

const cardinal = { leastC: 5, bestC: 58, mostC: 80 };
/** 1.1 kW of 10 GJ: a heap at its best spends one part in a hundred a day. */
const spendPerS = 1.1e-7;

const wire = (key: string, of: Quantity, offset: number): YardPoint => ({
  key,
  of,
  unit: 'Cel',
  offset,
  noise: 0.04,
  resolution: 0.0625,
});
const other = (
  key: string,
  of: Quantity,
  unit: YardPoint['unit'],
  noise: number,
  resolution: number,
): YardPoint => ({ key, of, unit, offset: 0, noise, resolution });

const longHouse: YardHouse = {
  key: 'long-house',
  node: 'LH-1',
  relays: 8,
  altitudeM: 310,
  shelterK: 0,
  house: {
    lossWPerK: 34,
    airJPerK: 0.15e6,
    massJPerK: 2.2e6,
    airMassWPerK: 90,
    groundWPerK: 6,
    sunM2: 10,
    sunToAir: 0.4,
    ventWPerK: 120,
  },
  start: { airC: 5.5, massC: 6.5 },
  heap: {
    coreShare: 0.89,
    baseJPerK: 0.16e6,
    coreBaseWPerK: 90,
    airWPerK: 10.5,
    groundWPerK: 5,
    spendPerS,
    cardinal,
  },
  heapStart: { coreC: 52, baseC: 49, digestibleJ: 1e10, shellJ: 3e9, massKg: 5500, moisture: 0.6 },
  heapFan: { relay: 1, flowM3PerS: 0.0425, pipeWPerK: 45, fanW: 12, volts: 24 },
  ground: {
    soilJPerK: 28e6,
    farWPerK: 160,
    depthM: 1.5,
    fan: { relay: 2, flowM3PerS: 0.06, pipeWPerK: 60, fanW: 18, volts: 24 },
  },
  mat: { relay: 3, watts: 240 },
  vent: { relay: 4 },
  points: [
    wire('house-air', 'air', 0.06),
    wire('bench-1', 'bench', -0.09),
    wire('bench-2', 'sheltered-bench', 0.12),
    other('humidity', 'humidity', '%RH', 0.4, 0.1),
    wire('outdoors', 'outdoors', 0.03),
    wire('loop-intake', 'heap-intake', 0.05),
    wire('loop-return', 'heap-return', -0.11),
    wire('gate-core', 'heap-core', 0.2),
    wire('gate-base', 'heap-base', -0.14),
    wire('gate-edge', 'heap-edge', 0.1),
    wire('ground', 'soil', 0.05),
    wire('ground-return', 'soil-return', -0.04),
    other('fan-amps', 'fan-current', 'A', 0.008, 0.01),
    other('light', 'light', 'W/m2', 1.2, 1),
  ],
};

const propHouse: YardHouse = {
  key: 'prop-house',
  node: 'PH-1',
  relays: 4,
  altitudeM: 310,
  shelterK: 0,
  house: {
    lossWPerK: 19,
    airJPerK: 0.08e6,
    massJPerK: 1.3e6,
    airMassWPerK: 55,
    groundWPerK: 4,
    sunM2: 5.5,
    sunToAir: 0.4,
    ventWPerK: 70,
  },
  start: { airC: 7, massC: 7.5 },
  heap: {
    coreShare: 0.88,
    baseJPerK: 0.12e6,
    coreBaseWPerK: 70,
    airWPerK: 7.6,
    groundWPerK: 3.8,
    spendPerS,
    cardinal,
  },
  heapStart: { coreC: 56, baseC: 52, digestibleJ: 7.6e9, shellJ: 2.2e9, massKg: 3800, moisture: 0.58 },
  heapFan: { relay: 1, flowM3PerS: 0.033, pipeWPerK: 34, fanW: 9, volts: 24 },
  mat: { relay: 2, watts: 160 },
  vent: { relay: 3 },
  points: [
    wire('house-air', 'air', -0.05),
    wire('bench-1', 'bench', 0.08),
    other('humidity', 'humidity', '%RH', 0.4, 0.1),
    wire('outdoors', 'outdoors', -0.06),
    wire('loop-intake', 'heap-intake', 0.02),
    wire('loop-return', 'heap-return', 0.09),
    wire('yew-core', 'heap-core', -0.15),
    wire('yew-base', 'heap-base', 0.07),
    other('fan-amps', 'fan-current', 'A', 0.008, 0.01),
    other('light', 'light', 'W/m2', 1.2, 1),
  ],
};

const stonebeck: YardHouse = {
  key: 'beck-house',
  node: 'SN-1',
  relays: 4,
  altitudeM: 140,
  shelterK: 1.1,
  house: {
    lossWPerK: 24,
    airJPerK: 0.11e6,
    massJPerK: 1.6e6,
    airMassWPerK: 66,
    groundWPerK: 5,
    sunM2: 7,
    sunToAir: 0.4,
    ventWPerK: 90,
  },
  start: { airC: 5, massC: 6 },
  heap: {
    coreShare: 0.88,
    baseJPerK: 0.13e6,
    coreBaseWPerK: 74,
    airWPerK: 8.4,
    groundWPerK: 4.2,
    spendPerS,
    cardinal,
  },
  heapStart: { coreC: 54, baseC: 50, digestibleJ: 8.2e9, shellJ: 2.4e9, massKg: 4300, moisture: 0.55 },
  heapFan: { relay: 1, flowM3PerS: 0.035, pipeWPerK: 37, fanW: 10, volts: 24 },
  vent: { relay: 2 },
  points: [
    wire('house-air', 'air', 0.04),
    wire('bench-1', 'bench', -0.03),
    other('humidity', 'humidity', '%RH', 0.4, 0.1),
    wire('outdoors', 'outdoors', 0.07),
    wire('loop-intake', 'heap-intake', -0.04),
    wire('loop-return', 'heap-return', 0.06),
    wire('beck-core', 'heap-core', 0.11),
    wire('beck-base', 'heap-base', -0.08),
    other('fan-amps', 'fan-current', 'A', 0.008, 0.01),
  ],
};

export const yardHouses: readonly YardHouse[] = [longHouse, propHouse, stonebeck];

/** The house of a key. @throws Error for a key that the yard does not have. */
export function yardHouse(key: string): YardHouse {
  const found = yardHouses.find((house) => house.key === key);
  if (found === undefined) {
    throw new Error(`the yard has no house "${key}"; it has ${yardHouses.map((h) => h.key).join(', ')}`);
  }
  return found;
}
