/** What rules say of themselves, and which point they go by where several stand in for each other. On paper. */
import { describe, expect, it } from 'vitest';
import type { RuleBody } from '@/lib/control/rule-body';
import { body, channel, house, MIN, point, rule, S, START } from './house';
import { Player } from './player';

const fan = (...bodies: Partial<RuleBody>[]) =>
  house({
    points: [...house().points, point('spare', 'bench')],
    channels: [channel('fan', 1)],
    rules: bodies.map((one, place) => rule('fan', body(one), `rule-${place}`)),
  });
const rules = (player: Player) => player.of().because['rules'];

describe('the rule that is told', () => {
  it('is the one that wants, not the first', () => {
    const player = new Player(fan({ point: 'air' }, {}), { bench: 3, air: 9 });
    expect(player.of().because).toMatchObject({ rule: 'rule-1', point: 'bench', value: 3 });
  });

  it('tells no value of a point that never spoke', () => {
    const player = new Player(fan({}, { point: 'air' }), { air: 9 });
    expect(player.says()).toBe('off idle');
    expect(rules(player)).toMatchObject([
      { rule: 'rule-0', point: 'bench', value: null, why: 'point-bad' },
      { rule: 'rule-1', point: 'air', value: 9, why: 'satisfied' },
    ]);
  });

  const only = (fact: string): RuleBody['only'] => ({
    all: [
      { fact: 'time.hour', operator: 'greaterThanInclusive', value: 0 },
      { fact, operator: 'greaterThan', value: 45 },
      { fact: 'base', operator: 'greaterThan', value: 10 },
    ],
  });

  it('tells that its condition is not met, or not known and for want of which points', () => {
    const player = new Player(fan({ only: only('core') }), { bench: 3, core: 40, base: 40 });
    expect(rules(player)).toMatchObject([{ why: 'condition-not-met', latch: true }]);
    expect(rules(player)).not.toMatchObject([{ unknown: expect.anything() }]);
    player.at({ core: 50 });
    expect(player.says()).toBe('on band');
    player.silent.add('core');
    player.pass(2 * MIN);
    expect(rules(player)).toMatchObject([{ why: 'condition-unknown', latch: true, unknown: ['core'] }]);
  });

  it('takes a point that is not there for one that nobody knows', () => {
    const player = new Player(fan({ only: only('nowhere') }), { bench: 3, base: 40 });
    expect(rules(player)).toMatchObject([{ why: 'condition-unknown', unknown: ['nowhere'] }]);
  });
});

describe('a latch', () => {
  it('is told once when it turns, and which way', () => {
    const player = new Player(fan({}), { bench: 9 });
    player.pass(MIN).at({ bench: 3 }).pass(MIN);
    player.at({ bench: 9 }).pass(MIN);
    expect(player.events.filter(({ kind }) => kind === 'latch')).toEqual([
      { kind: 'latch', at: START + 60.001 * S, rule: 'rule-0', on: true },
      { kind: 'latch', at: START + 120.002 * S, rule: 'rule-0', on: false },
    ]);
  });
});

describe('stand-ins', () => {
  const own = fan({
    standIns: [
      { point: 'nowhere', offset: 0 },
      { point: 'air', offset: 0 },
    ],
  });

  // the air stands in from 150 s on; the bench reads under the band, but is gone by only from its third reading on
  it('give way after three good readings of the first, and past one that is not there', () => {
    const player = new Player(own, { bench: 9, air: 5 });
    player.silent.add('bench');
    player.pass(300 * S);
    player.silent.delete('bench');
    player.at({ bench: 3 }).pass(30 * S);
    expect(player.says()).toBe('off idle');
    expect(rules(player)).toMatchObject([{ point: 'air', standInFor: 'bench', value: 5 }]);
    player.pass(30 * S);
    expect(player.of().because).toMatchObject({ point: 'bench', value: 3 });
  });

  // the air, of 200 s, is dead in the first ms past 290 s; the bench has spoken again, but once
  it('give way at once to the first where they fall silent themselves', () => {
    const player = new Player(own, { bench: 9, air: 5 });
    player.silent.add('bench');
    player.pass(200 * S);
    player.silent.add('air');
    player.until(START + 280 * S);
    player.silent.delete('bench');
    player.at({ bench: 3 });
    expect(player.says()).toBe('off idle');
    player.silent.add('bench');
    player.until(START + 300 * S);
    expect(player.says()).toBe('on band');
    expect(player.of().because).toMatchObject({ point: 'bench', value: 3 });
    expect(player.of().because).not.toHaveProperty('standInFor');
  });
});
