/** The nights that Duty's chosen ones are compared with: other nights, another source, or another house. */
import { and, asc, eq, isNull } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { source } from '@/db/schema/channel';
import { house } from '@/db/schema/house';
import { nightBefore } from '@/lib/analysis/night';
import type { HouseNight, NightSummary } from '@/lib/analysis/nights';
import { listHouseNights, listNights } from './night';

/** As components/duty/against.ts reads it from the address. */
export type Against =
  | { kind: 'before' }
  | { kind: 'nights'; from: string; to: string }
  | { kind: 'source'; house: string; source: string }
  | { kind: 'house'; house: string };

/** A house with its sources. */
export interface Place {
  id: string;
  slug: string;
  name: string;
  sources: { slug: string; name: string }[];
}

export type Other =
  /** Nights of the same source. */
  | { kind: 'ranges'; nights: NightSummary[] }
  /** The chosen nights of another source; `house` is null for one of this house. */
  | { kind: 'source'; name: string; house: string | null; nights: NightSummary[] }
  /** The chosen nights of both houses. */
  | { kind: 'house'; name: string; chosen: HouseNight[]; nights: HouseNight[] };

export async function placesOf(holding: Holding): Promise<Place[]> {
  const rows = await holding.db
    .select({
      id: house.id,
      slug: house.slug,
      name: house.name,
      sourceSlug: source.slug,
      sourceName: source.name,
    })
    .from(house)
    .leftJoin(
      source,
      and(eq(source.holdingId, house.holdingId), eq(source.houseId, house.id), isNull(source.removedAt)),
    )
    .where(and(eq(house.holdingId, holding.id), isNull(house.removedAt)))
    .orderBy(asc(house.createdAt), asc(house.id), asc(source.createdAt), asc(source.id));
  const places = new Map<string, Place>();
  for (const { id, slug, name, sourceSlug, sourceName } of rows) {
    const place = places.get(id) ?? { id, slug, name, sources: [] };
    if (sourceSlug !== null && sourceName !== null)
      place.sources.push({ slug: sourceSlug, name: sourceName });
    places.set(id, place);
  }
  return [...places.values()];
}

interface Shown {
  house: { id: string; slug: string };
  source: { slug: string };
  /** Ascending, at least one. */
  chosen: readonly NightSummary[];
  places: readonly Place[];
}

/** @returns null where the address names a place that is not there, or the very source that is shown */
export async function readOther(
  holding: Holding,
  shown: Shown,
  against: Against,
  nowMs: number,
): Promise<Other | null> {
  const { chosen, places } = shown;
  const [from, to] = [chosen[0]?.night ?? '', chosen.at(-1)?.night ?? ''];
  const nightsOf = async (houseId: string, slug: string, span: { from: string; to: string }) =>
    (await listNights(holding, houseId, { sources: [slug], ...span, limit: MOST }, nowMs)).reverse();
  if (against.kind === 'before' || against.kind === 'nights') {
    const span =
      against.kind === 'nights'
        ? against
        : { from: nightBefore(from, chosen.length), to: nightBefore(from, 1) };
    return { kind: 'ranges', nights: await nightsOf(shown.house.id, shown.source.slug, span) };
  }
  const place = places.find(({ slug }) => slug === against.house);
  if (place === undefined) return null;
  if (against.kind === 'house') {
    if (place.id === shown.house.id) return null;
    // one after the other: they share a transaction
    const own = await listHouseNights(holding, shown.house.id, { from, to });
    const theirs = await listHouseNights(holding, place.id, { from, to });
    const nights = theirs.map(({ night }) => night);
    return { kind: 'house', name: place.name, chosen: own.map(({ night }) => night), nights };
  }
  const other = place.sources.find(({ slug }) => slug === against.source);
  if (other === undefined || (place.id === shown.house.id && other.slug === shown.source.slug)) return null;
  return {
    kind: 'source',
    name: other.name,
    house: place.id === shown.house.id ? null : place.name,
    nights: await nightsOf(place.id, other.slug, { from, to }),
  };
}

/** As many as a page shows at most. */
const MOST = 400;
