// What is done of a set-up is told from what there is; nothing is ticked by hand.
import { describe, expect, it } from 'vitest';
import { nextStep, setupSteps, SETUP_STEPS, type SetupFacts } from '@/lib/analysis/setup';

const NOTHING: SetupFacts = {
  ...{ nodes: [], points: [], sources: [], channels: [], loops: [] },
  ...{ rulesInForce: 0, drafts: 0, putOff: [] },
};
const WIRED: SetupFacts = {
  nodes: [{ key: 'LH-1', relays: 8, isHeard: true }],
  points: [
    { key: 'bench-1', role: 'bench', isMeasured: true },
    { key: 'in', role: 'loop-intake', isMeasured: true },
    { key: 'out', role: 'loop-return', isMeasured: true },
  ],
  sources: [{ slug: 'gate-heap', kind: 'heap' }],
  channels: [{ key: 'fan', label: 'Fan', source: 'gate-heap', isProved: true }],
  loops: [{ source: 'gate-heap' }],
  ...{ rulesInForce: 1, drafts: 0, putOff: [] },
};
const states = (facts: SetupFacts) =>
  Object.fromEntries(setupSteps(facts).map((one) => [one.step, one.state]));

describe('set-up', () => {
  it('of a bare house begins with a node, and says what waits for what', () => {
    expect(states(NOTHING)).toEqual({
      ...{ house: 'done', node: 'open', point: 'waits', source: 'open', channel: 'waits' },
      ...{ loop: 'waits', rule: 'waits', proving: 'waits', sheet: 'waits' },
    });
    expect(setupSteps(NOTHING).find((one) => one.step === 'rule')?.for).toEqual(['point', 'channel']);
    expect(nextStep(setupSteps(NOTHING))?.step).toBe('node');
  });

  it('of a wired house is done, and only the sheet is left', () => {
    const all = states(WIRED);
    expect(all).toEqual({ ...Object.fromEntries(SETUP_STEPS.map((one) => [one, 'done'])), sheet: 'open' });
    expect(nextStep(setupSteps(WIRED))).toBeNull();
  });

  it('leaves out what was put off, and takes it up again', () => {
    const facts = { ...NOTHING, putOff: ['node', 'source'] };
    expect(states(facts)).toMatchObject({ node: 'put-off', source: 'put-off' });
    expect(nextStep(setupSteps(facts))).toBeNull();
    expect(nextStep(setupSteps({ ...facts, putOff: ['node'] }))?.step).toBe('source');
  });

  it('does not call a step put off that is done meanwhile', () => {
    expect(states({ ...WIRED, putOff: ['loop', 'rule'] })).toMatchObject({ loop: 'done', rule: 'done' });
  });

  it('wants a point of the house itself: a heap’s core tells nothing of frost', () => {
    const core = { key: 'core', role: 'heap-core', isMeasured: true };
    const derived = { key: 'mean', role: 'house-air', isMeasured: false };
    expect(states({ ...WIRED, points: [core, derived] })).toMatchObject({ point: 'open' });
  });

  it('wants a loop of every heap, and none of a heater', () => {
    const yew = { slug: 'yew-heap', kind: 'heap' };
    expect(states({ ...WIRED, sources: [...WIRED.sources, yew] })).toMatchObject({ loop: 'open' });
    expect(states({ ...WIRED, loops: [], sources: [{ slug: 'mat', kind: 'heater' }] })).toMatchObject({
      loop: 'done',
    });
  });

  it('counts a draft as no rule, and one unproved channel as not proved', () => {
    expect(states({ ...WIRED, rulesInForce: 0, drafts: 2 })).toMatchObject({ rule: 'open' });
    const open = { key: 'mat', label: 'Mat', source: null, isProved: false };
    expect(states({ ...WIRED, channels: [...WIRED.channels, open] })).toMatchObject({ proving: 'open' });
  });
});
