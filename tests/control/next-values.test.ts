/** What comes next where a condition asks for a value itself, and where a proof of running bears on a credit. */
import { describe, expect, it } from 'vitest';
import { explain } from '@/lib/control/explain';
import type { Condition, ConditionTree } from '@/lib/control/rule-body';
import { body, channel, H, house, MIN, point, rest, rule, source, START } from './house';
import { Player } from './player';

const next = (player: Player, key = 'fan') =>
  explain(player.plan, player.memory, player.observed, player.now, key)?.next ?? [];
/** Without what the band and the clock bring, which stand beside it. */
const of = (player: Player, name: string) => next(player).filter((one) => one['point'] === name);

const cold = { bench: 3, air: 8, core: 50, base: 40, step: 1 };
const points = [
  ...[point('bench', 'bench'), point('air', 'house-air'), point('core', 'heap-core')],
  ...[point('base', 'heap-base'), point('step', 'other', { unit: '1', min: null, max: null })],
];
/** A curtain's step, as its board counts it: 0 closed, 2 wide open. */
const asked = (operator: Condition['operator'], value: Condition['value'], step: number, around = tree) =>
  new Player(
    house({ points, rules: [rule('fan', body({ only: around({ fact: 'step', operator, value }) }))] }),
    { ...cold, step },
  );
const tree = (leaf: Condition): ConditionTree => ({ all: [leaf] });
const without = (leaf: Condition): ConditionTree => ({ not: leaf });

const on = { state: 'on', claim: 'band' };
const off = { state: 'off', claim: 'idle' };
const leaves = (value: number, then: object) =>
  (['above', 'below'] as const).map((side) => ({ kind: 'if', point: 'step', side, value, ...then }));
const comes = (side: 'above' | 'below', value: number, then: object) => [
  { kind: 'if', point: 'step', side, value, orAt: true, exactly: true, ...then },
];

describe('A condition that asks for a value itself', () => {
  it.each<[string, Player, object[]]>([
    ['is left either way', asked('equal', 1, 1), leaves(1, off)],
    ['is met from under it at it alone', asked('equal', 1, 0), comes('above', 1, on)],
    ['is met from over it at it alone', asked('equal', 1, 2), comes('below', 1, on)],
    ['is the other way round for one that must be another', asked('notEqual', 1, 1), leaves(1, on)],
    ['ends at a value that must not be', asked('notEqual', 1, 0), comes('above', 1, off)],
    ['of several is left from the one where it is', asked('in', [1, 2], 1), leaves(1, off)],
    ['of several is met at the nearest', asked('in', [1, 2], 0), comes('above', 1, on)],
    [
      'of several is met on either side',
      asked('in', [0, 2], 1),
      [...comes('below', 0, on), ...comes('above', 2, on)],
    ],
    ['that none may be is left either way', asked('notIn', [1, 2], 2), leaves(2, on)],
    ['that none may be ends at the nearest', asked('notIn', [1, 2], 3), comes('below', 2, off)],
    ['within a not is turned round', asked('equal', 1, 1, without), leaves(1, on)],
    ['of true or false is met by no number, and nothing is said', asked('equal', true, 1), []],
  ])('%s', (_, player, told) => {
    const found = of(player, 'step');
    expect(found).toHaveLength(told.length);
    expect(found).toEqual(expect.arrayContaining(told));
  });

  it.each<[string, Player, number, string]>([
    ['met', asked('equal', 1, 0), 1, 'on band'],
    ['jumped over', asked('equal', 1, 0), 1.5, 'off idle'],
    ['left by little', asked('in', [1, 2], 1), 1.000_001, 'off idle'],
    ['left for another of its list', asked('in', [1, 2], 1), 2, 'on band'],
  ])('does what was foreseen: %s', (_, player, step, says) => {
    player.at({ step });
    expect(player.says()).toBe(says);
  });

  it('hides nothing that lies behind it, which a reading may reach at one jump', () => {
    const only: ConditionTree = { all: [{ fact: 'bench', operator: 'notEqual', value: 5 }] };
    const player = new Player(house({ rules: [rule('fan', body({ only }))] }), { ...cold, bench: 3 });
    expect(of(player, 'bench')).toEqual([
      { kind: 'if', point: 'bench', side: 'above', value: 7.5, ...off },
      { kind: 'if', point: 'bench', side: 'above', value: 5, orAt: true, exactly: true, ...off },
    ]);
  });

  it('is foreseen for an hour that is still to come', () => {
    const band = [
      { from: '00:00', low: 4, high: 7.5 },
      { from: '02:00', low: 6, high: 7.5 },
    ];
    const only: ConditionTree = { all: [{ fact: 'step', operator: 'equal', value: 1 }] };
    const player = new Player(house({ points, rules: [rule('fan', body({ band, only }))] }), {
      ...cold,
      bench: 5,
    });
    expect(next(player)[0]).toEqual({ kind: 'then', at: START + 2 * H, ...on });
    expect(of(player, 'step')).toEqual(leaves(1, { at: START + 2 * H, ...off }));
  });
});

describe('The proof that a fan runs', () => {
  const amps = point('amps', 'current', { unit: 'A', min: 0, max: 5 });
  const drawing = (values: Record<string, number>) =>
    new Player(
      house({
        points: [...points, amps],
        sources: [source('heap')],
        channels: [
          channel('fan', 1, { source: 'heap', runProof: { point: 'amps', above: 0.2 } }),
          channel('second', 2, { source: 'heap' }),
        ],
        rules: [
          rule('fan', body({ rest: rest(2400, 1800) })),
          rule('second', body({ rest: rest(2400, 1800) })),
        ],
      }),
      { ...cold, amps: 0.5, ...values },
    ).pass(1 * MIN);

  it('tells that a fan which stands spends no credit: the draw goes on beyond its time', () => {
    const player = drawing({});
    // two fans on one credit: 20 min; the other alone then has as much again for what is left
    expect(next(player)[0]).toEqual({ kind: 'then', at: START + 20 * MIN, state: 'off', claim: 'rest' });
    const [told, ...more] = of(player, 'amps');
    expect(more).toEqual([]);
    // from 1 min on 19 min of two are left, 38 of the one; for the ms till the reading comes it is two still
    const at = START + 39 * MIN - 1;
    expect(told).toEqual({
      ...{ kind: 'if', point: 'amps', side: 'below', value: 0.2, orAt: true, at, later: true },
      ...{ state: 'off', claim: 'rest' },
    });
    player.at({ amps: 0.2 }).until(at - 1);
    expect(player.says()).toBe('on band');
    player.until(at);
    expect(player.says()).toBe('off rest');
  });

  it('of another load of the source is told as well', () =>
    expect(next(drawing({}), 'second').filter((one) => one['point'] === 'amps')).toMatchObject([
      { side: 'below', value: 0.2, orAt: true, later: true, state: 'off', claim: 'rest' },
    ]));

  it('tells that a fan which turns again brings the rest sooner', () => {
    const player = drawing({ amps: 0 });
    const [told] = of(player, 'amps');
    expect(told).toMatchObject({ side: 'above', value: 0.2, state: 'off', claim: 'rest' });
    expect(told).not.toHaveProperty('orAt');
    const clock = next(player).find((one) => one['kind'] === 'then');
    expect(Number(told?.['at'])).toBeLessThan(Number(clock?.['at']));
  });

  it('is said nothing of while the load is off', () => expect(of(drawing({ bench: 5 }), 'amps')).toEqual([]));
});
