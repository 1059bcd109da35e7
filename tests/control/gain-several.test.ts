/** Several least gains of one channel, and the figure that is told of the one that decided. On paper; the doubt is 120 s. */
import { describe, expect, it } from 'vitest';
import { cold, config, gain } from './gain-house';
import { body, rest, rule, S, START } from './house';
import { Player } from './player';
import { hand, holds } from './table';

/** Two rules of one fan that both want it on, each with its least gain; the winter's stands first. */
const other = { kelvin: 5, after: 1800, intake: 'in', return: 'out' };
const winter = { from: '10-01', to: '04-30' };
const two = (first: object, second: object) => {
  const own = config();
  own.rules = [
    rule('fan', body({ rest: rest(7200, 1200, { leastGain: gain }), ...first }), 'a'),
    rule('fan', body({ rest: rest(7200, 1200, { leastGain: other }), ...second }), 'b'),
    ...own.rules.slice(1),
  ];
  return own;
};
const JULY = Date.UTC(2027, 6, 10);

describe('of several least gains of a channel', () => {
  holds('each in season holds: the one that is not met ends the draw, whichever stands first', {
    config: two({}, {}),
    // 4 K: enough for 3 K, too little for 5 K, which is looked at from 1,800 s on
    reads: { ...cold, out: 9 },
    rows: [
      [1919.999, null, 'on band'],
      [1920, null, 'off rest'],
    ],
  });

  holds('each has two minutes of its own', {
    config: two({}, {}),
    // under 3 K from 1,750 to 1,810 s; under 5 K as long as that is looked at, from 1,800 s on
    reads: { ...cold, out: 9 },
    rows: [
      [1750, { out: 7 }, 'on band'],
      [1810, { out: 9 }, 'on band'],
      [1870, null, 'on band'],
      [1919.999, null, 'on band'],
      [1920, null, 'off rest'],
    ],
  });

  holds('one out of season asks nothing', {
    config: two({ season: winter }, {}),
    reads: { ...cold, out: 6 },
    start: JULY,
    rows: [
      [1919.999, null, 'on band'],
      [1920, null, 'off rest'],
    ],
  });

  holds('of all, if none is in season: a fan that runs by hand in July', {
    config: two({ season: winter }, { season: winter }),
    reads: { ...cold, bench: 9, out: 6 },
    start: JULY,
    rows: [
      [0, hand('on', 1000), 'on hand'],
      [1000, hand('on', 1000), 'on hand'],
      // 3 K are looked at from 900 s on: at 1,020 s the credit is spent, and the draw goes on by hand
      [2000, null, 'off rest'],
      [3199.999, null, 'off rest'],
      [3200, null, 'off idle'],
    ],
  });

  const told = (player: Player) => player.of().because['leastGainK'];

  it('the figure that is told is the one that decided', () => {
    const player = new Player(two({}, {}), { ...cold, out: 9 });
    player.until(START + 1930 * S, 10 * S);
    expect(player.says()).toBe('off rest');
    expect(told(player)).toBe(5);
    const low = new Player(two({}, {}), { ...cold, out: 7 });
    low.until(START + 1030 * S, 10 * S);
    expect(told(low)).toBe(3);
  });

  it('not that of a rule out of season', () => {
    const summer = new Player(two({ season: winter }, {}), { ...cold, out: 6 }, undefined, JULY);
    summer.until(JULY + 1930 * S, 10 * S);
    expect(summer.says()).toBe('off rest');
    expect(told(summer)).toBe(5);
  });

  it('and stays it when the rule that decided is taken away, another draws on, and over a restart', () => {
    const all = two({}, {});
    const player = new Player(all, { ...cold, air: 3, out: 9 });
    player.until(START + 1930 * S, 10 * S);
    expect(player.says('second')).toBe('on band');
    player.replan({ ...all, rules: all.rules.filter(({ id }) => id !== 'b') }).restart();
    player.pass(60 * S);
    expect(player.says()).toBe('off rest');
    expect(told(player)).toBe(5);
  });

  it('is told of the other fans of a heap that rests for it, which have no least gain', () => {
    const player = new Player(config(), { ...cold, air: 10 });
    player.until(START + 1030 * S, 10 * S).at({ air: 3 });
    expect(player.says('second')).toBe('off rest');
    expect(player.of('second').because).toMatchObject({ cause: 'no-gain', leastGainK: 3 });
  });
});

it('a draw that was without gain when an older memory was written ends when it would have', () => {
  const player = new Player(config(), cold);
  player.until(START + 960 * S, 10 * S);
  const { memory } = player;
  // as it was kept before: by channel alone
  player.memory = { ...memory, rules: memory.rules.map(({ gainLowSince: _, ...one }) => one) };
  player.restart().until(START + 1019 * S, 10 * S);
  expect(player.says()).toBe('on band');
  player.until(START + 1020 * S);
  expect(player.says()).toBe('off rest');
});
