/**
 * A compost heap as two lumps: the core, which makes the heat, and the base, the bed round the pipe that
 * a loop draws from. Generation falls with temperature under its optimum, so a heap that is drawn on too
 * hard cools the faster the colder it gets: that is the behaviour this model is for. It is no model of
 * chemistry: one digestible store, first order, and a cold shell that only turning brings into reach.
 *
 * Good for a heap of some tonnes between 5 and 75 °C; figures within some 30 %.
 */

export interface Heap {
  /** share of the heap's mass that is core, 0 to 1 */
  coreShare: number;
  baseJPerK: number;
  coreBaseWPerK: number;
  /** core to outdoor air through cover and sides, W/K */
  airWPerK: number;
  /** base to ground, W/K */
  groundWPerK: number;
  /** share of the digestible energy that is spent each second at the best temperature and moisture */
  spendPerS: number;
  cardinal: CardinalTemperatures;
}

export interface HeapState {
  coreC: number;
  baseC: number;
  /** digestible energy in the core, J */
  digestibleJ: number;
  /** digestible energy in the cold shell, out of reach until the heap is turned, J */
  shellJ: number;
  massKg: number;
  /** water as a share of the wet mass, 0 to 1 */
  moisture: number;
}

export interface CardinalTemperatures {
  leastC: number;
  bestC: number;
  mostC: number;
}

export interface HeapFlows {
  generatedW: number;
  coreToAirW: number;
  coreToBaseW: number;
  baseToGroundW: number;
}

/**
 * Activity by temperature, 0 to 1: the cardinal temperature model with inflection of Rosso, Lobry and
 * Flandrois (J. Theor. Biol. 162, 1993). Nothing at and outside the cardinal temperatures: the bare formula turns
 * positive again below the least, and a frozen heap would heat itself.
 */
export function temperatureActivity(tempC: number, { leastC, bestC, mostC }: CardinalTemperatures): number {
  if (tempC <= leastC || tempC >= mostC) return 0;
  const above = tempC - leastC;
  const span = bestC - leastC;
  const bottom = span * (span * (tempC - bestC) - (bestC - mostC) * (bestC + leastC - 2 * tempC));
  return ((tempC - mostC) * above ** 2) / bottom;
}

/**
 * Activity by moisture, 0 to 1, from the share of water in the wet mass (Haug, The Practical Handbook of
 * Compost Engineering, 1993). Too wet is not held against a heap here: that is a matter of its pores.
 */
export function moistureActivity(moisture: number): number {
  return 1 / (Math.exp(-17.684 * moisture + 7.0622) + 1);
}

/** Specific heat of wet compost, J/(kg·K): its water, and dry matter of 1250. */
export function compostJPerKgK(moisture: number): number {
  return moisture * 4186 + (1 - moisture) * 1250;
}

/** Heat capacity of the core, J/K. */
export function coreJPerK(heap: Heap, state: Pick<HeapState, 'massKg' | 'moisture'>): number {
  return heap.coreShare * state.massKg * compostJPerKgK(state.moisture);
}

/** Heat that the core makes, W. */
export function generationW(heap: Heap, state: HeapState): number {
  const activity = temperatureActivity(state.coreC, heap.cardinal) * moistureActivity(state.moisture);
  return heap.spendPerS * Math.max(0, state.digestibleJ) * activity;
}

/** The flows of a heap in its state, without what a loop draws from its base. */
export function heapFlows(heap: Heap, state: HeapState, outdoorsC: number, groundC: number): HeapFlows {
  return {
    generatedW: generationW(heap, state),
    coreToAirW: heap.airWPerK * (state.coreC - outdoorsC),
    coreToBaseW: heap.coreBaseWPerK * (state.coreC - state.baseC),
    baseToGroundW: heap.groundWPerK * (state.baseC - groundC),
  };
}

/** What is added to a heap. */
export interface Feed {
  massKg: number;
  moisture: number;
  /** digestible energy a kg of dry matter, J; published recoveries are some 1 to 7 MJ */
  digestibleJPerKgDry: number;
  tempC: number;
}

/** A heap that has been fed: heavier, cooler by what was put in, with more to digest. Heat is conserved. */
export function fed(heap: Heap, state: HeapState, feed: Feed): HeapState {
  const massKg = state.massKg + feed.massKg;
  const moisture = (state.massKg * state.moisture + feed.massKg * feed.moisture) / massKg;
  const before = coreJPerK(heap, state);
  const after = coreJPerK(heap, { massKg, moisture });
  return {
    ...state,
    massKg,
    moisture,
    coreC: (before * state.coreC + (after - before) * feed.tempC) / after,
    digestibleJ: state.digestibleJ + feed.massKg * (1 - feed.moisture) * feed.digestibleJPerKgDry,
  };
}

/** Share of the shell that one turning brings into the core, and of the core's lift that it loses to the air. */
const turnedInShare = 0.5;
const turnedLossShare = 0.08;

/** A heap that has been turned: base as warm as the core, both cooler, and half of its shell in reach. */
export function turned(state: HeapState, outdoorsC: number): HeapState {
  const coreC = state.coreC - turnedLossShare * (state.coreC - outdoorsC);
  const movedJ = turnedInShare * state.shellJ;
  return {
    ...state,
    coreC,
    baseC: coreC,
    digestibleJ: state.digestibleJ + movedJ,
    shellJ: state.shellJ - movedJ,
  };
}
