import { describe, expect, it } from 'vitest';
import { USUAL, type Preferences } from '@/lib/units/preferences';
import type { Condition, ConditionNode } from '@/lib/control/rule-body';
import { capitalFirst, conditionWords } from '@/lib/wording/rule-conditions';
import { plainText } from '@/lib/wording/phrase';

const names = {
  channel: { label: 'Gate-heap fan', loadKind: 'motor' },
  points: [
    { key: 'gate-core', name: 'Gate heap core', role: 'heap-core', unit: 'Cel' },
    { key: 'lift', name: 'Lift over outdoors', role: 'other', unit: 'K' },
    { key: 'rh', name: 'House humidity', role: 'humidity', unit: '%RH' },
  ],
};
const says = (
  node: ConditionNode,
  temperature: Preferences['temperature'] = 'C',
  clock: Preferences['clock'] = 24,
) => plainText(conditionWords(node, names, { ...USUAL, temperature, clock })).replaceAll('\u00a0', ' ');
const leaf = (fact: string, operator: Condition['operator'], value: Condition['value']) => ({
  fact,
  operator,
  value,
});

describe('conditions in words', () => {
  it.each([
    [leaf('gate-core', 'greaterThanInclusive', 38), 'the heap’s core is at least 38.0 °C'],
    [leaf('gate-core', 'lessThan', 38), 'the heap’s core is below 38.0 °C'],
    [leaf('lift', 'greaterThan', 3), 'the lift over outdoors is above 3.0 °C'],
    [leaf('rh', 'lessThanInclusive', 90), 'the humidity is at most 90 % RH'],
    [leaf('gate-core', 'in', [40, 41]), 'the heap’s core is one of 40.0 °C or 41.0 °C'],
    [leaf('time.hour', 'greaterThanInclusive', 18), 'it is 18:00 or later'],
    [leaf('time.hour', 'greaterThan', 18), 'it is 19:00 or later'],
    [leaf('time.hour', 'lessThan', 6), 'it is before 06:00'],
    [leaf('time.hour', 'lessThanInclusive', 5), 'it is before 06:00'],
    [leaf('time.hour', 'equal', 23), 'it is between 23:00 and 00:00'],
    [leaf('time.month', 'in', [12, 1, 2]), 'the month is December, January or February'],
    [leaf('time.weekday', 'notEqual', 7), 'the day is not Sunday'],
    [leaf('time.sunUp', 'equal', false), 'the sun is down'],
    [leaf('time.sunUp', 'notEqual', false), 'the sun is up'],
  ])('%j', (node, words) => expect(says(node)).toBe(words));

  it('reads a difference in °F as a difference', () => {
    expect(says(leaf('lift', 'greaterThan', 3), 'F')).toBe('the lift over outdoors is above 5.4 °F');
  });

  it('joins by and, and brackets what could be read in two ways', () => {
    const a = leaf('gate-core', 'greaterThan', 38);
    const b = leaf('time.hour', 'lessThan', 6);
    const c = leaf('time.sunUp', 'equal', true);
    expect(says({ all: [a, { any: [b, c] }] })).toBe(
      'the heap’s core is above 38.0 °C and (it is before 06:00 or the sun is up)',
    );
  });

  it('says a “not” by its opposite, also of a group', () => {
    const a = leaf('gate-core', 'greaterThan', 38);
    const b = leaf('time.hour', 'lessThan', 6);
    const c = leaf('time.sunUp', 'equal', true);
    expect(says({ not: a })).toBe('the heap’s core is at most 38.0 °C');
    expect(says({ not: b })).toBe('it is 06:00 or later');
    expect(says({ not: c })).toBe('the sun is down');
    expect(says({ not: { not: a } })).toBe('the heap’s core is above 38.0 °C');
    expect(says({ not: { any: [a] } })).toBe('the heap’s core is at most 38.0 °C');
    expect(says({ not: { any: [a, c] } })).toBe('the heap’s core is at most 38.0 °C and the sun is down');
    expect(says({ not: { all: [a, b] } }, 'C', 12)).toBe(
      'the heap’s core is at most 38.0 °C or it is 6:00 am or later',
    );
    expect(says({ any: [a, { not: { any: [b, c] } }] })).toBe(
      'the heap’s core is above 38.0 °C or (it is 06:00 or later and the sun is down)',
    );
  });

  it('can begin a line', () => {
    const phrases = conditionWords(leaf('time.sunUp', 'equal', true), names, USUAL);
    expect(plainText(capitalFirst(phrases))).toBe('The sun is up');
    expect(capitalFirst([])).toEqual([]);
  });
});
