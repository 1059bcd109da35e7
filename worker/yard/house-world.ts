/**
 * One house of the yard with its heap and its soil: what it is at a moment, and how it goes on. The flows
 * of heat are summed up in the same steps as the temperatures, so that the books can be checked.
 */
import type { Coils } from '@/lib/field/frames';
import { pressureAtAltitude } from '@/lib/physics/air';
import { ringFlowW, undisturbedC } from '@/lib/physics/ground';
import { coreJPerK, heapFlows, type HeapState } from '@/lib/physics/heap';
import { houseFlows } from '@/lib/physics/house';
import { advance, approach } from '@/lib/physics/integrate';
import { loopFlow, type Loop } from '@/lib/physics/loop';
import { groundPlace, heapFloorDepthM, winterDay, type YardFan, type YardHouse } from './catalogue';
import type { Weather } from './weather';

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

const farSoilC = (depthM: number): number => undisturbedC(groundPlace, depthM, winterDay);
const underHeapC = farSoilC(heapFloorDepthM);
/** Time constants of a sensor in the return pipe: with the air moving, and in still air. */
const blownS = 150;
const stillS = 1100;

/** A house as it stands at the start of a world. */
export function startHouse(place: YardHouse): HouseWorld {
  return {
    ...place.start,
    heap: { ...place.heapStart },
    ringC: farSoilC(place.ground?.depthM ?? heapFloorDepthM),
    heapReturnC: place.start.airC,
    soilReturnC: place.start.airC,
    flowsJ: named(flowNames.map(() => 0)),
  };
}

/** Heat stored in the lumps of a house, its heap and its soil, J above 0 °C: what the flows must add up to. */
export function houseStoredJ(place: YardHouse, now: HouseWorld): number {
  return (
    place.house.airJPerK * now.airC +
    place.house.massJPerK * now.massC +
    coreJPerK(place.heap, now.heap) * now.heap.coreC +
    place.heap.baseJPerK * now.heap.baseC +
    (place.ground?.soilJPerK ?? 0) * now.ringC
  );
}

export function isOn(coils: Coils, relay: number | undefined): boolean {
  return relay !== undefined && coils[String(relay)] === 'on';
}

/**
 * A house `dtS` seconds on from `ms`, with these coils all the while.
 * @param weatherOf the weather at its place, by epoch ms
 * @param leak share of outdoor air in what the heap's loop brings back: its pipe has come apart outdoors
 */
export function stepHouse(
  place: YardHouse,
  now: HouseWorld,
  coils: Coils,
  ms: number,
  dtS: number,
  weatherOf: (ms: number) => Weather,
  leak = 0,
): HouseWorld {
  const pressurePa = pressureAtAltitude(place.altitudeM);
  const corePerK = coreJPerK(place.heap, now.heap);
  const running = (fan: YardFan | undefined): Loop | undefined =>
    fan !== undefined && isOn(coils, fan.relay) ? { ...fan, pressurePa } : undefined;
  const heapLoop = running(place.heapFan);
  const soilLoop = running(place.ground?.fan);
  const farC = farSoilC(place.ground?.depthM ?? heapFloorDepthM);
  const matW = isOn(coils, place.mat?.relay) ? (place.mat?.watts ?? 0) : 0;
  const isVentOpen = isOn(coils, place.vent?.relay);

  const rates = (state: readonly number[], timeS: number): number[] => {
    // By index: unpacking by pattern took a third of the time of a step.
    const airC = state[0] ?? 0;
    const massC = state[1] ?? 0;
    const coreC = state[2] ?? 0;
    const baseC = state[3] ?? 0;
    const ringC = state[4] ?? 0;
    const digestibleJ = state[5] ?? 0;
    const weather = weatherOf(timeS * 1000);
    const around = {
      outdoorsC: weather.tempC,
      groundC: underHeapC,
      sunWPerM2: weather.sunWPerM2,
      isVentOpen,
    };
    const house = houseFlows(place.house, { airC, massC }, around);
    const heap = heapFlows(place.heap, { ...now.heap, coreC, baseC, digestibleJ }, weather.tempC, underHeapC);
    const fromHeap = heapLoop && loopFlow(heapLoop, airC, baseC);
    const fromSoil = soilLoop && loopFlow(soilLoop, airC, ringC);
    const farW = place.ground === undefined ? 0 : ringFlowW(place.ground, ringC, farC);
    const leakW = leak * (fromHeap?.capacityWPerK ?? 0) * ((fromHeap?.returnC ?? 0) - weather.tempC);
    const loopsW = (fromHeap?.intoHouseW ?? 0) + (fromSoil?.intoHouseW ?? 0) - leakW;

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
      -house.airToOutdoorsW - leakW,
      -house.airToVentW,
      -house.massToGroundW,
      house.sunToAirW + house.sunToMassW,
      matW,
      (heapLoop?.fanW ?? 0) + (soilLoop?.fanW ?? 0),
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
  const end = advance(start, ms / 1000, dtS, rates);
  const [airC = 0, massC = 0, coreC = 0, baseC = 0, ringC = 0, digestibleJ = 0, ...flows] = end;
  const lagged = (felt: number, loop: Loop | undefined, mediumC: number, share: number): number => {
    if (loop === undefined) return approach(felt, 0.85 * airC + 0.15 * mediumC, dtS, stillS);
    const { returnC } = loopFlow(loop, airC, mediumC);
    const mixedC = share === 0 ? returnC : returnC + share * (weatherOf(ms + dtS * 1000).tempC - returnC);
    return approach(felt, mixedC, dtS, blownS);
  };
  return {
    airC,
    massC,
    heap: { ...now.heap, coreC, baseC, digestibleJ },
    ringC,
    heapReturnC: lagged(now.heapReturnC, heapLoop, baseC, leak),
    soilReturnC: lagged(now.soilReturnC, soilLoop, ringC, 0),
    flowsJ: named(flows),
  };
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
