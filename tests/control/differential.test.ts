/** Compiled conditions against json-rules-engine, and the proof that a tree never holds against trying all. */
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
  node: fc.oneof({ maxDepth: 4, withCrossShrink: true }, leaf, tie('tree')),
  tree: fc.oneof(
    fc.record({ all: fc.array(tie('node'), { minLength: 1, maxLength: 4 }) }),
    fc.record({ any: fc.array(tie('node'), { minLength: 1, maxLength: 4 }) }),
    fc.record({ not: tie('node') }),
  ),
}));
const facts = fc.record({ core: number, base: number, 'time.hour': number, 'time.sunUp': fc.boolean() });

async function library(conditions: ConditionTree, values: Record<string, FactValue>): Promise<boolean> {
  const engine = new Engine();
  engine.addRule({ conditions, event: { type: 'met' } });
  const { events } = await engine.run(values);
  return events.length > 0;
}

const verdictOf = (conditions: ConditionTree, values: Record<string, FactValue | null>): Verdict =>
  compileConditions(conditions).verdict((fact) => values[fact] ?? null);

describe('compiled conditions', () => {
  it('give the library’s verdict on 10,000 random trees while every fact is there', async () => {
    const met = { yes: 0, no: 0 };
    await fc.assert(
      fc.asyncProperty(tree, facts, async (conditions, values) => {
        const verdict = verdictOf(conditions, values);
        expect(verdict).toBe(await library(conditions, values));
        met[verdict === true ? 'yes' : 'no'] += 1;
      }),
      { numRuns: 10_000 },
    );
    // trees that are nearly all met, or nearly none, would try little
    expect(Math.min(met.yes, met.no)).toBeGreaterThan(2000);
  }, 120_000);

  /** Kleene's logic by its definition: unknown stands for either; where both give the same, it is known. */
  const byBoth = (conditions: ConditionTree, values: Record<string, FactValue | null>): Verdict[] => {
    const [hole] = Object.keys(values).filter((key) => values[key] === null);
    if (hole === undefined) return [verdictOf(conditions, values)];
    const fills: FactValue[] = hole === 'time.sunUp' ? [true, false] : [-2, -1, -0.25, 0, 0.5, 1, 2];
    return fills.flatMap((fill) => byBoth(conditions, { ...values, [hole]: fill }));
  };

  it('are known only where no value of the missing facts would change them', () => {
    fc.assert(
      fc.property(tree, facts, fc.subarray(FACTS, { maxLength: 2 }), (conditions, values, missing) => {
        const holes = Object.fromEntries(
          Object.entries(values).map(([key, value]) => [key, missing.includes(key) ? null : value]),
        );
        const verdict = verdictOf(conditions, holes);
        if (verdict !== null) expect(new Set(byBoth(conditions, holes))).toEqual(new Set([verdict]));
      }),
      { numRuns: 2000 },
    );
  });
});

describe('the proof that a tree never holds', () => {
  const QUARTERS = Array.from({ length: 17 }, (_, index) => index / 4 - 2);
  /** The thresholds are halves from −1.5 to 1.5: these meet, part and surround all of them. */
  const EACH = { core: QUARTERS, base: QUARTERS, 'time.hour': [0, 1, 2, 23], 'time.sunUp': [true, false] };

  function anyHolds(conditions: ConditionTree, known: (core: number) => boolean): boolean {
    const { verdict } = compileConditions(conditions);
    for (const core of EACH.core.filter(known))
      for (const base of EACH.base)
        for (const hour of EACH['time.hour'])
          for (const sunUp of EACH['time.sunUp']) {
            const values: Record<string, FactValue> = { core, base, 'time.hour': hour, 'time.sunUp': sunUp };
            if (verdict((fact) => values[fact] ?? null) === true) return true;
          }
    return false;
  }

  it('is given where trying all finds none, and only there', () => {
    const found = { never: 0, sometimes: 0 };
    fc.assert(
      fc.property(tree, (conditions) => {
        const never = !anyHolds(conditions, () => true);
        expect(canNeverHold(conditions)).toBe(never);
        found[never ? 'never' : 'sometimes'] += 1;
      }),
      { numRuns: 3000 },
    );
    expect(found.never).toBeGreaterThan(100);
  }, 120_000);

  it('knows what a sensor can say', () => {
    fc.assert(
      fc.property(tree, number, number, (conditions, one, two) => {
        const [min, max] = [Math.min(one, two), Math.max(one, two)];
        const never = !anyHolds(conditions, (core) => core >= min && core <= max);
        expect(canNeverHold(conditions, { core: { min, max } })).toBe(never);
      }),
      { numRuns: 1000 },
    );
  }, 120_000);
});
