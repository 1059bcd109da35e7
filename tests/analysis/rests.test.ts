import { describe, expect, it } from 'vitest';
import { pool } from '@/lib/analysis/pool';
import { pooledRecovery } from '@/lib/analysis/recovery';
import { isFitted } from '@/lib/analysis/rest-fit';
import { restsOf } from '@/lib/analysis/rests';
import { chance } from './chance';
import { restScene, start, usual } from './rest-scene';

const one = restScene(usual, chance(3));
const fit = (change: Partial<typeof one> = {}) => {
  const { spans, base, core, extent } = { ...one, ...change };
  return restsOf([spans], base, core, extent);
};

describe('a rest', () => {
  it('begins when the draw ends, and gives time constant and level near the truth', () => {
    const [rest] = fit();
    expect(rest?.from).toBe(start);
    if (rest === undefined || !isFitted(rest)) throw new Error('it has a fit');
    expect(Math.abs(rest.tau / one.tauS - 1)).toBeLessThan(0.1);
    expect(Math.abs(rest.level - one.levelC)).toBeLessThan(4 * rest.levelSd + 0.05);
    expect(rest.rms).toBeLessThan(0.06);
  });

  it('runs only while no channel of the source does', () => {
    const other = [
      { from: start + 600_000, to: start + 900_000, on: true, kind: 'run' as const, claim: null },
    ];
    const rests = restsOf([one.spans, other], one.base, one.core, one.extent);
    expect(rests.map(({ from, to }) => [from - start, to - start])).toEqual([
      [0, 600_000],
      [900_000, 3_600_000],
    ]);
  });

  it('needs four readings', () => {
    const few = { ...one.base, holdS: 3600, good: one.base.good.filter((_, i) => i % 40 === 0) };
    expect(fit({ base: few })).toMatchObject([{ why: 'too-few-readings' }]);
  });

  it('is told as not read where its base was silent', () => {
    const { good } = one.base;
    const silent = good.filter(({ at }) => at < start + 300_000 || at > start + 1_200_000);
    expect(fit({ base: { ...one.base, good: silent } })).toMatchObject([{ why: 'not-read' }]);
    expect(fit({ base: { ...one.base, good: [] } })).toMatchObject([{ why: 'not-read' }]);
  });

  it('shorter than half its time constant has none of its own, but its rate counts', () => {
    const brief = restScene({ ...usual, lengthS: 600 }, chance(4));
    const [rest] = restsOf([brief.spans], brief.base, brief.core, brief.extent);
    expect(rest).toMatchObject({ why: 'too-short', points: 20 });
    expect(Number(rest?.rate)).toBeGreaterThan(0);
  });

  it('that brings nothing back is told so', () => {
    const flat = one.base.good.map(({ at }, i) => ({ at, value: 45 + 0.02 * (i % 3) }));
    const [rest] = fit({ base: { ...one.base, good: flat } });
    expect(rest !== undefined && isFitted(rest)).toBe(false);
  });

  it('before the first draw that is seen is no rest', () => {
    expect(
      fit({ spans: [{ from: one.extent.from, to: one.extent.to, on: false, kind: 'rest', claim: 'rest' }] }),
    ).toEqual([]);
  });
});

describe('rests together', () => {
  const by = chance(5);
  const many = Array.from({ length: 9 }, () => restScene(usual, by)).flatMap((rest) =>
    restsOf([rest.spans], rest.base, rest.core, rest.extent),
  );

  it('are not carried away by one that a watering disturbed', () => {
    const [first, ...rest] = many;
    if (first === undefined || !isFitted(first)) throw new Error('it has a fit');
    const wild = { ...first, rate: first.rate * 4 };
    const tau = pooledRecovery([wild, ...rest])?.tau.value ?? 0;
    expect(Math.abs(tau / usual.tauS - 1)).toBeLessThan(0.1);
  });

  it('do not tell a time constant where none of them has a rate', () => {
    expect(pooledRecovery([{ from: 0, to: 1, why: 'not-read' }])).toBeNull();
  });

  it('of one value each with its deviation have the textbook mean and interval', () => {
    // equal deviations: the plain mean, and Student's interval of the plain mean
    const three = pool([1, 2, 3].map((value) => ({ value, sd: 0.1 })));
    expect(three?.value).toBeCloseTo(2, 9);
    expect(three?.sd).toBeCloseTo(1 / Math.sqrt(3), 6);
    expect((three?.high ?? 0) - 2).toBeCloseTo(4.30265 / Math.sqrt(3), 4);
  });
});
