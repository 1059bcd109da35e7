/** Places whose temperature is known without a thermometer: melting ice, and water that boils. */
import { pressureAtAltitude, saturationPressure } from '@/lib/physics/air';

export interface KnownPlace {
  /** °C */
  reference: number;
  /** K */
  referenceSd: number;
}

/**
 * K, deviation of a bath of crushed ice and water in a flask, stirred. Made of distilled water by ASTM E563 it holds 0.002 K;
 * of tap water, with a probe as thick as a pencil, 0.1 K is common practice, no source.
 */
export const ICE_SD_K = 0.1;
/** hPa, deviation of the weather about the standard atmosphere: common practice, no source. */
const WEATHER_SD_HPA = 10;
/**
 * °C at which water boils at a pressure: where its saturated vapour has it (ASHRAE Fundamentals 2017, chapter 1, eq. 6).
 * @param pressurePa 45 000 to 110 000
 * @example boilingPoint(100_000) is 99.6 (IAPWS-IF97: 372.755919 K at 0.1 MPa)
 */
export function boilingPoint(pressurePa: number): number {
  let [low, high] = [60, 110];
  for (let step = 0; step < 40; step += 1) {
    const middle = (low + high) / 2;
    if (saturationPressure(middle) < pressurePa) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** What is true at a place, with its deviation. @param altitudeM of the house; the weather is in the deviation */
export function referenceOf(at: 'ice' | 'boiling', altitudeM: number): KnownPlace {
  if (at === 'ice') return { reference: 0, referenceSd: ICE_SD_K };
  const pressure = pressureAtAltitude(altitudeM);
  const up = boilingPoint(pressure + WEATHER_SD_HPA * 100);
  const down = boilingPoint(pressure - WEATHER_SD_HPA * 100);
  return { reference: boilingPoint(pressure), referenceSd: (up - down) / 2 };
}
