/** A heap in section: where its probes stood, and the temperatures between them. Beyond the probes nothing is known. */

export interface Section {
  widthM: number;
  /** At its middle, above the ground. */
  heightM: number;
  /** How deep the bed lies under the ground. */
  sunkM: number;
  columns: number;
  rows: number;
  /** What stands left and right, such as N and S. */
  left: string;
  right: string;
}

export interface ProbePlace {
  /** From the left, and from the top, beginning with 0. */
  column: number;
  row: number;
  celsius: number;
}

export interface Spot {
  /** m from the left edge, and above the bed. */
  x: number;
  y: number;
}

/** The sides fall off towards the edges, as heaped stuff does; the share of the middle's height that stands there. */
const EDGE_SHARE = 0.78;

/** Height of the surface over the bed at x, m. */
export function surfaceM(section: Section, x: number): number {
  const off = (2 * x) / section.widthM - 1;
  return (section.sunkM + section.heightM) * (EDGE_SHARE + (1 - EDGE_SHARE) * (1 - off * off));
}

/** The middle of a column's cell, at the same share of the depth in each column. */
export function spotOf(section: Section, { column, row }: Pick<ProbePlace, 'column' | 'row'>): Spot {
  const x = (section.widthM * (column + 0.5)) / section.columns;
  return { x, y: surfaceM(section, x) * (1 - (row + 0.5) / section.rows) };
}

export interface Reading extends Spot {
  celsius: number;
}

/**
 * Temperature between probes by inverse distance (Shepard 1968, power 3): it meets each probe, and is nowhere hotter or
 * colder than the hottest and coldest of them. For spots within the probes' hull only; outside it would be invented.
 */
export function between(readings: readonly Reading[], { x, y }: Spot): number {
  let [weights, sum] = [0, 0];
  for (const one of readings) {
    const square = (one.x - x) ** 2 + (one.y - y) ** 2;
    if (square < 1e-12) return one.celsius;
    const weight = 1 / square ** 1.5;
    weights += weight;
    sum += weight * one.celsius;
  }
  return sum / weights;
}

/** The convex hull, counter-clockwise (Andrew's monotone chain); of fewer than three spots, or of a line, none. */
export function hullOf(spots: readonly Spot[]): Spot[] {
  const sorted = spots.toSorted((a, b) => a.x - b.x || a.y - b.y);
  const half = (points: readonly Spot[]): Spot[] => {
    const chain: Spot[] = [];
    for (const point of points) {
      for (let [a, b] = chain.slice(-2); a !== undefined && b !== undefined; [a, b] = chain.slice(-2)) {
        if ((b.x - a.x) * (point.y - a.y) - (b.y - a.y) * (point.x - a.x) > 1e-12) break;
        chain.pop();
      }
      chain.push(point);
    }
    return chain.slice(0, -1);
  };
  const hull = [...half(sorted), ...half(sorted.toReversed())];
  return hull.length < 3 ? [] : hull;
}

export interface ProbeSummary {
  hottest: ProbePlace;
  coldest: ProbePlace;
  meanC: number;
  many: number;
}

export function probeSummary(places: readonly ProbePlace[]): ProbeSummary | null {
  const first = places[0];
  if (first === undefined) return null;
  return {
    hottest: places.reduce((top, one) => (one.celsius > top.celsius ? one : top), first),
    coldest: places.reduce((low, one) => (one.celsius < low.celsius ? one : low), first),
    meanC: places.reduce((sum, one) => sum + one.celsius, 0) / places.length,
    many: places.length,
  };
}
