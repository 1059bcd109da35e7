import { describe, expect, it } from 'vitest';
import { setupSteps, type SetupFacts } from '@/lib/analysis/setup';
import { plainText } from '@/lib/wording/phrase';
import { missingSentence, setupSentence, stepSays } from '@/lib/wording/setup';

const NOTHING: SetupFacts = {
  ...{ nodes: [], points: [], sources: [], channels: [], loops: [] },
  ...{ rulesInForce: 0, drafts: 0, putOff: [] },
};
const NODE: SetupFacts = { ...NOTHING, nodes: [{ key: 'LH-1', relays: 8, isHeard: false }] };
const says = (facts: SetupFacts, step: string) => {
  const one = setupSteps(facts).find((found) => found.step === step);
  return one === undefined ? '' : stepSays(one, facts);
};

describe('the set-up’s sentence', () => {
  it('tells how far it is and what comes next', () => {
    expect(plainText(setupSentence(setupSteps(NOTHING)))).toBe(
      'One of eight steps is done. Next: field nodes.',
    );
    expect(plainText(setupSentence(setupSteps({ ...NODE, putOff: ['source'] })))).toBe(
      'Two of eight steps are done. One is put off. Next: points.',
    );
  });

  it('says so when all that is left waits for what was put off', () => {
    expect(plainText(setupSentence(setupSteps({ ...NOTHING, putOff: ['node', 'source'] })))).toBe(
      'One of eight steps is done. Two are put off. What is left waits for what was put off.',
    );
  });
});

describe('Wiring’s first sentence', () => {
  it('is what is missing', () => {
    expect(plainText(missingSentence(setupSteps(NODE)))).toBe(
      'Still missing: a point of the house air or a bench, a source of heat, a channel, a loop and a rule in force.',
    );
  });
  it('leaves out what was put off, and is silent where Wiring itself says that no node is there', () => {
    const facts = { ...NODE, putOff: ['source', 'loop', 'channel', 'rule'] };
    expect(plainText(missingSentence(setupSteps(facts)))).toBe(
      'Still missing: a point of the house air or a bench.',
    );
    expect(missingSentence(setupSteps(NOTHING))).toEqual([]);
  });
});

describe('a step', () => {
  it('says what is there and what it waits for', () => {
    expect(says(NODE, 'node')).toBe('One node. LH-1 has never answered: put the token into it.');
    expect(says(NODE, 'point')).toBe('None yet.');
    expect(says(NOTHING, 'rule')).toBe('Waits for points and a channel.');
    expect(says({ ...NODE, points: [{ key: 'c', role: 'heap-core', isMeasured: true }] }, 'point')).toBe(
      'One point, none of them the house air or a bench.',
    );
  });
});
