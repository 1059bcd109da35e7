/** In which order needed channels stand, which rings are found, and when interlocks ask to be awake. On paper. */
import { describe, expect, it } from 'vitest';
import { needsCycle, needsOrder, type PlanInterlock } from '@/lib/control/interlocks';
import { body, channel, house, interlock, rule } from './house';
import { Sleeper } from './wakes';

const lock = (kind: PlanInterlock['kind'], channel_: number, other: number): PlanInterlock => ({
  ...{ kind, channel: channel_, other, delayMs: 0, frostMayBreak: false },
});
const needs = (...pairs: [string, string][]) => pairs.map(([key, other]) => ({ channel: key, other }));

describe('a needed channel stands before those that need it', () => {
  it.each<[string, number, PlanInterlock[], number[]]>([
    ['of none that need another, as they are', 3, [], [0, 1, 2]],
    ['along a chain', 3, [lock('needs', 0, 1), lock('needs', 1, 2)], [2, 1, 0]],
    ['with two that one needs', 3, [lock('needs', 0, 1), lock('needs', 0, 2)], [1, 2, 0]],
    ['whatever must never run together', 3, [lock('never-with', 0, 2), lock('needs', 0, 1)], [1, 2, 0]],
    ['and a ring is left for the end', 4, [lock('needs', 0, 1), lock('needs', 1, 0)], [2, 3, 0, 1]],
  ])('%s', (_, channels, locks, order) => {
    expect(needsOrder(channels, locks)).toEqual(order);
  });
});

describe('channels that need each other in a ring', () => {
  it.each<[string, { channel: string; other: string }[], string[]]>([
    ['are none along a chain', needs(['a', 'b'], ['b', 'c']), []],
    ['nor where two ways lead to one', needs(['a', 'b'], ['a', 'c'], ['b', 'd'], ['c', 'd']), []],
    ['are told in their order', needs(['a', 'b'], ['b', 'c'], ['c', 'a']), ['a', 'b', 'c']],
    ['without what only leads there', needs(['a', 'b'], ['b', 'c'], ['c', 'b']), ['b', 'c']],
    ['be it that one needs itself', needs(['a', 'a']), ['a']],
    ['though others stand first', needs(['a', 'd'], ['b', 'c'], ['c', 'b']), ['b', 'c']],
  ])('%s', (_, list, ring) => {
    expect(needsCycle(list)).toEqual(ring);
  });
});

describe('an interlock’s delay is over at its own instant, without a reading', () => {
  const pair = (kind: 'needs' | 'never-with') =>
    house({
      channels: [channel('a', 1), channel('b', 2)],
      rules: [rule('a', body()), rule('b', body({ point: 'air' }))],
      interlocks: [interlock(kind, 'a', 'b', { delayS: 5 })],
    });

  it('after what is needed has come on', () => {
    const player = new Sleeper(pair('needs'), { bench: 3, air: 9 });
    player.hears(90, { air: 3 });
    expect([player.says('a'), player.wakesAtS]).toEqual(['off interlock', 95]);
    expect(player.of('a').because).toMatchObject({ kind: 'needs', other: 'b', otherState: 'on', delayS: 5 });
    player.sleepTill(100);
    expect(player.switchings('a')).toEqual([[95, 'on', 'band']]);
  });

  it('after what must not run beside it has gone off', () => {
    const player = new Sleeper(pair('never-with'), { bench: 9, air: 3 });
    player.hears(60, { bench: 3, air: 9 });
    expect([player.says('a'), player.wakesAtS]).toEqual(['off interlock', 65]);
    player.sleepTill(100);
    expect(player.switchings('a')).toEqual([[65, 'on', 'band']]);
  });
});
