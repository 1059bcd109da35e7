/** Finds what is known of a material by the name that stands in the book: the holding's own first, then the common ones. */
import { COMMON_MATERIALS, type CommonMaterial, type MaterialSource, type Ranged } from './common-materials';
import { mixOf, mixSd, type Mix, type Part, type StuffSd } from './mix';

export interface OwnMaterial {
  name: string;
  /** kg/m³; null where nobody weighed it. */
  density: number | null;
  moisture: number;
  carbon: number;
  nitrogen: number;
}

export interface KnownMaterial {
  name: string;
  density: number | null;
  moisture: number;
  carbon: number;
  nitrogen: number;
  sd: StuffSd;
  source: MaterialSource | 'own';
}

const plain = (name: string) => name.trim().toLowerCase().replaceAll('’', "'");

export function findMaterial(name: string, own: readonly OwnMaterial[]): KnownMaterial | null {
  const wanted = plain(name);
  const ours = own.find((one) => plain(one.name) === wanted);
  if (ours !== undefined) return ofOwn(ours);
  const common = COMMON_MATERIALS.find((one) =>
    [one.name, ...one.also].some((other) => plain(other) === wanted),
  );
  return common === undefined ? null : ofCommon(common);
}

/** What a holding measured itself: off by what a kitchen scale and an oven can tell, a tenth. */
function ofOwn({ name, density, moisture, carbon, nitrogen }: OwnMaterial): KnownMaterial {
  const sd = { moisture: 0.03, carbon: 0.05 * carbon, nitrogen: 0.1 * nitrogen };
  return { name, density, moisture, carbon, nitrogen, sd, source: 'own' };
}

/** A range found in many heaps is read as two standard deviations to either side. */
const sdOf = ([, least, most]: Ranged) => (most - least) / 4;

export function ofCommon(common: CommonMaterial): KnownMaterial {
  const nitrogen = common.nitrogen[0] / 100;
  // carbon is told by C:N, so what C:N is off is carbon's to be off, beside a nitrogen that is off on its own
  const carbon = Math.min(0.6, nitrogen * common.cn[0]);
  const cnShare = sdOf(common.cn) / common.cn[0];
  return {
    name: common.name,
    density: common.density?.[0] ?? null,
    ...{ moisture: common.moisture[0] / 100, carbon, nitrogen },
    sd: { moisture: sdOf(common.moisture) / 100, carbon: 0.05 * carbon, nitrogen: cnShare * nitrogen },
    source: common.source,
  };
}

export interface WentIn {
  material: string;
  kilograms?: number | undefined;
  litres?: number | undefined;
}

export interface HeapPart {
  name: string;
  /** Null where it was given by volume and nobody knows its density, or no amount was given. */
  massKg: number | null;
  /** The mass was made of a volume. */
  isFromVolume: boolean;
  known: KnownMaterial | null;
}

export interface HeapMix {
  /** What went in under one name is one part, largest first. */
  parts: HeapPart[];
  waterL: number;
  /** Of the parts whose mass and figures are known. */
  mix: Mix;
  sd: { moisture: number | null; cn: number | null };
  /** Share of the known mass whose figures are known. */
  knownShare: number;
  /** Names that the mix leaves out. */
  left: string[];
}

/**
 * The mix of everything that went into a heap since it was built. It is what went in, not what is there now: a heap
 * loses carbon, water and a little nitrogen from its first day.
 * @param entries in any order; water of all of them counts
 */
export function heapMix(
  entries: readonly { materials: readonly WentIn[]; litresOfWater: number | null }[],
  own: readonly OwnMaterial[],
): HeapMix {
  const byName = new Map<string, HeapPart>();
  for (const { materials } of entries)
    for (const went of materials) {
      const key = plain(went.material);
      const known = findMaterial(went.material, own);
      const massKg = massOf(went, known);
      const before = byName.get(key);
      byName.set(key, {
        name: before?.name ?? went.material,
        // an amount that nobody knows makes the whole unknown: half of a material would turn the mix
        massKg: massKg === null || before?.massKg === null ? null : massKg + (before?.massKg ?? 0),
        isFromVolume: (before?.isFromVolume ?? false) || went.kilograms === undefined,
        known,
      });
    }
  const parts = [...byName.values()].sort((a, b) => (b.massKg ?? 0) - (a.massKg ?? 0));
  const waterL = entries.reduce((sum, { litresOfWater }) => sum + (litresOfWater ?? 0), 0);
  const counted = parts.flatMap(({ massKg, known }): (Part & { sd: StuffSd })[] =>
    massKg === null || known === null ? [] : [{ ...known, massKg }],
  );
  const massKg = parts.reduce((sum, part) => sum + (part.massKg ?? 0), 0);
  const mix = mixOf(counted, waterL);
  return {
    ...{ parts, waterL, mix },
    sd: mixSd(counted, waterL),
    knownShare: massKg > 0 ? counted.reduce((sum, part) => sum + part.massKg, 0) / massKg : 0,
    left: parts.filter((part) => part.massKg === null || part.known === null).map((part) => part.name),
  };
}

/** Kilograms, as weighed or by the loose density. */
export function massOf(went: WentIn, known: KnownMaterial | null): number | null {
  if (went.kilograms !== undefined) return went.kilograms;
  if (went.litres === undefined || known === null || known.density === null) return null;
  return (went.litres / 1000) * known.density;
}
