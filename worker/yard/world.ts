/**
 * The simulated yard as plain JSON: its state, and how it goes on. Pure: the same world, relays and step
 * give the same next world. Whether a coil may be on is not decided here; see relays.ts.
 */
import type { Coils } from '@/lib/field/frames';
import { fed, turned, type Feed, type HeapState } from '@/lib/physics/heap';
import { yardHouse, yardHouses, type YardHouse } from './catalogue';
import { houseStoredJ, startHouse, stepHouse, type HouseWorld } from './house-world';
import { weatherAt, type Weather } from './weather';

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

export function createWorld(seed: number, startMs: number): World {
  const houses = Object.fromEntries(yardHouses.map((place) => [place.key, startHouse(place)]));
  return { version: 1, seed, ms: startMs, houses, relays: {} };
}

/**
 * The world `dtS` seconds on, with these coils all the while. Any step; over 60 s it is cut up inside.
 * A node that is missing in `relays` has all coils off.
 * @param leaks share of outdoor air in what a house's heap loop brings back, by house; none is a whole pipe
 */
export function stepWorld(
  world: World,
  relays: YardRelays,
  dtS: number,
  leaks: Readonly<Record<string, number>> = {},
): World {
  const houses: Record<string, HouseWorld> = {};
  // All houses ask for the same few moments, and the weather is half of the work of a step.
  const weather = remembered((ms) => weatherAt(world.seed, ms));
  for (const place of yardHouses) {
    const coils = relays[place.node] ?? {};
    const local = (ms: number): Weather => sheltered(weather(ms), place);
    const leak = leaks[place.key] ?? 0;
    houses[place.key] = stepHouse(place, houseWorld(world, place.key), coils, world.ms, dtS, local, leak);
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

/** Heat stored in a house of the world, J above 0 °C. */
export function storedJ(world: World, houseKey: string): number {
  return houseStoredJ(yardHouse(houseKey), houseWorld(world, houseKey));
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
