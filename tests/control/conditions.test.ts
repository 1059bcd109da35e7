import { describe, expect, it } from 'vitest';
import { canNeverHold } from '@/lib/control/checks/never-holds';
import { compileConditions, holds, type Verdict } from '@/lib/control/conditions';
import type { Condition, ConditionTree } from '@/lib/control/rule-body';

describe('three-valued logic', () => {
  const known = (value: boolean | null): Condition => ({
    fact: value === null ? 'nobody' : 'yes',
    operator: 'equal',
    value: value ?? true,
  });
  const read = (fact: string) => (fact === 'yes' ? true : null);
  const combine = (form: 'all' | 'any', a: Verdict, b: Verdict) =>
    compileConditions(form === 'all' ? { all: [known(a), known(b)] } : { any: [known(a), known(b)] }).verdict(
      read,
    );

  it.each<[Verdict, Verdict, Verdict, Verdict]>([
    [true, true, true, true],
    [true, false, false, true],
    [true, null, null, true],
    [false, true, false, true],
    [false, false, false, false],
    [false, null, false, null],
    [null, true, null, true],
    [null, false, false, null],
    [null, null, null, null],
  ])('%s and %s: all is %s, any is %s', (a, b, all, any) => {
    expect([combine('all', a, b), combine('any', a, b)]).toEqual([all, any]);
  });

  it.each<[Verdict, Verdict]>([
    [true, false],
    [false, true],
    [null, null],
  ])('not %s is %s', (a, not) => {
    expect(compileConditions({ not: known(a) }).verdict(read)).toBe(not);
  });
});

describe('a tree that can never hold', () => {
  const above = (value: number): Condition => ({ fact: 'core', operator: 'greaterThan', value });
  const below = (value: number): Condition => ({ fact: 'core', operator: 'lessThan', value });

  it.each<[string, ConditionTree, boolean]>([
    ['over 50 and under 40', { all: [above(50), below(40)] }, true],
    ['over 40 and under 50', { all: [above(40), below(50)] }, false],
    ['over 40 and under 40', { all: [above(40), below(40)] }, true],
    ['not (over 40 or under 41)', { not: { any: [above(40), below(41)] } }, true],
    [
      'hour in 1, 2 and not in 1, 2',
      {
        all: [
          { fact: 'time.hour', operator: 'in', value: [1, 2] },
          { fact: 'time.hour', operator: 'notIn', value: [2, 1] },
        ],
      },
      true,
    ],
    ['hour over 23', { all: [{ fact: 'time.hour', operator: 'greaterThan', value: 23 }] }, true],
    ['month 13', { all: [{ fact: 'time.month', operator: 'equal', value: 13 }] }, true],
    [
      'sun up and not up',
      {
        all: [
          { fact: 'time.sunUp', operator: 'equal', value: true },
          { not: { fact: 'time.sunUp', operator: 'equal', value: true } },
        ],
      },
      true,
    ],
    ['one branch of any left', { all: [above(50), { any: [below(40), above(60)] }] }, false],
  ])('%s: %o', (_, conditions, never) => {
    expect(canNeverHold(conditions)).toBe(never);
  });

  it('knows what a sensor can say', () => {
    expect(canNeverHold({ all: [above(90)] }, { core: { min: -40, max: 85 } })).toBe(true);
    expect(canNeverHold({ all: [above(80)] }, { core: { min: -40, max: 85 } })).toBe(false);
  });
});

describe('an operator', () => {
  const NUMBERS = [3.9, 4, 4.1];
  it.each<[Condition['operator'], Condition['value'], boolean[]]>([
    ['equal', 4, [false, true, false]],
    ['notEqual', 4, [true, false, true]],
    ['lessThan', 4, [true, false, false]],
    ['lessThanInclusive', 4, [true, true, false]],
    ['greaterThan', 4, [false, false, true]],
    ['greaterThanInclusive', 4, [false, true, true]],
    ['in', [4, 5], [false, true, false]],
    ['notIn', [4, 5], [true, false, true]],
  ])('%s %j at, under and over its value', (operator, value, expected) => {
    expect(NUMBERS.map((fact) => holds({ fact: 'core', operator, value }, fact))).toEqual(expected);
    expect(holds({ fact: 'core', operator, value }, null)).toBeNull();
  });

  it.each<[Condition['operator'], boolean]>([
    ['lessThan', false],
    ['greaterThanInclusive', false],
    ['equal', true],
    ['notEqual', false],
  ])('%s true, of a fact that is true, is %s', (operator, expected) => {
    expect(holds({ fact: 'time.sunUp', operator, value: true }, true)).toBe(expected);
  });
});
