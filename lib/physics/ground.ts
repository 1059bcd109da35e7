/**
 * The ground: its undisturbed temperature through the year, and the ring of soil round buried tubes that
 * a loop depletes and that recovers from the ground beyond.
 */

export interface GroundPlace {
  /** yearly mean of the surface, °C */
  meanC: number;
  /** half the yearly swing of the surface, K */
  swingK: number;
  /** day of the year on which the surface (not the air) is coldest */
  coldestDay: number;
  /** m² a day: some 0.03 dry sand to 0.08 wet clay */
  diffusivityM2PerDay: number;
}

/**
 * Undisturbed temperature, °C (Kusuda and Achenbach, ASHRAE Trans. 71, 1965), with the lag by depth that
 * some printings leave out.
 *
 * @param depthM 0 to some 10 m
 * @param day of the year, 1 to 366, fractions allowed
 */
export function undisturbedC(place: GroundPlace, depthM: number, day: number): number {
  const damping = depthM * Math.sqrt(Math.PI / (365 * place.diffusivityM2PerDay));
  const lagDays = (damping * 365) / (2 * Math.PI);
  const phase = ((2 * Math.PI) / 365) * (day - place.coldestDay - lagDays);
  return place.meanC - place.swingK * Math.exp(-damping) * Math.cos(phase);
}

/** The soil round a loop's tubes as one lump. */
export interface SoilRing {
  soilJPerK: number;
  /** to the ground beyond, W/K */
  farWPerK: number;
}

/** Heat from the ground beyond into the ring, W. */
export function ringFlowW(ring: SoilRing, ringC: number, farC: number): number {
  return ring.farWPerK * (farC - ringC);
}
