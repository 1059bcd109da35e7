import { describe, expect, it } from 'vitest';
import { pooledRecovery } from '@/lib/analysis/recovery';
import { isFitted } from '@/lib/analysis/rest-fit';
import { restsOf } from '@/lib/analysis/rests';
import { chance } from './chance';
import { restScene, type RestTruth, usual } from './rest-scene';

const RUNS = 1000;
const seed = 20_261_126;

/** Of 1,000 weeks with so many rests each, how many intervals of τ hold the true one. */
function covered(rests: number, truth: RestTruth, withCore = true): number {
  const by = chance(seed + rests);
  let hits = 0;
  for (let run = 0; run < RUNS; run += 1) {
    const fits = Array.from({ length: rests }, () => restScene(truth, by)).flatMap((one) =>
      restsOf([one.spans], one.base, withCore ? one.core : null, one.extent),
    );
    const [only] = fits;
    const alone = only !== undefined && isFitted(only) ? { low: only.tauLow, high: only.tauHigh } : null;
    const interval = rests === 1 ? alone : (pooledRecovery(fits)?.tau ?? null);
    if (interval === null) continue;
    const { low, high } = interval;
    if ((low ?? 0) <= truth.tauS && truth.tauS <= (high ?? Infinity)) hits += 1;
  }
  return hits / RUNS;
}

function expectHonest(share: number) {
  expect(share, `seed ${seed}`).toBeGreaterThanOrEqual(0.93);
  expect(share, `seed ${seed}`).toBeLessThanOrEqual(0.97);
}

/** The demo's probes: steps of 1/16 K. */
const coarse = { ...usual, stepK: 0.0625 };

describe(
  'the 95 % interval of a time constant holds the truth in 93 to 97 % of 1,000 runs',
  { timeout: 120_000 },
  () => {
    it.each([1, 3, 9])('for %i rests over a drifting core', (rests) => expectHonest(covered(rests, usual)));

    it.each([1, 3, 9])('for %i rests read in steps of 0.0625 K', (rests) =>
      expectHonest(covered(rests, coarse)),
    );

    it('for a rest whose core nobody reads', () => expectHonest(covered(1, usual, false)));

    it('for a probe that hardly scatters, so that its steps follow each other', () =>
      expectHonest(covered(1, { ...coarse, noiseK: 0.01 })));

    it.each([1, 9])('for %i rests that last but two thirds of the time constant', (rests) =>
      expectHonest(covered(rests, { ...usual, lengthS: 1130 })),
    );

    it('for nine rests that a logger reads every five minutes', () =>
      expectHonest(covered(9, { ...usual, everyS: 300 })));

    it('for nine rests of which each has its own time constant', () =>
      expectHonest(covered(9, { ...usual, between: 0.1 })));
  },
);
