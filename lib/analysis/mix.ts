/**
 * What a mix is: its carbon to nitrogen and its water, from the masses of carbon, nitrogen and water in it. Ratios are
 * never averaged: 10 kg at 19 : 1 and 10 kg at 67 : 1 are no 43 : 1 unless both bring as much nitrogen.
 *
 * Formulae: Cornell Composting, Science and Engineering (C:N and moisture of a mix); 7 CFR 205.203(c)(2) for 25 to 40 : 1.
 */

/** A material as it comes. */
export interface Stuff {
  /** Water as a share of the wet mass, 0 to 1. */
  moisture: number;
  /** Carbon and nitrogen as shares of the dry mass, 0 to 1. */
  carbon: number;
  nitrogen: number;
}
export type Part = Stuff & { massKg: number };

export interface Mix {
  massKg: number;
  waterKg: number;
  carbonKg: number;
  nitrogenKg: number;
  /** Share of the wet mass; null for nothing at all. */
  moisture: number | null;
  /** Kilograms of carbon to one of nitrogen; null without nitrogen. */
  cn: number | null;
}

export const WATER: Stuff = { moisture: 1, carbon: 0, nitrogen: 0 };

/** 1 L of water is 1 kg, to within what a hose can tell. */
export function mixOf(parts: readonly Part[], addedWaterL = 0): Mix {
  const all = [...parts, { ...WATER, massKg: addedWaterL }];
  const sum = (of: (part: Part) => number) => all.reduce((total, part) => total + of(part), 0);
  const massKg = sum((part) => part.massKg);
  const waterKg = sum((part) => part.massKg * part.moisture);
  const carbonKg = sum((part) => part.massKg * (1 - part.moisture) * part.carbon);
  const nitrogenKg = sum((part) => part.massKg * (1 - part.moisture) * part.nitrogen);
  return {
    ...{ massKg, waterKg, carbonKg, nitrogenKg },
    moisture: massKg > 0 ? waterKg / massKg : null,
    cn: nitrogenKg > 0 ? carbonKg / nitrogenKg : null,
  };
}

/** How much of one material brings a mix to one goal, or that none of it does. */
export type Addition = { kind: 'add'; massKg: number } | { kind: 'there' } | { kind: 'cannot' };

const THERE_SHARE = 0.001;

/**
 * Kilograms of `adding` that bring the mix to `target` moisture (share of the wet mass).
 * @returns `cannot` where the material lies on the same side of the goal as the mix, so that more of it leads away
 * @example 10 kg of grass at 77 % come to 60 % with 6.8 kg of leaves at 35 %
 */
export function addForMoisture(mix: Mix, target: number, adding: Stuff): Addition {
  if (mix.moisture === null) return { kind: 'cannot' };
  return solved(mix.waterKg - target * mix.massKg, target - adding.moisture, THERE_SHARE * mix.massKg);
}

/** Kilograms of `adding` that bring the mix to `target` carbon to nitrogen. */
export function addForCn(mix: Mix, target: number, adding: Stuff): Addition {
  if (mix.cn === null) return { kind: 'cannot' };
  const dry = 1 - adding.moisture;
  const missing = mix.carbonKg - target * mix.nitrogenKg;
  return solved(missing, dry * (target * adding.nitrogen - adding.carbon), THERE_SHARE * mix.carbonKg);
}

/** x of `x · each = missing`, where both point the same way. */
function solved(missing: number, each: number, negligible: number): Addition {
  if (Math.abs(missing) <= negligible) return { kind: 'there' };
  const massKg = missing / each;
  return Number.isFinite(massKg) && massKg > 0 ? { kind: 'add', massKg } : { kind: 'cannot' };
}

export function withAdded(mix: Mix, adding: Stuff, massKg: number, waterL = 0): Mix {
  const own: Part = { ...WATER, massKg: 0 };
  const added = mixOf([own, { ...adding, massKg }], waterL);
  const total = {
    massKg: mix.massKg + added.massKg,
    waterKg: mix.waterKg + added.waterKg,
    carbonKg: mix.carbonKg + added.carbonKg,
    nitrogenKg: mix.nitrogenKg + added.nitrogenKg,
  };
  return {
    ...total,
    moisture: total.massKg > 0 ? total.waterKg / total.massKg : null,
    cn: total.nitrogenKg > 0 ? total.carbonKg / total.nitrogenKg : null,
  };
}

export interface Goals {
  cn: number;
  moisture: number;
}

export interface Advice {
  forMoisture: Addition;
  forCn: Addition;
  /** What the one goal's amount does to the other. */
  cnAtMoisture: number | null;
  moistureAtCn: number | null;
  /** One amount that meets both, with water where that is what is missing then; null where there is none. */
  both: { massKg: number; waterL: number } | null;
}

/**
 * What to add of one material for either goal, and whether both can be met. One unknown cannot meet two goals but by
 * chance; with water as a second it can, where the mix with the material comes out drier than wanted.
 */
export function adviseAddition(mix: Mix, goals: Goals, adding: Stuff): Advice {
  const forMoisture = addForMoisture(mix, goals.moisture, adding);
  const forCn = addForCn(mix, goals.cn, adding);
  const atMoisture = massOf(forMoisture);
  const atCn = massOf(forCn);
  const withCn = atCn === null ? null : withAdded(mix, adding, atCn);
  const water = withCn === null ? null : addForMoisture(withCn, goals.moisture, WATER);
  const waterL = water === null ? null : massOf(water);
  return {
    ...{ forMoisture, forCn },
    cnAtMoisture: atMoisture === null ? null : withAdded(mix, adding, atMoisture).cn,
    moistureAtCn: withCn?.moisture ?? null,
    both: atCn === null || waterL === null ? null : { massKg: atCn, waterL },
  };
}

function massOf(addition: Addition): number | null {
  if (addition.kind === 'cannot') return null;
  return addition.kind === 'add' ? addition.massKg : 0;
}

/** How far a figure of a material may be off: its standard deviation. */
export interface StuffSd {
  moisture: number;
  carbon: number;
  nitrogen: number;
}

/**
 * The standard deviation of C:N and moisture, from those of the materials, each off on its own (first order: how far the
 * mix moves when one figure moves by its sd, added in squares).
 */
export function mixSd(
  parts: readonly (Part & { sd: StuffSd })[],
  addedWaterL = 0,
): { moisture: number | null; cn: number | null } {
  const mix = mixOf(parts, addedWaterL);
  let [moisture2, cn2] = [0, 0];
  for (const [place, part] of parts.entries())
    for (const figure of ['moisture', 'carbon', 'nitrogen'] as const) {
      const moved = parts.map((one, at) =>
        at === place ? { ...one, [figure]: Math.min(0.999, one[figure] + part.sd[figure]) } : one,
      );
      const other = mixOf(moved, addedWaterL);
      moisture2 += ((other.moisture ?? 0) - (mix.moisture ?? 0)) ** 2;
      cn2 += ((other.cn ?? 0) - (mix.cn ?? 0)) ** 2;
    }
  return {
    moisture: mix.moisture === null ? null : Math.sqrt(moisture2),
    cn: mix.cn === null ? null : Math.sqrt(cn2),
  };
}
