/** Comparisons by rank alone, with exact chances: no figure's distribution is supposed, and no dice are thrown. */
import type { Estimate } from './recovery';
import { median } from './median';

/** Two-sided, so a fortieth on either side. */
const TAIL = 0.025;

/** How many orders of n things have so many pairs the wrong way round, as shares of all orders (Mahonian numbers). */
function inversionShares(n: number): number[] {
  let shares = [1];
  for (let k = 2; k <= n; k += 1) {
    const next = new Array<number>(shares.length + k - 1).fill(0);
    shares.forEach((share, i) => {
      for (let j = 0; j < k; j += 1) next[i + j] = (next[i + j] ?? 0) + share / k;
    });
    shares = next;
  }
  return shares;
}

/** The greatest k with less than a fortieth of the chance below it; 0 where even the most extreme is likelier. */
function ends(shares: readonly number[]): number {
  let below = 0;
  let k = 0;
  while (k < shares.length / 2 && below + (shares[k] ?? 0) <= TAIL) {
    below += shares[k] ?? 0;
    k += 1;
  }
  return k;
}

/** k-th smallest and k-th largest; unbounded for k = 0. */
function middlePart(sorted: readonly number[], k: number): Estimate {
  const bounded = k > 0;
  return {
    value: median(sorted),
    low: bounded ? (sorted[k - 1] ?? null) : null,
    high: bounded ? (sorted[sorted.length - k] ?? null) : null,
  };
}

/**
 * Slope by Theil (1950) and Sen (1968): the median of the slopes of all pairs, with the interval that Kendall's exact
 * distribution gives. Under five places in x no interval of 95 % exists, and its ends are null.
 * @returns null where no two differ in x
 */
export function theilSen(places: readonly { x: number; y: number }[]): Estimate | null {
  const slopes = places.flatMap((one, i) =>
    places.slice(i + 1).flatMap((two) => (two.x === one.x ? [] : [(two.y - one.y) / (two.x - one.x)])),
  );
  if (slopes.length === 0) return null;
  return middlePart(
    slopes.sort((a, b) => a - b),
    ends(inversionShares(places.length)),
  );
}

export interface Shift {
  /** After less before: the median of all differences (Hodges and Lehmann 1963). */
  shift: Estimate;
  /** Chance of ranks at least as far apart if nothing had changed (Wilcoxon 1945); ties share their ranks. */
  p: number;
}

/** How two groups differ; null where either is empty. */
export function shiftOf(before: readonly number[], after: readonly number[]): Shift | null {
  if (before.length === 0 || after.length === 0) return null;
  const differences = after.flatMap((one) => before.map((other) => one - other)).sort((a, b) => a - b);
  // the count of differences under nothing goes like a rank sum: the shares of its untied ranks give the interval
  const untied = sumShares(
    Array.from({ length: before.length + after.length }, (_, i) => 2 * (i + 1)),
    after.length,
  );
  const least = after.length * (after.length + 1);
  const shares = Array.from(
    { length: before.length * after.length + 1 },
    (_, u) => untied[least + 2 * u] ?? 0,
  );
  return { shift: middlePart(differences, ends(shares)), p: rankChance(before, after) };
}

function rankChance(before: readonly number[], after: readonly number[]): number {
  const all = [...before, ...after];
  // twice the mid-ranks, so that shared ranks stay whole
  const ranks = all.map((value) => {
    const under = all.filter((other) => other < value).length;
    const same = all.filter((other) => other === value).length;
    return 2 * under + same + 1;
  });
  const shares = sumShares(ranks, after.length);
  const sum = ranks.slice(before.length).reduce((total, rank) => total + rank, 0);
  const middle = after.length * (all.length + 1);
  const away = Math.abs(sum - middle);
  const chance = shares.reduce(
    (total, share, at) => (Math.abs(at - middle) >= away ? total + share : total),
    0,
  );
  return Math.min(1, chance);
}

/** Shares of all choices of `count` among the ranks, by their sum. */
function sumShares(ranks: readonly number[], count: number): number[] {
  const most = ranks.reduce((sum, rank) => sum + rank, 0);
  const ways = Array.from({ length: count + 1 }, () => new Array<number>(most + 1).fill(0));
  const empty = ways[0];
  if (empty !== undefined) empty[0] = 1;
  for (const rank of ranks)
    for (let chosen = count; chosen >= 1; chosen -= 1) {
      const [into, from] = [ways[chosen] ?? [], ways[chosen - 1] ?? []];
      for (let sum = most; sum >= rank; sum -= 1) into[sum] = (into[sum] ?? 0) + (from[sum - rank] ?? 0);
    }
  const chosen = ways[count] ?? [];
  const total = chosen.reduce((sum, one) => sum + one, 0);
  return chosen.map((one) => one / total);
}
