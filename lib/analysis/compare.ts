/**
 * Two sets of nights side by side, and of each figure whether it differs by more than chance. A set is nights of one source
 * or of a house; figures are of a night, so that sets of unlike length can be compared.
 */
import { type ComparableNight, COMPARED, type FigureKey, figuresOf, lastingOf } from './compare-figures';
import { meanOfNights, type NightsMean } from './mean-of-nights';
import type { HouseNight, NightSummary } from './nights';
import { classSd } from './sensor-class';
import { t95 } from './student';

export interface ComparedMean extends NightsMean {
  /** Of the mean, with what sensors and flow may be wrong by. */
  sdWhole: number;
}

export interface ComparedFigure {
  key: FigureKey;
  /** Null under three nights that have it. */
  chosen: ComparedMean | null;
  other: ComparedMean | null;
  /** Chosen less other, with its 95 % interval; null where either is not known. */
  difference: { value: number; low: number; high: number } | null;
  /** The interval leaves none out; null where no difference is known. */
  isBeyondChance: boolean | null;
}

/**
 * 'ranges': other nights of the same source, whose probes and flow are then as wrong in both and cancel. 'sources': the same
 * nights of another source of the house, night with night; what is the house's own is the same and left out. 'houses': the
 * same nights elsewhere, night with night, by other probes.
 */
export type How = 'ranges' | 'sources' | 'houses';

/** Of the house, not of a source. */
const HOUSE_FIGURES: ReadonlySet<FigureKey> = new Set(['lowest', 'underLimit', 'lift', 'humid', 'outdoors']);

export interface Comparison {
  figures: ComparedFigure[];
  /** Nights of each that count: whole ones, read well enough. */
  chosen: { nights: number; leftOut: number };
  other: { nights: number; leftOut: number };
  /** The same nights were compared one by one, so that what the weather did to both cancels. */
  isPaired: boolean;
}

interface Set {
  all: number;
  nights: ComparableNight[];
}

/** Nights that last or of which under 90 % was read say too little to be compared. */
export function comparable(nights: readonly (NightSummary | HouseNight)[]): Set {
  const whole = nights.filter((night) => night.complete && !night.coverageLow);
  return {
    all: nights.length,
    nights: whole.map((night) => ({
      night: night.night,
      values: valuesOf(night),
      lasting: {
        ...PROBES,
        ...(night.heat === null ? {} : { heat: night.heat.sd }),
      },
      forPower:
        night.heat === null || night.heatElectricity === null
          ? null
          : { heat: night.heat.kWh, electricity: night.heatElectricity.kWh },
    })),
  };
}

/** One probe's, and for the lift that of two. A summary does not carry what its probes are; a digital one is supposed. */
const PROBE_SD_K = classSd(null, 0);
const PROBES = {
  core: PROBE_SD_K,
  lowest: PROBE_SD_K,
  outdoors: PROBE_SD_K,
  lift: Math.SQRT2 * PROBE_SD_K,
} as const;

function valuesOf(night: NightSummary | HouseNight): ComparableNight['values'] {
  const { heat, electricity, lowest, liftDegreeHours, over90Hours, outdoorsLowest } = night;
  const known: [FigureKey, number | null | undefined][] = [
    ['ran', 'dutyOfNight' in night ? night.dutyOfNight : null],
    ['heat', heat?.kWh],
    ['electricity', electricity?.kWh],
    ['core', 'coreAtDawn' in night ? night.coreAtDawn?.value : null],
    ['lowest', lowest?.value],
    ['underLimit', underLimitHours(night)],
    ['lift', liftDegreeHours === null ? null : liftDegreeHours / night.hours],
    ['humid', over90Hours],
    ['outdoors', outdoorsLowest?.value],
  ];
  return Object.fromEntries(known.filter(([, value]) => typeof value === 'number'));
}

function underLimitHours(night: NightSummary | HouseNight): number | null {
  return night.belowFrostLimitSeconds === null ? null : night.belowFrostLimitSeconds / 3600;
}

export function compareNights(chosen: Set, other: Set, how: How): Comparison {
  const keys = COMPARED.filter((key) => how !== 'sources' || !HOUSE_FIGURES.has(key));
  const figures = keys.map((key) => compareFigure(key, chosen.nights, other.nights, how));
  return {
    figures: figures.filter((figure) => figure.chosen !== null || figure.other !== null),
    chosen: { nights: chosen.nights.length, leftOut: chosen.all - chosen.nights.length },
    other: { nights: other.nights.length, leftOut: other.all - other.nights.length },
    isPaired: how !== 'ranges',
  };
}

function compareFigure(
  key: FigureKey,
  chosen: readonly ComparableNight[],
  other: readonly ComparableNight[],
  how: How,
): ComparedFigure {
  const [one, two] = [meanOf(key, chosen), meanOf(key, other)];
  const gap = how === 'ranges' ? betweenMeans(one, two) : betweenPairs(key, chosen, other);
  if (one === null || two === null || gap === null)
    return { key, chosen: one, other: two, difference: null, isBeyondChance: null };
  const lasting = how === 'ranges' ? 0 : Math.hypot(lastingOf(key, chosen), lastingOf(key, other));
  const { mean: value, degrees } = gap;
  const sd = Math.hypot(gap.sd, lasting);
  // the part that lasts is known, so it brings no doubt about itself (Welch–Satterthwaite)
  const half = sd === 0 ? 0 : t95(Math.min(1e6, degrees * (sd / Math.max(gap.sd, sd * 1e-3)) ** 4)) * sd;
  const [low, high] = [value - half, value + half];
  return {
    key,
    chosen: one,
    other: two,
    difference: { value, low, high },
    isBeyondChance: value !== 0 && (low > 0 || high < 0),
  };
}

function meanOf(key: FigureKey, nights: readonly ComparableNight[]): ComparedMean | null {
  const mean = meanOfNights(figuresOf(key, nights).map((one) => one.value));
  return mean === null ? null : { ...mean, sdWhole: Math.hypot(mean.sd, lastingOf(key, nights)) };
}

/** Welch: the two scatter each in its own way. */
function betweenMeans(one: NightsMean | null, two: NightsMean | null) {
  if (one === null || two === null) return null;
  const [a, b] = [one.sd ** 2, two.sd ** 2];
  const degrees = a + b === 0 ? 1 : (a + b) ** 2 / (a ** 2 / one.degrees + b ** 2 / two.degrees);
  return { mean: one.mean - two.mean, sd: Math.sqrt(a + b), degrees };
}

function betweenPairs(
  key: FigureKey,
  chosen: readonly ComparableNight[],
  other: readonly ComparableNight[],
): NightsMean | null {
  // of the nights that both have: a ratio of sums is of the nights that are summed
  const has = (nights: readonly ComparableNight[]) =>
    new Set(figuresOf(key, nights).map(({ night }) => night));
  const [mine, theirs] = [has(chosen), has(other)];
  const both = (nights: readonly ComparableNight[]) =>
    figuresOf(
      key,
      nights.filter(({ night }) => mine.has(night) && theirs.has(night)),
    );
  const facing = new Map(both(other).map(({ night, value }) => [night, value]));
  return meanOfNights(
    both(chosen).flatMap(({ night, value }) => {
      const two = facing.get(night);
      return two === undefined ? [] : [value - two];
    }),
  );
}
