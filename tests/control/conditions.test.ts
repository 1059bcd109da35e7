import fc from 'fast-check';
import { Engine } from 'json-rules-engine';
import { describe, expect, it } from 'vitest';
import { canNeverHold } from '@/lib/control/checks/never-holds';
import { compileConditions, type FactValue, type Verdict } from '@/lib/control/conditions';
import type { Condition, ConditionNode, ConditionTree } from '@/lib/control/rule-body';

const FACTS = ['core', 'base', 'time.hour', 'time.sunUp'];
const number = fc.integer({ min: -3, max: 3 }).map((one) => one / 2);
const leaf: fc.Arbitrary<Condition> = fc.oneof(
  fc.record({
    fact: fc.constantFrom(...FACTS),
    operator: fc.constantFrom(
      'equal',
      'notEqual',
      'lessThan',
      'lessThanInclusive',
      'greaterThan',
      'greaterThanInclusive',
    ),
    value: fc.oneof(number, fc.boolean()),
  }),
  fc.record({
    fact: fc.constantFrom(...FACTS),
    operator: fc.constantFrom('in', 'notIn'),
    value: fc.array(number, { minLength: 1, maxLength: 4 }),
  }),
);
const { tree } = fc.letrec<{ tree: ConditionTree; node: ConditionNode }>((tie) => ({
  node: fc.oneof({ maxDepth: 3, withCrossShrink: true }, leaf, tie('tree')),
  tree: fc.oneof(
    fc.record({ all: fc.array(tie('node'), { minLength: 1, maxLength: 3 }) }),
    fc.record({ any: fc.array(tie('node'), { minLength: 1, maxLength: 3 }) }),
    fc.record({ not: tie('node') }),
  ),
}));
const facts = fc.record({ core: number, base: number, 'time.hour': number, 'time.sunUp': fc.boolean() });

async function library(conditions: ConditionTree, values: Record<string, FactValue>): Promise<boolean> {
  const engine = new Engine();
  // the library's own types want at least one more field that it does not need
  engine.addRule({
    conditions: conditions,
    event: { type: 'met' },
  });
  const { events } = await engine.run(values);
  return events.length > 0;
}

const verdictOf = (conditions: ConditionTree, values: Record<string, FactValue | null>): Verdict =>
  compileConditions(conditions).verdict((fact) => values[fact] ?? null);

describe('compiled conditions', () => {
  it('give the library’s verdict on any tree while every fact is there', async () => {
    await fc.assert(
      fc.asyncProperty(tree, facts, async (conditions, values) => {
        expect(verdictOf(conditions, values)).toBe(await library(conditions, values));
      }),
      { numRuns: 2000 },
    );
  });

  it('are known only where the missing facts cannot change them', () => {
    fc.assert(
      fc.property(tree, facts, facts, fc.subarray(FACTS), (conditions, values, others, missing) => {
        const holes = Object.fromEntries(
          Object.entries(values).map(([key, value]) => [key, missing.includes(key) ? null : value]),
        );
        const verdict = verdictOf(conditions, holes);
        if (verdict === null) return;
        const filled = Object.fromEntries(
          Object.entries(values).map(([key, value]) => [
            key,
            missing.includes(key) ? ((others as Record<string, FactValue>)[key] ?? value) : value,
          ]),
        );
        expect(verdictOf(conditions, filled)).toBe(verdict);
      }),
    );
  });

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

  it('is never said of one that some facts meet', () => {
    fc.assert(
      fc.property(tree, facts, fc.integer({ min: 0, max: 23 }), (conditions, values, hour) => {
        const now = { ...values, 'time.hour': hour };
        if (verdictOf(conditions, now) === true) expect(canNeverHold(conditions)).toBe(false);
      }),
      { numRuns: 2000 },
    );
  });
});
