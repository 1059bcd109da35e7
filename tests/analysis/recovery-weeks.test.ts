import { describe, expect, it } from 'vitest';
import { nightsBetween } from '@/lib/analysis/night';
import {
  entryEffects,
  type NightOfRests,
  recoveryTrend,
  recoveryWeeks,
  weekOf,
} from '@/lib/analysis/recovery-weeks';
import type { FittedRest } from '@/lib/analysis/rest-fit';
import { chance } from './chance';

const zone = 'Europe/London';
const begin = Date.parse('2026-11-02T13:00:00Z');
const day = 86_400_000;

/** A night's rests about a time constant, with 3 % of scatter. */
function nightsOf(count: number, tauS: (night: number) => number, seed = 1): NightOfRests[] {
  const { normal } = chance(seed);
  return nightsBetween(begin, begin + (count - 1) * day, zone).map(({ night, from, to }, i) => ({
    ...{ night, from, ends: to },
    rests: Array.from({ length: 6 }, (_, place): FittedRest => {
      const tau = tauS(i) * Math.exp(0.03 * normal());
      const [rate, rateSd] = [1 / tau, 0.03 / tau];
      const at = from + place * 3_600_000;
      return {
        ...{
          from: at,
          to: at + 3_000_000,
          start: 38,
          tau,
          tauSd: 0.03 * tau,
          tauLow: tau * 0.94,
          tauHigh: tau * 1.06,
        },
        ...{ level: 46 + 0.1 * normal(), levelSd: 0.1, rate, rateSd, lengthS: 3000, points: 100, rms: 0.04 },
      };
    }),
  }));
}

describe('weeks of recovery', () => {
  it('begin on Mondays, named by that night', () => {
    expect(['2026-11-22', '2026-11-23', '2026-11-26'].map(weekOf)).toEqual([
      '2026-11-16',
      '2026-11-23',
      '2026-11-23',
    ]);
  });

  it('go over the ends of years and over a leap day', () => {
    expect(['2025-01-05', '2025-01-06', '2024-03-03', '2024-03-04'].map(weekOf)).toEqual([
      '2024-12-30',
      '2025-01-06',
      '2024-02-26',
      '2024-03-04',
    ]);
  });

  it('hold the rests of their nights, and the time constant between its ends', () => {
    const weeks = recoveryWeeks(nightsOf(14, () => 1700));
    expect(weeks.map(({ week, rests }) => [week, rests])).toEqual([
      ['2026-11-02', 42],
      ['2026-11-09', 42],
    ]);
    const { low, high } = weeks[0]?.recovery?.tau ?? { low: null, high: null };
    expect(low).toBeLessThan(1700);
    expect(high).toBeGreaterThan(1700);
  });

  it('without a rest that says anything have no figure', () => {
    const [bare] = nightsOf(1, () => 1700).map((night) => ({ ...night, rests: [] }));
    expect(recoveryWeeks(bare === undefined ? [] : [bare])).toMatchObject([{ recovery: null, rests: 0 }]);
  });
});

describe('the trend over weeks', () => {
  it('is slower where each week takes 5 % longer, by about as much', () => {
    const trend = recoveryTrend(recoveryWeeks(nightsOf(56, (i) => 1700 * 1.05 ** (i / 7))));
    expect(trend.change).toBe('slower');
    expect(trend.ratioPerWeek?.value).toBeCloseTo(1.05, 2);
  });

  it('is quicker where it shortens', () => {
    expect(recoveryTrend(recoveryWeeks(nightsOf(56, (i) => 1700 * 0.97 ** (i / 7)))).change).toBe('quicker');
  });

  it('is claimed in one of twenty heaps at most that stay as they are', { timeout: 60_000 }, () => {
    const found = Array.from({ length: 200 }, (_, seed) =>
      recoveryTrend(recoveryWeeks(nightsOf(56, () => 1700, seed + 1))),
    ).filter(({ change }) => change !== 'none-seen');
    expect(found.length / 200).toBeLessThanOrEqual(0.08);
  });

  it('cannot be told from four weeks', () => {
    expect(recoveryTrend(recoveryWeeks(nightsOf(28, (i) => 1700 + 100 * i))).change).toBe('cannot-tell');
  });
});

describe('before and after a turning', () => {
  const at = begin + 10 * day + 3_600_000;
  const turned = [{ at, kind: 'turned' }];

  it('that made it quicker is beyond chance', () => {
    const [effect] = entryEffects(
      nightsOf(21, (i) => (i < 10 ? 1900 : 1600)),
      turned,
    );
    expect(effect).toMatchObject({ nightsBefore: 7, nightsAfter: 7, change: 'quicker' });
    // seven nights a side of six rests each, 3 % a rest: four deviations of their difference
    expect(Math.abs((effect?.tauRatio?.value ?? 0) / (1600 / 1900) - 1)).toBeLessThan(0.026);
    expect(effect?.p).toBeLessThan(0.001);
  });

  it('that changed nothing is not', () => {
    expect(
      entryEffects(
        nightsOf(21, () => 1700),
        turned,
      ),
    ).toMatchObject([{ change: 'none-seen' }]);
  });

  it('cannot be told from two nights on a side', () => {
    expect(
      entryEffects(
        nightsOf(13, () => 1700),
        turned,
      ),
    ).toMatchObject([{ nightsAfter: 2, change: 'cannot-tell' }]);
  });

  it('looks no further than the next thing that was done', () => {
    const fed = [...turned, { at: at + 4 * day, kind: 'fed' }];
    expect(
      entryEffects(
        nightsOf(21, () => 1700),
        fed,
      ).map(({ nightsBefore, nightsAfter }) => [nightsBefore, nightsAfter]),
    ).toEqual([
      [7, 3],
      [3, 6],
    ]);
  });

  it('is not looked for after a note or a cover', () => {
    expect(
      entryEffects(
        nightsOf(21, () => 1700),
        [
          { at, kind: 'note' },
          { at, kind: 'covered' },
        ],
      ),
    ).toEqual([]);
  });
});
