/** A loop that moves air and no heat: least gain to the second. On paper; the wait is 900 s and the doubt 120 s. */
import { describe, expect, it } from 'vitest';
import { body, channel, house, point, rest, rule, S, source, START } from './house';
import { Player } from './player';
import { hand, holds, silent, speaking } from './table';

const cold = { bench: 3, air: 10, core: 50, base: 40, in: 5, out: 5 };
const gain = { kelvin: 3, after: 900, intake: 'in', return: 'out' };
const fan = (key: string, number: number, more = {}) => channel(key, number, { source: 'heap', ...more });
const config = (more = {}, restMore = {}, frostLimit: number | null = null) =>
  house({
    frostLimit,
    points: [...house().points, point('in', 'loop-intake'), point('out', 'loop-return')],
    sources: [source('heap')],
    channels: [fan('fan', 1, { frostHelp: true, ...more }), fan('second', 2)],
    rules: [
      rule('fan', body({ rest: rest(7200, 1200, { leastGain: gain, ...restMore }) })),
      rule('second', body({ point: 'air', rest: rest(7200, 1200) })),
    ],
  });

describe('least gain', () => {
  holds('under it for 2 min after the wait: the draw ends and a rest begins', {
    config: config(),
    reads: { ...cold, out: 7.999 },
    rows: [
      [1019.999, null, 'on band'],
      [1020, null, 'off rest'],
      [2219.999, null, 'off rest'],
      [2220, null, 'on band'],
      [3240, null, 'off rest'],
    ],
  });

  holds('exactly it is enough', {
    config: config(),
    reads: { ...cold, out: 8 },
    rows: [[7199, null, 'on band']],
  });

  holds('a better reading between begins the 2 min anew', {
    config: config(),
    reads: cold,
    rows: [
      [1000, { out: 8 }, 'on band'],
      [1100, { out: 7 }, 'on band'],
      [1219.999, null, 'on band'],
      [1220, null, 'off rest'],
    ],
  });

  holds('what it was before the wait does not count', {
    config: config(),
    reads: cold,
    rows: [
      [899.999, { out: 8 }, 'on band'],
      [7000, null, 'on band'],
    ],
  });

  // silent from 880 s: bad at 970, before the 2 min are over; it speaks again at 1,100
  for (const end of ['in', 'out'])
    holds(`nor does what is not good, at “${end}”`, {
      config: config(),
      reads: cold,
      rows: [
        [880, silent(end), 'on band'],
        [1100, speaking(end), 'on band'],
        [1219.999, null, 'on band'],
        [1220, null, 'off rest'],
      ],
    });

  holds('half an hour of warming up is no “no gain” where the wait is as long (common practice, no source)', {
    config: config({}, { leastGain: { ...gain, after: 1800 } }),
    reads: cold,
    rows: [
      [1799, { out: 10.56 }, 'on band'],
      [7199, null, 'on band'],
    ],
  });

  holds('while another draws, only this channel is held off, and the other’s credit is its own', {
    config: config(),
    reads: { ...cold, air: 3 },
    rows: [
      [1020, null, { fan: 'off rest', second: 'on band' }],
      [2219.999, null, { fan: 'off rest', second: 'on band' }],
      // 1 − 1020·2/7200 − 1200/7200 = 0.55 are left: both together for 1,980 s, but no gain again at 3,240
      [2220, null, { fan: 'on band', second: 'on band' }],
      [3240, null, { fan: 'off rest', second: 'on band' }],
      // 0.55 − 1020·2/7200 − 1200/7200 = 0.1 at 4,440 s, when the fan may again: both for 360 s
      [4439.999, null, { fan: 'off rest', second: 'on band' }],
      [4440, null, { fan: 'on band', second: 'on band' }],
      [4799.999, null, { fan: 'on band', second: 'on band' }],
      [4800, null, { fan: 'off rest', second: 'off rest' }],
    ],
  });

  // least 1,200 s, then until the base, which stays at 40, or 3,600 s in all: without a rest they would run at 2,220
  const slow = { leastGain: gain, until: { point: 'base', level: 45 }, most: 3600 };
  const twin = (more = {}) => {
    const both = config(more, slow);
    both.rules = [
      ...both.rules.slice(0, 1),
      rule('second', body({ point: 'air', rest: rest(7200, 1200, slow) })),
    ];
    return both;
  };
  holds('of two that end in the same instant neither still draws: the heap rests', {
    config: twin(),
    reads: { ...cold, air: 3 },
    rows: [
      [1019.999, null, { fan: 'on band', second: 'on band' }],
      [1020, null, { fan: 'off rest', second: 'off rest' }],
      [2220, null, { fan: 'off rest', second: 'off rest' }],
      [4619.999, null, { fan: 'off rest', second: 'off rest' }],
      [4620, null, { fan: 'on band', second: 'on band' }],
    ],
  });

  it('a rest that it began says so, and how long it takes', () => {
    const player = new Player(twin(), { ...cold, air: 10 });
    player.pass(1020 * S, 10 * S);
    expect(player.of().because).toMatchObject({
      ...{ cause: 'no-gain', leastGainK: 3 },
      ...{ restUntil: START + 2220 * S, restAtMostUntil: START + 4620 * S },
      recovery: { point: 'base', value: 40, level: 45 },
    });
  });

  holds('exactly it is enough, whatever the figures are in binary: 8.2 − 5.2', {
    config: config(),
    reads: { ...cold, in: 5.2, out: 8.2 },
    rows: [[7199, null, 'on band']],
  });

  holds('frost breaks it', {
    config: config({}, {}, 3),
    reads: { ...cold, bench: 3.5 },
    rows: [
      [1020, null, 'off rest'],
      [1100, { bench: 2 }, 'on frost'],
      [2200, null, 'on frost'],
    ],
  });

  holds('but not where the rule keeps its rest from frost', {
    config: config({}, { frostMayBreak: false }, 3),
    reads: { ...cold, bench: 2 },
    rows: [
      [1020, null, 'off rest'],
      [2219.999, null, 'off rest'],
      [2220, null, 'on frost'],
    ],
  });

  holds('a hand goes on through it', {
    config: config(),
    reads: { ...cold, bench: 9 },
    rows: [
      [0, hand('on', 3600), 'on hand'],
      [1020, null, 'on hand'],
      [3599.999, null, 'on hand'],
      [3600, null, 'off rest'],
    ],
  });
});

describe('a fan that does not turn', () => {
  const points = [...config().points, point('amps', 'current', { unit: 'A' })];
  const proved = { ...config({ runProof: { point: 'amps', above: 0.2 } }), points };

  // told at the rows alone nobody would know of the readings between, and it would count as drawing
  const ways = ['step by step', 'restarted at each step'] as const;

  // the reading at 30 s is the first that counts, 15 s after its start: 30 of 7,200 s are drawn till then and come
  // back while it stands; from 5,000 s on it turns
  holds(
    'draws nothing from its credit till it does',
    {
      config: proved,
      reads: { ...cold, out: 9, amps: 0 },
      rows: [
        [5000, { amps: 0.5 }, 'on band'],
        [12_199.999, null, 'on band'],
        [12_200, null, 'off rest'],
      ],
    },
    ways,
  );

  holds(
    'counts by its relay again once its proof is dead',
    {
      config: proved,
      reads: { ...cold, out: 9, amps: 0 },
      rows: [
        // silent from 1,000 s on, dead at 1,090 s
        [1000, silent('amps'), 'on band'],
        [8289.999, null, 'on band'],
        [8290, null, 'off rest'],
      ],
    },
    ways,
  );
});

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
