import { describe, expect, it } from 'vitest';
import { retireWords, type RetireFacts } from '@/lib/wording/rule-retire';

const facts: RetireFacts = {
  channelLabel: 'Gate-heap fan',
  others: [],
  isInForce: true,
  frostHelp: true,
  runsWithoutCommand: false,
};

describe('before a rule is retired', () => {
  it('a load without another rule stands still, and what still moves it is said', () => {
    expect(retireWords(facts)).toBe(
      'From the next reading on nothing asks for the gate-heap fan: it stands still. Frost help and hand still work.',
    );
    expect(retireWords({ ...facts, frostHelp: false })).toMatch(/It can still be run by hand\.$/);
  });

  it('a load with other rules goes by these, by name', () => {
    expect(retireWords({ ...facts, others: ['Fan by day'] })).toMatch(
      /goes by its other rule, Fan by day\.$/,
    );
    expect(retireWords({ ...facts, others: ['A', 'B', 'C'] })).toMatch(
      /goes by its other rules, A, B and C\.$/,
    );
  });

  it('a load on the closed contact runs where nothing commands it', () => {
    expect(retireWords({ ...facts, runsWithoutCommand: true })).toMatch(
      /runs when the node is not commanded/,
    );
  });

  it('a rule that is not in force moves nothing', () => {
    expect(retireWords({ ...facts, isInForce: false })).toMatch(/no load is touched/);
  });
});
