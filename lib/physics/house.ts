/**
 * A house as two lumps: its air with all light things, and its mass (beds, benches, water). The lumps of
 * one house differ by less than the sun and a draught do between its corners, so this is good to about
 * 1 K at a bench; it says nothing of layers or corners.
 */

export interface House {
  /** to outdoors through glazing and cracks, W/K */
  lossWPerK: number;
  airJPerK: number;
  massJPerK: number;
  airMassWPerK: number;
  /** from the mass to the ground, W/K */
  groundWPerK: number;
  /** area that takes in the sun on a level surface, transmission counted in, m² */
  sunM2: number;
  /** share of that sun which the air takes up at once, 0 to 1; the rest warms the mass */
  sunToAir: number;
  /** added loss while the vent is open, W/K */
  ventWPerK: number;
}

export interface HouseState {
  airC: number;
  massC: number;
}

export interface HouseAround {
  outdoorsC: number;
  groundC: number;
  sunWPerM2: number;
  isVentOpen: boolean;
}

/** Flows of heat, W. */
export interface HouseFlows {
  airToOutdoorsW: number;
  airToVentW: number;
  airToMassW: number;
  massToGroundW: number;
  sunToAirW: number;
  sunToMassW: number;
}

/** The flows of a house in its state: linear in the differences of temperature. */
export function houseFlows(house: House, state: HouseState, around: HouseAround): HouseFlows {
  const lift = state.airC - around.outdoorsC;
  const sunW = house.sunM2 * around.sunWPerM2;
  return {
    airToOutdoorsW: house.lossWPerK * lift,
    airToVentW: around.isVentOpen ? house.ventWPerK * lift : 0,
    airToMassW: house.airMassWPerK * (state.airC - state.massC),
    massToGroundW: house.groundWPerK * (state.massC - around.groundC),
    sunToAirW: house.sunToAir * sunW,
    sunToMassW: (1 - house.sunToAir) * sunW,
  };
}

/**
 * Loss of changed air, W/K: ρ·cp·V·n/3600.
 * @example infiltrationWPerK(100, 1, 1.2041) is 33.65: the trade's 0.33 W/K a m³ and change
 */
export function infiltrationWPerK(volumeM3: number, changesPerH: number, densityKgPerM3: number): number {
  return (densityKgPerM3 * 1006 * volumeM3 * changesPerH) / 3600;
}

/** Loss through surfaces, W/K: Σ U·A. */
export function conductionWPerK(faces: ReadonlyArray<{ areaM2: number; uWPerM2K: number }>): number {
  return faces.reduce((sum, face) => sum + face.areaM2 * face.uWPerM2K, 0);
}

/** Temperature at which a house stands under a steady heat, °C: outdoors + Q / UA. */
export function steadyC(outdoorsC: number, heatW: number, lossWPerK: number): number {
  return outdoorsC + heatW / lossWPerK;
}
