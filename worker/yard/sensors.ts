/**
 * What the yard's sensors show: the truth of the world with each one's own error, noise and smallest step.
 * A pure function of the world and the moment, so that a re-sent reading is the same reading.
 */
import { humidityRatio, pressureAtAltitude, relativeHumidity } from '@/lib/physics/air';
import { yardHouse, type Quantity, type YardHouse, type YardPoint } from './catalogue';
import { normal } from './noise';
import type { Weather } from './weather';
import { isOn, type HouseWorld } from './house-world';
import { houseWorld, localWeather, type World } from './world';

export interface SensorReading {
  key: string;
  unit: YardPoint['unit'];
  value: number;
}

/** All readings of a house's node at a moment, epoch ms. */
export function sensorReadings(world: World, houseKey: string, ms: number): SensorReading[] {
  const place = yardHouse(houseKey);
  const now = houseWorld(world, houseKey);
  const weather = localWeather(world, place, ms);
  return place.points.map((point) => {
    const noise = point.noise * normal(world.seed, `${place.node}/${point.key}`, Math.round(ms / 1000));
    const shown = truth(point.of, world, place, now, weather) + point.offset + noise;
    return { key: point.key, unit: point.unit, value: ended(point, rounded(shown, point.resolution)) };
  });
}

function truth(of: Quantity, world: World, place: YardHouse, now: HouseWorld, weather: Weather): number {
  const coils = world.relays[place.node] ?? {};
  switch (of) {
    case 'air':
      return now.airC;
    // A bench stands between the air and the warm mass under it; the sheltered one is further from the glass.
    case 'bench':
      return 0.75 * now.airC + 0.25 * now.massC - 0.25;
    case 'sheltered-bench':
      return 0.55 * now.airC + 0.45 * now.massC;
    case 'humidity':
      return 100 * houseHumidity(place, now, weather);
    case 'outdoors':
      return weather.tempC;
    case 'heap-intake':
      return now.airC;
    case 'heap-return':
      return now.heapReturnC;
    case 'heap-core':
      return now.heap.coreC;
    case 'heap-base':
      return now.heap.baseC;
    case 'heap-edge':
      return weather.tempC + 0.45 * (now.heap.coreC - weather.tempC);
    case 'soil':
      return now.ringC;
    case 'soil-return':
      return now.soilReturnC;
    case 'fan-current':
      return isOn(coils, place.heapFan.relay) ? place.heapFan.fanW / place.heapFan.volts : 0;
    case 'light':
      return 0.7 * weather.sunWPerM2;
  }
}

/**
 * Relative humidity in the house, 0 to 1: outdoor air with what plants and soil give it, dried again by the
 * cold glass, on which all above its own saturation condenses.
 */
function houseHumidity(place: YardHouse, now: HouseWorld, weather: Weather): number {
  const pressurePa = pressureAtAltitude(place.altitudeM);
  const given = 0.0026 + 2e-6 * weather.sunWPerM2;
  const glassC = weather.tempC + 0.62 * (now.airC - weather.tempC);
  const held = Math.min(
    humidityRatio(weather.tempC, weather.relativeHumidity, pressurePa) + given,
    humidityRatio(glassC, 1, pressurePa),
  );
  return Math.min(1, relativeHumidity(now.airC, held, pressurePa));
}

function rounded(value: number, resolution: number): number {
  // Cut to six places, so that a step of 0.1 prints as it is sent.
  return Number((Math.round(value / resolution) * resolution).toFixed(6));
}

/** Ends of a scale: a current clamp and a light cell show nothing under 0, a humidity cell nothing over 100. */
function ended(point: YardPoint, value: number): number {
  if (point.unit === 'Cel') return value;
  return point.unit === '%RH' ? Math.min(100, Math.max(0, value)) : Math.max(0, value);
}
