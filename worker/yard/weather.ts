/**
 * A cold upland winter that never ends: weather as a pure function of absolute time and a seed.
 *
 * Air masses follow each other with a front between them; each has its own warmth, cloud and dampness.
 * Clear ones swing more by day and night and are the cold ones. The sun is that of early January at 54° N in
 * every month, on purpose: the yard is there to show winter nights whenever it is run.
 */
import { eased, smooth, uniform } from './noise';

export interface Weather {
  tempC: number;
  /** 0 to 1 */
  relativeHumidity: number;
  /** on a level surface, W/m² */
  sunWPerM2: number;
  /** 0 overcast to 1 clear */
  clearness: number;
}

const hourMs = 3_600_000;
const dayMs = 24 * hourMs;

/** One air mass in each slot; its front comes somewhere in the slot's first half and takes 2 to 6 h. */
const slotMs = 2.25 * dayMs;

const latitudeRad = (54.2 * Math.PI) / 180;
const longitudeDeg = -2.3;
const declinationRad = (-22.3 * Math.PI) / 180;

interface AirMass {
  tempC: number;
  clearness: number;
  damp: number;
}

function airMass(seed: number, slot: number): AirMass {
  const clearness = uniform(seed, 'clear', slot) ** 1.2;
  const chill = uniform(seed, 'chill', slot);
  return {
    // Clear air in winter is mostly the cold air of a high; cloud comes with the mild west.
    tempC: -0.7 - 5.8 * chill ** 1.2 - 2.4 * clearness,
    clearness,
    damp: uniform(seed, 'damp', slot),
  };
}

/** The mean of the air mass at a moment, blended over a front. */
function airMassAt(seed: number, ms: number): AirMass {
  const slot = Math.floor(ms / slotMs);
  const frontMs = slot * slotMs + uniform(seed, 'front', slot) * (slotMs / 2);
  const spanMs = (2 + 4 * uniform(seed, 'span', slot)) * hourMs;
  const share = eased((ms - frontMs) / spanMs);
  const before = airMass(seed, slot - 1);
  const now = airMass(seed, slot);
  const blend = (a: number, b: number): number => a + (b - a) * share;
  return {
    tempC: blend(before.tempC, now.tempC),
    clearness: blend(before.clearness, now.clearness),
    damp: blend(before.damp, now.damp),
  };
}

/** −1 before sunrise to 1 in the early afternoon; falls more slowly than it rises. */
function dayShape(hour: number): number {
  const angle = ((hour - 14.2) * 2 * Math.PI) / 24;
  return (Math.cos(angle) + 0.3 * Math.cos(2 * angle - 0.5)) / 1.16;
}

function sineOfSun(solarHour: number): number {
  const hourAngle = ((solarHour - 12) * Math.PI) / 12;
  return (
    Math.sin(latitudeRad) * Math.sin(declinationRad) +
    Math.cos(latitudeRad) * Math.cos(declinationRad) * Math.cos(hourAngle)
  );
}

/**
 * The weather at a moment.
 * @param seed any whole number; the same seed gives the same winter for ever
 * @param ms epoch milliseconds
 */
export function weatherAt(seed: number, ms: number): Weather {
  const mass = airMassAt(seed, ms);
  const patchy = 0.25 * smooth(seed, 'cloud', ms, 1.7 * hourMs);
  const clearness = Math.min(1, Math.max(0, mass.clearness + patchy));
  const solarHour = (((ms / hourMs + longitudeDeg / 15) % 24) + 24) % 24;

  // The swing follows the mass and not the patch, else each cloud would move the whole day's curve.
  const swingC = 1 + 3.1 * mass.clearness;
  const gustsC =
    0.5 * smooth(seed, 'gust', ms, 1.3 * hourMs) + 0.25 * smooth(seed, 'flutter', ms, 0.4 * hourMs);
  const driftC = 1.4 * smooth(seed, 'drift', ms, 0.9 * dayMs);
  const tempC = mass.tempC + swingC * dayShape(solarHour) + driftC + gustsC;

  // Clear-sky beam and sky light on the level after Haurwitz (1945): 1098·sin h·exp(−0.057 / sin h).
  const sine = sineOfSun(solarHour);
  const clearSky = sine > 0.01 ? 1098 * sine * Math.exp(-0.057 / sine) : 0;
  const sunWPerM2 = clearSky * (0.22 + 0.78 * clearness);

  const humid = 0.9 + 0.08 * mass.damp - 0.1 * mass.clearness - 0.06 * mass.clearness * dayShape(solarHour);
  const relativeHumidity = Math.min(
    0.995,
    Math.max(0.4, humid + 0.03 * smooth(seed, 'humid', ms, 2 * hourMs)),
  );
  return { tempC, relativeHumidity, sunWPerM2, clearness };
}
