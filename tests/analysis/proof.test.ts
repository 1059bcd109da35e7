import { describe, expect, it } from 'vitest';
import { gainOfRun } from '@/lib/analysis/gain-run';
import {
  CLEAR_HOLDS_MS,
  isClear,
  nextStep,
  proofSteps,
  stepBefore,
  type ProofNeeds,
  type ProofStep,
  type StepWord,
} from '@/lib/analysis/proof';

const bare: ProofNeeds = {
  ...{ hasRunProof: false, hasLoop: false, hasFallback: false, nodeCanFallback: null },
  ...{ hasFrostLimit: false, warms: false, lastResortSeen: false },
};
const whole: ProofNeeds = {
  ...{ hasRunProof: true, hasLoop: true, hasFallback: true, nodeCanFallback: true },
  ...{ hasFrostLimit: true, warms: true, lastResortSeen: false },
};
const done = (...steps: ProofStep[]): StepWord[] =>
  steps.map((step, place) => ({ step, result: 'done', at: place }));
const states = (words: StepWord[], needs = bare) =>
  Object.fromEntries(proofSteps(words, needs).map((one) => [one.step, one.state]));

describe('the steps of a proof', () => {
  it('go in order, each waiting for those before it', () => {
    const steps = proofSteps(done('dead'), bare);
    expect(nextStep(steps)).toBe('rating');
    expect(stepBefore(steps, 'rating')).toBeNull();
    expect(stepBefore(steps, 'run')).toBe('rating');
    // a step that is done may be done again
    expect(stepBefore(steps, 'dead')).toBeNull();
  });

  it('leave out what the channel has not, with the reason', () => {
    const because = (needs: ProofNeeds) =>
      proofSteps([], needs).flatMap((one) => (one.because === null ? [] : [one.because]));
    expect(because(bare)).toEqual(['no-run-proof', 'no-loop', 'no-fallback', 'no-frost-limit']);
    expect(because(whole)).toEqual([]);
    expect(because({ ...whole, nodeCanFallback: false, warms: false })).toEqual([
      'node-cannot',
      'does-not-warm',
    ]);
    expect(because({ ...whole, lastResortSeen: true })).toEqual(['seen-lately']);
  });

  it('end when all that is needed is done or left out for a reason', () => {
    const words = done('dead', 'rating', 'photographs', 'clear', 'run', 'seen', 'unplugged');
    expect(nextStep(proofSteps(words, bare))).toBeNull();
    expect(nextStep(proofSteps(words, whole))).toBe('current');
    const without: StepWord[] = [...words, { step: 'gain', result: 'without', at: 9 }];
    expect(states(without, { ...bare, hasLoop: true })).toMatchObject({ gain: 'without' });
  });

  it('begin with a dead circuit again after a load that moved the wrong way', () => {
    const words: StepWord[] = [
      ...done('dead', 'rating', 'photographs', 'clear', 'run'),
      { step: 'seen', result: 'failed', at: 9 },
    ];
    expect(states(words)).toMatchObject({
      ...{ dead: 'open', rating: 'open', photographs: 'done', clear: 'open', run: 'open', seen: 'failed' },
    });
    const mended = [...words, { step: 'dead', result: 'done', at: 10 } as const];
    expect(states(mended)).toMatchObject({ dead: 'done', clear: 'open' });
  });

  it('believe for ten minutes that nobody is at the load', () => {
    const steps = proofSteps([{ step: 'clear', result: 'done', at: 1000 }], bare);
    expect(isClear(steps, 1000 + CLEAR_HOLDS_MS)).toBe(true);
    expect(isClear(steps, 1001 + CLEAR_HOLDS_MS)).toBe(false);
    expect(isClear(proofSteps([], bare), 1000)).toBe(false);
  });
});

describe('the gain of a run', () => {
  const every = (value: (minute: number) => number) =>
    Array.from({ length: 11 }, (_, place) => ({ at: place * 30_000, value: value(place / 2) }));

  it('is return minus intake over its last third, with both probes’ errors', () => {
    // 5 min; from 3 min 20 s on four readings, 10.2 °C against 4 °C: 6.2 K, and √(0.3² + 0.4²) = 0.5 K
    const intake = { readings: every(() => 4), sd: 0.3 };
    const back = { readings: every((minute) => (minute < 3.3 ? 5 : 10.2)), sd: 0.4 };
    const gain = gainOfRun(intake, back, 0, 300_000);
    expect(gain?.kelvin).toBeCloseTo(6.2, 9);
    expect(gain?.sd).toBeCloseTo(0.5, 9);
  });

  it('is wider where the readings scatter: s² ÷ n comes in', () => {
    // the four values 10, 12, 10, 12 against 4: mean 7, s² = 4/3, ÷ 4 = 1/3
    const back = { readings: every((minute) => 10 + 2 * ((minute * 2) % 2)), sd: 0 };
    const gain = gainOfRun({ readings: every(() => 4), sd: 0 }, back, 0, 300_000);
    expect(gain?.kelvin).toBeCloseTo(7, 9);
    expect(gain?.sd).toBeCloseTo(Math.sqrt(1 / 3), 9);
  });

  it('is not known without readings of both ends in its last third', () => {
    const early = every(() => 4).slice(0, 5);
    const all = every(() => 9);
    expect(gainOfRun({ readings: all, sd: 0 }, { readings: early, sd: 0 }, 0, 300_000)).toBeNull();
    expect(gainOfRun({ readings: [], sd: 0 }, { readings: all, sd: 0 }, 0, 300_000)).toBeNull();
  });
});
