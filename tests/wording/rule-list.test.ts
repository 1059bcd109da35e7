import { describe, expect, it } from 'vitest';
import { plainText } from '@/lib/wording/phrase';
import { rulesSentence, type RuleStanding } from '@/lib/wording/rule-list';

const rule = (channelLabel: string, change: Partial<RuleStanding> = {}): RuleStanding => ({
  channelLabel,
  isInForce: true,
  hasDraft: false,
  state: 'off',
  ...change,
});
const says = (...rules: RuleStanding[]) => plainText(rulesSentence(rules));

describe('the sentence over the rules', () => {
  it('says what no rule means', () => {
    expect(says()).toBe('No rule yet, so nothing runs by itself. Frost help and hand still work.');
  });
  it('counts what is in force and names what runs', () => {
    expect(says(rule('Gate-heap fan', { state: 'on' }), rule('Bench mat'))).toBe(
      'Two rules are in force. The gate-heap fan runs now.',
    );
    expect(says(rule('Gate-heap fan', { state: 'on' }), rule('Ground fan', { state: 'on' }))).toBe(
      'Two rules are in force. The gate-heap fan and ground fan run now.',
    );
  });
  it('names a channel with two rules once', () => {
    expect(says(rule('Gate-heap fan', { state: 'on' }), rule('Gate-heap fan', { state: 'on' }))).toMatch(
      /The gate-heap fan runs now\.$/,
    );
  });
  it('says nothing of what runs before the worker told', () => {
    expect(says(rule('Gate-heap fan', { state: null }))).toBe('One rule is in force.');
  });
  it('tells of drafts that wait', () => {
    expect(says(rule('Bench mat', { isInForce: false, hasDraft: true }))).toBe(
      'No rule is in force, so nothing runs by itself. One draft waits, of the bench mat.',
    );
  });
});
