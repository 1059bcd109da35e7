import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { textOfValue, valueOfText, type FactOf } from '@/components/rules/conditions/condition-text';
import {
  draftOf,
  isGroup,
  nodesUnder,
  treeOf,
  type DraftGroup,
  type DraftNode,
} from '@/components/rules/conditions/draft-tree';
import { addFact, addGroup, move, remove, type Move } from '@/components/rules/conditions/edit-tree';
import { factWords, readerOf, standingOf } from '@/components/rules/conditions/present';
import { compileConditions } from '@/lib/control/conditions';
import type { ConditionNode, ConditionTree } from '@/lib/control/rule-body';
import { ConditionTree as Schema } from '@/lib/schema/rule';
import { USUAL } from '@/lib/units/preferences';

const factOf: FactOf = (fact) =>
  ({
    core: { unit: 'Cel', role: 'heap-core' },
    air: { unit: 'Cel', role: 'house-air' },
    door: { unit: '/', role: 'contact' },
  })[fact];
const draft = (tree: ConditionTree) =>
  draftOf(tree, (fact, value) => textOfValue(fact, value, factOf, USUAL));
const back = (node: DraftNode) =>
  treeOf(node, (leaf) => {
    const typed = valueOfText(leaf, factOf, USUAL);
    return 'value' in typed ? typed.value : undefined;
  });
const core = (value: number) => ({ fact: 'core', operator: 'greaterThan' as const, value });
/** A tree in short: facts by their figure, groups in brackets. */
const short = (node: DraftNode): string =>
  `${node.isNegated ? '!' : ''}${isGroup(node) ? `${node.mode}(${node.nodes.map(short).join(' ')})` : node.value}`;
const start = draft({ all: [core(1), { any: [core(2), core(3)] }, core(4)] });
const idOf = (value: string) =>
  nodesUnder(start).find((one) => !isGroup(one) && one.value === value)?.id ?? '';
const groupId = start.nodes[1]?.id ?? '';
const moved = (id: string, how: Move) => {
  const next = move(start, id, how);
  return next === null ? null : short(next);
};

describe('a tree of conditions', () => {
  const leaf = fc.record({
    fact: fc.constantFrom('core', 'air'),
    operator: fc.constantFrom('lessThan', 'greaterThanInclusive', 'equal', 'notEqual'),
    value: fc.integer({ min: -20, max: 20 }).map((tenths) => tenths / 2),
  });
  const { node } = fc.letrec<{ node: ConditionNode }>((tie) => ({
    node: fc.oneof(
      { maxDepth: 4 },
      leaf,
      fc.record({ all: fc.array(tie('node'), { minLength: 1, maxLength: 3 }) }),
      fc.record({ any: fc.array(tie('node'), { minLength: 1, maxLength: 3 }) }),
      fc.record({ not: tie('node') }),
    ),
  }));
  const tree = node.map((one): ConditionTree => ('fact' in one ? { all: [one] } : one));
  const value = fc.option(fc.integer({ min: -20, max: 20 }).map((tenths) => tenths / 2));

  it('comes back from its form with the same verdict for every state of its facts', () => {
    fc.assert(
      fc.property(tree, value, value, (given, coreNow, airNow) => {
        const made = Schema.parse(back(draft(given)));
        const read = (fact: string) => (fact === 'core' ? coreNow : airNow);
        expect(compileConditions(made).verdict(read)).toBe(compileConditions(given).verdict(read));
      }),
    );
  });

  it('comes back letter by letter where no “not” stands on another', () => {
    const given: ConditionTree = {
      any: [core(1), { not: { all: [core(2), { not: core(3) }] } }, { any: [core(4)] }],
    };
    expect(back(draft(given))).toEqual(given);
  });

  it('loses and doubles nothing, whatever is moved where', () => {
    const moves = fc.array(
      fc.tuple(fc.nat(), fc.constantFrom<Move>('up', 'down', 'in', 'out', 'group', 'ungroup')),
      { maxLength: 12 },
    );
    fc.assert(
      fc.property(tree, moves, (given, list) => {
        let root: DraftGroup = draft(given);
        const values = (one: DraftGroup) =>
          nodesUnder(one)
            .flatMap((each) => (isGroup(each) ? [] : [`${each.fact} ${each.operator} ${each.value}`]))
            .sort();
        const before = values(root);
        for (const [pick, how] of list) {
          const all = nodesUnder(root);
          root = move(root, all[pick % all.length]?.id ?? '', how) ?? root;
          expect(values(root)).toEqual(before);
          const ids = nodesUnder(root).map((one) => one.id);
          expect(new Set(ids).size).toBe(ids.length);
          expect(nodesUnder(root).every((one) => !isGroup(one) || one.nodes.length > 0)).toBe(true);
        }
      }),
    );
  });

  it.each<[string, string, Move, string | null]>([
    ['up', '4', 'up', 'all(1 4 any(2 3))'],
    ['up from the first place', '1', 'up', null],
    ['down', '1', 'down', 'all(any(2 3) 1 4)'],
    ['into the group before it', '4', 'in', 'all(1 any(2 3 4))'],
    ['into the group after it', '1', 'in', 'all(any(1 2 3) 4)'],
    ['in where there is no group', '2', 'in', null],
    ['out, behind its group', '2', 'out', 'all(1 any(3) 2 4)'],
    ['out of the outermost', '1', 'out', null],
    ['into a group of its own, which asks the other thing', '1', 'group', 'all(any(1) any(2 3) 4)'],
  ])('moves a condition %s', (_what, which, how, said) => expect(moved(idOf(which), how)).toBe(said));

  it('takes a group apart where it stood', () => {
    expect(moved(groupId, 'ungroup')).toBe('all(1 2 3 4)');
    expect(moved(idOf('1'), 'ungroup')).toBeNull();
  });

  it('a group that is left without conditions goes too, the outermost stays', () => {
    const one = remove(remove(start, idOf('2')), idOf('3'));
    expect(short(one)).toBe('all(1 4)');
    const none = remove(remove(one, idOf('1')), idOf('4'));
    expect(short(none)).toBe('all()');
    expect(back(none)).toBeNull();
  });

  it('grows by a condition, or by a group that asks the other thing, under ids of their own', () => {
    const fact = addFact(start, groupId);
    expect(short(fact.root)).toBe('all(1 any(2 3 ) 4)');
    const group = addGroup(fact.root, groupId);
    expect(short(group.root)).toBe('all(1 any(2 3  all()) 4)');
    const ids = nodesUnder(group.root).map((one) => one.id);
    expect(new Set(ids).size).toBe(ids.length);
    expect(ids).toContain(group.id);
  });
});

describe('how a condition stands', () => {
  const clock = { 'time.hour': 23, 'time.month': 12, 'time.weekday': 1, 'time.sunUp': false };
  const state = (value: number | null, quality: 'good' | 'uncertain' | 'bad') => [
    { key: 'core', name: 'Core', role: 'heap-core', unit: 'Cel', at: null, why: null, value, quality },
  ];
  const stands = (
    tree: ConditionTree,
    value: number | null,
    quality: 'good' | 'uncertain' | 'bad' = 'good',
  ) => standingOf(draft(tree), readerOf(state(value, quality), clock), factOf, USUAL);
  const over: ConditionTree = { all: [core(38)] };

  it('goes by good readings only, in three values', () => {
    expect([stands(over, 39), stands(over, 38), stands(over, 39, 'uncertain')]).toEqual([true, false, null]);
    expect(stands({ not: core(38) }, 39, 'bad')).toBeNull();
    expect(stands({ any: [core(38), { fact: 'time.hour', operator: 'equal', value: 23 }] }, null)).toBe(true);
    expect(stands({ all: [core(38), { fact: 'time.sunUp', operator: 'equal', value: true }] }, null)).toBe(
      false,
    );
  });

  it('is not told of what cannot be read yet', () => {
    const fact = addFact(draft(over), draft(over).id);
    expect(standingOf(fact.root, () => 39, factOf, USUAL)).toBe('unfinished');
    expect(
      standingOf(
        draftOf(undefined, () => ''),
        () => 39,
        factOf,
        USUAL,
      ),
    ).toBe('unfinished');
  });

  it.each([
    ['core', 48.04, '48.0 °C'],
    ['time.hour', 23, '23:00 to 00:00'],
    ['time.month', 12, 'December'],
    ['time.weekday', 1, 'Monday'],
    ['time.sunUp', false, 'down'],
    ['door', 1, 'on'],
    ['core', null, 'not known'],
  ])('says %s %j as %j', (fact, value, words) =>
    expect(factWords(fact, value, factOf, USUAL).replaceAll('\u00a0', ' ')).toBe(words),
  );
});

describe('the value of a condition', () => {
  const american = { ...USUAL, temperature: 'F' as const };
  const value = (fact: string, operator: 'in' | 'lessThan' | 'equal', text: string, preferences = USUAL) =>
    valueOfText({ fact, operator, value: text }, factOf, preferences);
  it('is kept in °C, whatever it was typed in', () => {
    expect(value('core', 'lessThan', '100,4', american)).toEqual({ value: 38 });
    expect(textOfValue('core', 38, factOf, american)).toBe('100.4');
  });
  it('is a list where one of several is asked for', () => {
    expect(value('time.month', 'in', '12; 1; 2')).toEqual({ value: [12, 1, 2] });
    expect(value('core', 'in', '4,5; 5')).toEqual({ value: [4.5, 5] });
    expect(value('time.weekday', 'in', '')).toEqual({ error: 'Choose a day.' });
  });
  it('says what would be right', () => {
    expect(value('time.hour', 'lessThan', '24')).toEqual({ error: 'Give whole hours, 0 to 23.' });
    expect(value('core', 'equal', '<b>')).toEqual({ error: 'Give a number in °C, such as 4.5.' });
    expect(value('core', 'equal', '')).toEqual({ error: 'Give a number in °C, such as 4.5.' });
  });
});
