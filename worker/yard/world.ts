/**
 * The simulated yard as plain JSON: its state, and how it goes on. Pure: the same world, relays and step
 * give the same next world. Whether a coil may be on is not decided here; see relays.ts.
 */
import { pressureAtAltitude } from '@/lib/physics/air';
import { ringFlowW, undisturbedC } from '@/lib/physics/ground';
import { coreJPerK, fed, heapFlows, turned, type Feed, type HeapState } from '@/lib/physics/heap';
import { houseFlows } from '@/lib/physics/house';
import { advance, approach } from '@/lib/physics/integrate';
import { loopFlow } from '@/lib/physics/loop';
import type { Coils } from '@/lib/field/frames';
import { groundPlace, heapFloorDepthM, winterDay, yardHouse, yardHouses } from './catalogue';
import type { YardFan, YardHouse } from './catalogue';
import { weatherAt, type Weather } from './weather';

/** Running totals of heat, J, since the world was made; the signs are those of the lumps. */
export const flowNames = [
  'outdoors',
  'vent',
  'houseGround',
  'sun',
  'mat',
  'fans',
  'generated',
  'heapAir',
  'heapGround',
  'farSoil',
] as const;
export type FlowName = (typeof flowNames)[number];

export interface HouseWorld {
  airC: number;
  massC: number;
  heap: HeapState;
  ringC: number;
  /** what the sensors in the return pipes feel, which lags behind the air */
  heapReturnC: number;
  soilReturnC: number;
  flowsJ: Record<FlowName, number>;
}

export interface World {
  version: 1;
  seed: number;
  /** epoch milliseconds */
  ms: number;
  houses: Record<string, HouseWorld>;
  /** coils as they were in the last step, by node, for what the sensors see */
  relays: YardRelays;
}

/** Coils by node key, then by relay number. */
export type YardRelays = Record<string, Coils>;

const farSoilC = (depthM: number): number => undisturbedC(groundPlace, depthM, winterDay);
const underHeapC = farSoilC(heapFloorDepthM);
/** Time constants of a sensor in the return pipe: with the air moving, and in still air. */
const blownS = 150;
const stillS = 1100;

export function createWorld(seed: number, startMs: number): World {
  const houses: Record<string, HouseWorld> = {};
  for (const place of yardHouses) {
    const ringC = farSoilC(place.ground?.depthM ?? heapFloorDepthM);
    houses[place.key] = {
      ...place.start,
      heap: { ...place.heapStart },
      ringC,
      heapReturnC: place.start.airC,
      soilReturnC: place.start.airC,
      flowsJ: noFlows(),
    };
  }
  return { version: 1, seed, ms: startMs, houses, relays: {} };
}

/**
 * The world `dtS` seconds on, with these coils all the while. Any step; over 60 s it is cut up inside.
 * A node that is missing in `relays` has all coils off.
 */
export function stepWorld(world: World, relays: YardRelays, dtS: number): World {
  const houses: Record<string, HouseWorld> = {};
  // All houses ask for the same few moments, and the weather is half of the work of a step.
  const weather = remembered((ms) => weatherAt(world.seed, ms));
  for (const place of yardHouses) {
    houses[place.key] = stepHouse(world, place, relays[place.node] ?? {}, dtS, weather);
  }
  return { ...world, ms: world.ms + dtS * 1000, houses, relays };
}

export function houseWorld(world: World, houseKey: string): HouseWorld {
  const found = world.houses[houseKey];
  if (found === undefined) throw new Error(`this world has no house "${houseKey}"`);
  return found;
}

export function localWeather(world: World, place: YardHouse, ms: number): Weather {
  return sheltered(weatherAt(world.seed, ms), place);
}

function sheltered(weather: Weather, place: YardHouse): Weather {
  return { ...weather, tempC: weather.tempC + place.shelterK };
}

function remembered(ask: (ms: number) => Weather): (ms: number) => Weather {
  const known = new Map<number, Weather>();
  return (ms) => {
    const found = known.get(ms) ?? ask(ms);
    known.set(ms, found);
    return found;
  };
}

/** Heat stored in the lumps of a house, its heap and its soil, J above 0 °C: what the flows must add up to. */
export function storedJ(world: World, houseKey: string): number {
  const place = yardHouse(houseKey);
  const now = houseWorld(world, houseKey);
  return (
    place.house.airJPerK * now.airC +
    place.house.massJPerK * now.massC +
    coreJPerK(place.heap, now.heap) * now.heap.coreC +
    place.heap.baseJPerK * now.heap.baseC +
    (place.ground?.soilJPerK ?? 0) * now.ringC
  );
}

export function feedHeap(world: World, houseKey: string, feed: Feed): World {
  return withHeap(world, houseKey, (heap) => fed(yardHouse(houseKey).heap, heap, feed));
}

export function turnHeap(world: World, houseKey: string): World {
  const { tempC } = localWeather(world, yardHouse(houseKey), world.ms);
  return withHeap(world, houseKey, (heap) => turned(heap, tempC));
}

function withHeap(world: World, houseKey: string, change: (heap: HeapState) => HeapState): World {
  const now = houseWorld(world, houseKey);
  return { ...world, houses: { ...world.houses, [houseKey]: { ...now, heap: change(now.heap) } } };
}

export function isOn(coils: Coils, relay: number | undefined): boolean {
  return relay !== undefined && coils[String(relay)] === 'on';
}

function stepHouse(
  world: World,
  place: YardHouse,
  coils: Coils,
  dtS: number,
  weatherOf: (ms: number) => Weather,
): HouseWorld {
  const now = houseWorld(world, place.key);
  const pressurePa = pressureAtAltitude(place.altitudeM);
  const corePerK = coreJPerK(place.heap, now.heap);
  const heapFan = isOn(coils, place.heapFan.relay) ? place.heapFan : undefined;
  const soilFan =
    place.ground !== undefined && isOn(coils, place.ground.fan.relay) ? place.ground.fan : undefined;
  const matW = isOn(coils, place.mat?.relay) ? (place.mat?.watts ?? 0) : 0;
  const isVentOpen = isOn(coils, place.vent?.relay);
  const draw = (fan: YardFan | undefined, airC: number, mediumC: number) =>
    fan === undefined ? undefined : loopFlow({ ...fan, pressurePa }, airC, mediumC);

  const rates = (state: readonly number[], timeS: number): number[] => {
    const [airC = 0, massC = 0, coreC = 0, baseC = 0, ringC = 0, digestibleJ = 0] = state;
    const weather = sheltered(weatherOf(timeS * 1000), place);
    const around = {
      outdoorsC: weather.tempC,
      groundC: underHeapC,
      sunWPerM2: weather.sunWPerM2,
      isVentOpen,
    };
    const house = houseFlows(place.house, { airC, massC }, around);
    const heap = heapFlows(place.heap, { ...now.heap, coreC, baseC, digestibleJ }, weather.tempC, underHeapC);
    const fromHeap = draw(heapFan, airC, baseC);
    const fromSoil = draw(soilFan, airC, ringC);
    const farW =
      place.ground === undefined ? 0 : ringFlowW(place.ground, ringC, farSoilC(place.ground.depthM));
    const loopsW = (fromHeap?.intoHouseW ?? 0) + (fromSoil?.intoHouseW ?? 0);

    const airW = house.sunToAirW + loopsW - house.airToOutdoorsW - house.airToVentW - house.airToMassW;
    const massW = house.airToMassW + house.sunToMassW + matW - house.massToGroundW;
    const coreW = heap.generatedW - heap.coreToAirW - heap.coreToBaseW;
    const baseW = heap.coreToBaseW - heap.baseToGroundW - (fromHeap?.fromMediumW ?? 0);
    const ringW = farW - (fromSoil?.fromMediumW ?? 0);
    return [
      airW / place.house.airJPerK,
      massW / place.house.massJPerK,
      coreW / corePerK,
      baseW / place.heap.baseJPerK,
      place.ground === undefined ? 0 : ringW / place.ground.soilJPerK,
      -heap.generatedW,
      -house.airToOutdoorsW,
      -house.airToVentW,
      -house.massToGroundW,
      house.sunToAirW + house.sunToMassW,
      matW,
      (heapFan?.fanW ?? 0) + (soilFan?.fanW ?? 0),
      heap.generatedW,
      -heap.coreToAirW,
      -heap.baseToGroundW,
      farW,
    ];
  };

  const totals = flowNames.map((name) => now.flowsJ[name]);
  const start = [
    now.airC,
    now.massC,
    now.heap.coreC,
    now.heap.baseC,
    now.ringC,
    now.heap.digestibleJ,
    ...totals,
  ];
  const end = advance(start, world.ms / 1000, dtS, rates);
  const [airC = 0, massC = 0, coreC = 0, baseC = 0, ringC = 0, digestibleJ = 0, ...flows] = end;
  const lagged = (felt: number, fan: YardFan | undefined, mediumC: number): number => {
    const moving = draw(fan, airC, mediumC);
    return moving === undefined
      ? approach(felt, 0.85 * airC + 0.15 * mediumC, dtS, stillS)
      : approach(felt, moving.returnC, dtS, blownS);
  };
  return {
    airC,
    massC,
    heap: { ...now.heap, coreC, baseC, digestibleJ },
    ringC,
    heapReturnC: lagged(now.heapReturnC, heapFan, baseC),
    soilReturnC: lagged(now.soilReturnC, soilFan, ringC),
    flowsJ: named(flows),
  };
}

function noFlows(): Record<FlowName, number> {
  return named(flowNames.map(() => 0));
}

function named(flows: readonly number[]): Record<FlowName, number> {
  const at = (name: FlowName): number => flows[flowNames.indexOf(name)] ?? 0;
  return {
    outdoors: at('outdoors'),
    vent: at('vent'),
    houseGround: at('houseGround'),
    sun: at('sun'),
    mat: at('mat'),
    fans: at('fans'),
    generated: at('generated'),
    heapAir: at('heapAir'),
    heapGround: at('heapGround'),
    farSoil: at('farSoil'),
  };
}
