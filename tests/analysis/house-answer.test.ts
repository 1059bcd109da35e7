// A house made by a formula, so that what is measured of it is known beforehand.
import { describe, expect, it } from 'vitest';
import { liftOf } from '@/lib/analysis/lift';
import { responseOf } from '@/lib/analysis/response';
import { runsOf, type LoadRun, type Stepped } from '@/lib/analysis/runs';
import type { Span } from '@/lib/analysis/spans';

const MINUTE = 60_000;
const STEP = 5 * MINUTE;
const always = () => true;

/** First order, exact from minute to minute: toward `on` or `off` K over outdoors; the steps are means of five minutes. */
function made(
  { tauS, onK, offK, drawMin, restMin }: Record<'tauS' | 'onK' | 'offK' | 'drawMin' | 'restMin', number>,
  noise: (minute: number) => number = () => 0,
) {
  const minutes = 20 * 60;
  const outdoors = (minute: number) => -5 + 3 * Math.sin(minute / 200);
  const runs: LoadRun[] = [];
  const values: number[] = [];
  let excess = offK;
  for (let minute = 0; minute < minutes; minute += 1) {
    const isOn = minute % (drawMin + restMin) >= restMin;
    const begins = isOn && minute % (drawMin + restMin) === restMin;
    if (begins) {
      const from = minute * MINUTE;
      runs.push({ from, to: from + drawMin * MINUTE, stoodS: restMin * 60, endedBy: 'rest' });
    }
    const target = isOn ? onK : offK;
    values.push(excess + noise(minute));
    excess = target + (excess - target) * Math.exp(-60 / tauS);
  }
  const stepped = (of: (minute: number) => number): Stepped => {
    const at = Array.from({ length: minutes / 5 }, (_, step) => step * STEP);
    const mean = at.map((begin) => {
      const first = begin / MINUTE;
      return [0, 1, 2, 3, 4].reduce((sum, more) => sum + of(first + more), 0) / 5;
    });
    return { stepMs: STEP, at, mean };
  };
  return {
    runs,
    point: stepped((minute) => (values[minute] ?? 0) + outdoors(minute)),
    over: stepped((minute) => values[minute] ?? 0),
    outdoors: stepped(outdoors),
  };
}

/** Seeded, so that a failure comes again: mean 0, at most ±`size`. */
function noiseOf(size: number): (minute: number) => number {
  let state = 12345;
  return () => {
    state = (state * 1103515245 + 12345) % 2147483648;
    return size * (state / 1073741824 - 1);
  };
}

/** Where a saw-tooth settles at the end of each draw, by its closed form. */
function peak(tauS: number, onK: number, offK: number, drawS: number, restS: number): number {
  const [a, b] = [Math.exp(-drawS / tauS), Math.exp(-restS / tauS)];
  return (onK * (1 - a) + offK * (1 - b) * a) / (1 - a * b);
}

describe('how much warmer than outdoors a house gets', () => {
  it('is the top of the saw-tooth that draws and rests settle at', () => {
    const house = { tauS: 7200, onK: 16, offK: 4, drawMin: 40, restMin: 30 };
    const { runs, point, outdoors } = made(house);
    // the last minutes of a draw lie a little under its very end
    const top = peak(7200, 16, 4, 2400, 1800);
    const lift = liftOf(runs, point, outdoors, always) ?? NaN;
    expect(lift).toBeLessThan(top);
    expect(lift).toBeGreaterThan(top - 0.5);
  });

  it('is what a run of hours comes to, whatever ends it', () => {
    const { runs, point, outdoors } = made({ tauS: 1800, onK: 9, offK: 2, drawMin: 540, restMin: 30 });
    const byBand = runs.map((run) => ({ ...run, endedBy: 'idle' as const }));
    expect(liftOf(byBand, point, outdoors, always)).toBeCloseTo(9, 1);
  });

  it('is not known where the band ended every run: the house could have got warmer', () => {
    const { runs, point, outdoors } = made({ tauS: 7200, onK: 16, offK: 4, drawMin: 40, restMin: 30 });
    const byBand = runs.map((run) => ({ ...run, endedBy: 'idle' as const }));
    expect(liftOf(byBand, point, outdoors, always)).toBeNull();
  });

  it('is not known by day, of too few runs, or where a sensor was silent', () => {
    const { runs, point, outdoors } = made({ tauS: 7200, onK: 16, offK: 4, drawMin: 40, restMin: 30 });
    expect(liftOf(runs, point, outdoors, () => false)).toBeNull();
    expect(liftOf(runs.slice(0, 5), point, outdoors, always)).toBeNull();
    expect(liftOf(runs, point, { ...outdoors, at: [], mean: [] }, always)).toBeNull();
  });
});

describe('how a house answers a start', () => {
  it.each([
    [1800, 6],
    [3600, 8],
    [7200, 12],
  ])('gives back τ %i s and a rise of %i K', (tauS, riseK) => {
    const house = { tauS, onK: 4 + riseK, offK: 4, drawMin: 60, restMin: 45 };
    const { runs, over } = made(house);
    const found = responseOf(runs, over, always);
    // each only within a fifth, for a draw of an hour shows little of a τ of two; their quotient, which is needed, well
    expect(Math.abs((found?.tauS ?? 0) / tauS - 1)).toBeLessThan(0.2);
    expect(Math.abs((found?.riseK ?? 0) / riseK - 1)).toBeLessThan(0.2);
    const perS = (found?.riseK ?? 0) / (found?.tauS ?? 1);
    expect(Math.abs(perS / (riseK / tauS) - 1)).toBeLessThan(0.03);
  });

  it('still does under noise of ±0.3 K', () => {
    const house = { tauS: 3600, onK: 12, offK: 4, drawMin: 60, restMin: 45 };
    const { runs, over } = made(house, noiseOf(0.3));
    const found = responseOf(runs, over, always);
    const perS = (found?.riseK ?? 0) / (found?.tauS ?? 1);
    expect(perS / (8 / 3600)).toBeGreaterThan(0.8);
    expect(perS / (8 / 3600)).toBeLessThan(1.2);
  });

  it('is not known of a point that does not answer, of too few starts, or by day', () => {
    const still = made({ tauS: 3600, onK: 4, offK: 4, drawMin: 60, restMin: 45 }, noiseOf(0.3));
    expect(responseOf(still.runs, still.over, always)).toBeNull();
    const { runs, over } = made({ tauS: 3600, onK: 12, offK: 4, drawMin: 60, restMin: 45 });
    expect(responseOf(runs.slice(0, 5), over, always)).toBeNull();
    expect(responseOf(runs, over, () => false)).toBeNull();
  });
});

describe('runs', () => {
  const span = (from: number, to: number, on: boolean, claim: Span['claim']): Span => ({
    ...{ from: from * MINUTE, to: to * MINUTE, on, claim },
    kind: on ? 'run' : 'off',
  });
  it('go on through a change of claim, and say what ended them', () => {
    expect(
      runsOf([
        span(0, 30, false, 'idle'),
        span(30, 50, true, 'band'),
        span(50, 60, true, 'frost'),
        span(60, 90, false, 'rest'),
        span(90, 95, false, 'idle'),
        span(95, 99, true, 'hand'),
      ]),
    ).toEqual([
      { from: 30 * MINUTE, to: 60 * MINUTE, stoodS: 1800, endedBy: 'rest' },
      { from: 95 * MINUTE, to: 99 * MINUTE, stoodS: 2100, endedBy: null },
    ]);
  });
});
