import type { Extent, Reading, Series } from '@/lib/analysis/series';
import type { Span } from '@/lib/analysis/spans';
import type { Chance } from './chance';

/** How a base comes back in the tests; the truth is known. */
export interface RestTruth {
  tauS: number;
  lengthS: number;
  everyS: number;
  noiseK: number;
  /** Smallest step of the probe, K; 0 for none. */
  stepK: number;
  /** Deviation of the core's drift from rest to rest, K/h. */
  driftKPerH: number;
  /** Deviation of ln τ from rest to rest. */
  between: number;
}

/** Like the demo's heaps: τ near half an hour, rests of an hour, a digital probe read every half minute. */
export const usual: RestTruth = {
  tauS: 1700,
  lengthS: 3600,
  everyS: 30,
  noiseK: 0.04,
  stepK: 0,
  driftKPerH: 0.3,
  between: 0,
};

export const start = Date.parse('2026-11-26T22:00:00Z');

export interface RestScene {
  /** Of this rest. */
  tauS: number;
  levelC: number;
  spans: Span[];
  base: Series;
  core: Series;
  extent: Extent;
}

/** A draw of 40 min and the rest after it, with what a base and a core probe read of it. */
export function restScene(truth: RestTruth, { uniform, normal }: Chance): RestScene {
  const tauS = truth.tauS * Math.exp(truth.between * normal());
  const [levelC, depthK] = [45 + 4 * uniform(), 6 + 4 * uniform()];
  // a core's probe is one place of the heap: what the base feels of its drift is a little more or less
  const coreKPerH = truth.driftKPerH * normal();
  const levelKPerH = coreKPerH * (1 + 0.1 * normal()) + 0.05 * normal();
  const shown = (value: number) => {
    const read = value + truth.noiseK * normal();
    return truth.stepK === 0 ? read : Math.round(read / truth.stepK) * truth.stepK;
  };
  const [base, core]: [Reading[], Reading[]] = [[], []];
  for (let t = uniform() * truth.everyS; t < truth.lengthS; t += truth.everyS) {
    const at = start + Math.round(t * 1000);
    const left = Math.exp(-t / tauS);
    base.push({ at, value: shown(levelC + (levelKPerH / 3600) * (t - tauS * (1 - left)) - depthK * left) });
    core.push({ at, value: shown(levelC + 3 + (coreKPerH / 3600) * t) });
  }
  const holdS = 3 * truth.everyS;
  const series = (key: string, role: string, good: Reading[]) => ({
    key,
    name: key,
    role,
    holdS,
    sd: 0.3,
    good,
  });
  const extent = { from: start - 3_600_000, to: start + truth.lengthS * 1000 };
  return {
    tauS,
    levelC,
    spans: [
      { from: extent.from, to: start - 2_400_000, on: false, kind: 'off', claim: 'idle' },
      { from: start - 2_400_000, to: start, on: true, kind: 'run', claim: 'band' },
      { from: start, to: extent.to, on: false, kind: 'rest', claim: 'rest' },
    ],
    base: series('gate-base', 'heap-base', base),
    core: series('gate-core', 'heap-core', core),
    extent,
  };
}
