/**
 * Draw credit, worked out on paper: a draw costs 1/longest a second and fan, rest gives 1/least back while nothing
 * draws, and no draw starts that the rest of it does not carry for the least on time.
 */
import { describe } from 'vitest';
import type { RestBody } from '@/lib/control/rule-body';
import { body, channel, house, rest, rule, source } from './house';
import { hand, holds } from './table';

const cold = { bench: 3, air: 10, core: 50, base: 40 };
const fan = (key: string, number: number, more = {}) => channel(key, number, { source: 'heap', ...more });
/** Longest draw 600 s, least rest 1,200 s, unless said otherwise. */
const one = (restMore = {}, channelMore = {}) =>
  house({
    sources: [source('heap')],
    channels: [fan('fan', 1, channelMore)],
    rules: [rule('fan', body({ rest: { ...rest(600, 1200), ...restMore } }))],
  });
const two = (second: RestBody | undefined, more = {}) =>
  house({
    sources: [source('heap')],
    channels: [fan('fan', 1, more), fan('second', 2, more)],
    rules: [
      rule('fan', body({ rest: rest(600, 1200) })),
      rule('second', body({ point: 'air', rest: second })),
    ],
  });

describe('one fan', () => {
  holds('draws for its longest draw, rests for its least, and again', {
    config: one(),
    reads: cold,
    rows: [
      [0, null, 'on band'],
      [599.999, null, 'on band'],
      [600, null, 'off rest'],
      [1799.999, null, 'off rest'],
      [1800, null, 'on band'],
      [2400, null, 'off rest'],
    ],
  });

  // 300 s cost half; 300 s undrawn give a quarter back; three quarters carry 450 s
  holds('half drawn and a quarter come back: three quarters of a draw', {
    config: one(),
    reads: cold,
    rows: [
      [300, { bench: 8 }, 'off idle'],
      [600, { bench: 3 }, 'on band'],
      [1049.999, null, 'on band'],
      [1050, null, 'off rest'],
      [2249.999, null, 'off rest'],
      [2250, null, 'on band'],
    ],
  });

  // the half that 300 s cost is back after 600 undrawn, and no more than all comes back
  holds('is never more than whole', {
    config: one(),
    reads: cold,
    rows: [
      [300, { bench: 8 }, 'off idle'],
      [5000, { bench: 3 }, 'on band'],
      [5599.999, null, 'on band'],
      [5600, null, 'off rest'],
    ],
  });

  // 100 pauses of 1 s in 300 s bring 100/1,200 back
  holds('pauses bring back what they last, whatever their number', {
    config: one(),
    reads: cold,
    rows: [
      ...Array.from({ length: 100 }, (_, index): [number, Record<string, number>][] => [
        [index * 3 + 2, { bench: 8 }],
        [index * 3 + 3, { bench: 3 }],
      ]).flat(),
      // 200 s drawn, 100 s of pauses: 1 − 1/3 + 1/12 = 3/4 carry 450 s
      [300, null, 'on band'],
      [749.999, null, 'on band'],
      [750, null, 'off rest'],
    ],
  });

  // from 1/3 at 400 s to the half that 300 s of least on cost: 200 s undrawn
  holds('does not start before the credit is worth the least on time', {
    config: one({}, { minOnS: 300 }),
    reads: cold,
    rows: [
      [400, { bench: 8 }, 'off idle'],
      [460, { bench: 3 }, 'off rest'],
      [599.999, null, 'off rest'],
      [600, null, 'on band'],
      [900, null, 'off rest'],
    ],
  });

  holds('a hand draws without asking, and the rest begins when it ends', {
    config: one({}, { minOnS: 300 }),
    reads: { ...cold, bench: 9 },
    rows: [
      [10, hand('on', 890), 'on hand'],
      // spent at 610
      [700, { bench: 3 }, 'on hand'],
      [900, null, 'off rest'],
      [2099.999, null, 'off rest'],
      [2100, null, 'on band'],
    ],
  });
});

describe('two fans on one heap', () => {
  // at 200 s 2/3 are left; then 1/600 + 1/1200 a second: 266.667 s
  holds('spend one credit at the sum of their rates, and rest for the larger least', {
    config: two(rest(1200, 1800)),
    reads: cold,
    rows: [
      [200, { air: 3 }, { fan: 'on band', second: 'on band' }],
      [466.666, null, { fan: 'on band', second: 'on band' }],
      [466.667, null, { fan: 'off rest', second: 'off rest' }],
      [2266.666, null, { fan: 'off rest', second: 'off rest' }],
      [2266.667, null, { fan: 'on band', second: 'on band' }],
    ],
  });

  // at 240 s 0.6 carry both for 180 s; once the first has stopped at 300 s, 0.5 carry the second for 300 s
  holds('a start must be worth it beside the one that draws', {
    config: two(rest(600, 1200), { minOnS: 200 }),
    reads: cold,
    rows: [
      [240, { air: 3 }, { fan: 'on band', second: 'off rest' }],
      [299.999, null, { fan: 'on band', second: 'off rest' }],
      [300, { bench: 8 }, { fan: 'off idle', second: 'on band' }],
      [599.999, null, { second: 'on band' }],
      [600, null, { second: 'off rest' }],
    ],
  });

  // at 200 s 2/3 carry both for 200 s: exactly the least on
  holds('and exactly worth it is enough', {
    config: two(rest(600, 1200), { minOnS: 200 }),
    reads: cold,
    rows: [
      [200, { air: 3 }, { fan: 'on band', second: 'on band' }],
      [399.999, null, { fan: 'on band', second: 'on band' }],
      [400, null, { fan: 'off rest', second: 'off rest' }],
    ],
  });

  // whole and both at once: 1/300 a second carry 300 s, under 400
  holds('wanting to at once, the lower number starts and the other waits', {
    config: two(rest(600, 1200), { minOnS: 400 }),
    reads: { ...cold, air: 3 },
    rows: [[0, null, { fan: 'on band', second: 'off rest' }]],
  });

  // at 100 s 5/6 are left and two draw: zero at 350 s; least on holds the first to 500 s; the hand ends at 1,000 s
  holds('least on and hand overrun a spent credit, and the rest counts from the last of them', {
    config: two(rest(600, 1200), { minOnS: 500 }),
    reads: cold,
    rows: [
      [100, hand('on', 900, { channel: 'second' }), { fan: 'on band', second: 'on hand' }],
      [349.999, null, { fan: 'on band', second: 'on hand' }],
      [350, null, { fan: 'on short-cycle', second: 'on hand' }],
      [500, null, { fan: 'off rest', second: 'on hand' }],
      [1000, null, { fan: 'off rest', second: 'off rest' }],
      [2199.999, null, { fan: 'off rest' }],
      [2200, null, { fan: 'on band' }],
    ],
  });

  holds('one without a rest costs nothing, but while it draws nothing comes back', {
    config: two(undefined),
    reads: cold,
    rows: [
      [300, { bench: 8, air: 3 }, { fan: 'off idle', second: 'on band' }],
      [900, { bench: 3, air: 8 }, { fan: 'on band', second: 'off idle' }],
      [1199.999, null, { fan: 'on band' }],
      [1200, { air: 3 }, { fan: 'off rest', second: 'off rest' }],
    ],
  });
});

describe('several rules of one fan', () => {
  // the summer rule has no rest, and is the one in season: the winter's, which would end it at 600 s, does not count
  holds('a rule in season without a rest is not ended by one that is out of season', {
    config: house({
      sources: [source('heap')],
      channels: [fan('fan', 1)],
      rules: [
        rule('fan', body({ rest: rest(600, 1200), season: { from: '03-01', to: '04-30' } }), 'spring'),
        rule('fan', body({ season: { from: '12-01', to: '02-28' } }), 'winter'),
      ],
    }),
    reads: cold,
    rows: [[7200, null, 'on band']],
  });

  // out of season the hand draws at the smallest of all
  holds('with none in season all count', {
    config: house({
      sources: [source('heap')],
      channels: [fan('fan', 1)],
      rules: [
        rule('fan', body({ rest: rest(1200, 600), season: { from: '03-01', to: '04-30' } }), 'spring'),
        rule('fan', body({ rest: rest(600, 1200), season: { from: '05-01', to: '06-30' } }), 'summer'),
      ],
    }),
    reads: cold,
    rows: [
      [0, hand('on', 7200), 'on hand'],
      [600, (play) => play.order({ kind: 'auto', channel: 'fan' }), 'off rest'],
      [1799.999, null, 'off rest'],
      [1800, null, 'off idle'],
    ],
  });

  const season = { from: '10-01', to: '01-10' };
  const config = house({
    sources: [source('heap')],
    channels: [fan('fan', 1)],
    rules: [
      rule('fan', body({ rest: rest(600, 1200), season }), 'autumn'),
      rule('fan', body({ rest: rest(1200, 1800) }), 'always'),
    ],
  });

  // the season ends at midnight, 86,400 s: 300 s at 1/600, then the half that is left at 1/1,200
  holds('the smallest longest draw of those in season counts, from the instant on at which a season ends', {
    config,
    reads: { ...cold, bench: 8 },
    rows: [
      [86_100, { bench: 3 }, 'on band'],
      [86_999.999, null, 'on band'],
      [87_000, null, 'off rest'],
      [88_799.999, null, 'off rest'],
      [88_800, null, 'on band'],
    ],
  });
});
