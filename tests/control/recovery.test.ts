/** When a rest ends: after its least, at its level, or at the most; anew after a draw within it. On paper. */
import { describe } from 'vitest';
import type { RestBody } from '@/lib/control/rule-body';
import { body, channel, house, rest, rule, source } from './house';
import { hand, holds, silent } from './table';

const cold = { bench: 3, air: 10, core: 50, base: 40 };
const fan = (key: string, number: number, more = {}) => channel(key, number, { source: 'heap', ...more });
const waits: RestBody = rest(600, 1200, { until: { point: 'base', level: 43 }, most: 5400 });
const one = (own: RestBody, more: { frostLimit?: number } = {}) =>
  house({
    sources: [source('heap')],
    channels: [fan('fan', 1, { frostHelp: true })],
    rules: [rule('fan', body({ rest: own }))],
    ...more,
  });

describe('a rest that waits for a level', () => {
  holds('ends at the reading that reaches it, past its least', {
    config: one(waits),
    reads: cold,
    rows: [
      [600, null, 'off rest'],
      [1800, null, 'off rest'],
      [2029.999, { base: 42.9 }, 'off rest'],
      [2030, { base: 43 }, 'on band'],
    ],
  });

  holds('ends with its least where the level is there by then', {
    config: one(waits),
    reads: cold,
    rows: [
      [1000, { base: 44 }, 'off rest'],
      [1799.999, null, 'off rest'],
      [1800, null, 'on band'],
    ],
  });

  holds('does not count a level that was there and is gone: it is looked at when the least has passed', {
    config: one(waits),
    reads: cold,
    rows: [
      [1000, { base: 43 }, 'off rest'],
      [1500, { base: 42 }, 'off rest'],
      [1800, null, 'off rest'],
      [2500, { base: 43.5 }, 'on band'],
    ],
  });

  holds('runs to the most where the level is not reached', {
    config: one(waits),
    reads: cold,
    rows: [
      [5999.999, null, 'off rest'],
      [6000, null, 'on band'],
    ],
  });

  // silent from 700 s on, bad at 790: that it read enough before does not help
  holds('runs to the most where its point is not good', {
    config: one(waits),
    reads: { ...cold, base: 45 },
    rows: [
      [700, silent('base'), 'off rest'],
      [5999.999, null, 'off rest'],
      [6000, null, 'on band'],
    ],
  });

  holds('is renewed whole by its end', {
    config: one(waits),
    reads: { ...cold, base: 45 },
    rows: [
      [1800, null, 'on band'],
      [2399.999, null, 'on band'],
      [2400, null, 'off rest'],
      [3600, null, 'on band'],
    ],
  });
});

describe('a draw within a rest', () => {
  holds('by hand starts it anew, its most too', {
    config: one(waits),
    reads: cold,
    rows: [
      [700, hand('on', 100), 'on hand'],
      [800, null, 'off rest'],
      [6000, null, 'off rest'],
      [6199.999, null, 'off rest'],
      [6200, null, 'on band'],
    ],
  });

  // frost from 900 to 1,000 s: rest from there to 2,200 s
  holds('by frost starts it anew', {
    config: one(rest(600, 1200), { frostLimit: 3 }),
    reads: { ...cold, bench: 3.5 },
    rows: [
      [600, null, 'off rest'],
      [900, { bench: 2.9 }, 'on frost'],
      [1000, { bench: 4 }, 'off rest'],
      [1500, { bench: 3.5 }, 'off rest'],
      [2199.999, null, 'off rest'],
      [2200, null, 'on band'],
    ],
  });

  holds('is not frost’s where the rule keeps its rest from frost', {
    config: one(rest(600, 1200, { frostMayBreak: false }), { frostLimit: 3 }),
    reads: { ...cold, bench: 2 },
    rows: [
      [0, null, 'on frost'],
      [600, null, 'off rest'],
      [1799.999, null, 'off rest'],
      [1800, null, 'on frost'],
    ],
  });

  // 590 s drawn, 60 s of pause: 10/600 + 60/36,000 carry 11 s, under 120; frost asks and may not break it
  holds('nor is a start that the credit does not carry, where the rule keeps its rest from frost', {
    config: house({
      sources: [source('heap')],
      frostLimit: 3,
      channels: [fan('fan', 1, { frostHelp: true, minOnS: 120 })],
      rules: [rule('fan', body({ rest: rest(600, 36_000, { frostMayBreak: false }) }))],
    }),
    reads: { ...cold, bench: 3.5 },
    rows: [
      [590, { bench: 8 }, 'off idle'],
      [650, { bench: 2 }, 'off rest'],
    ],
  });

  holds('but it is, where the rule lets it', {
    config: house({
      sources: [source('heap')],
      frostLimit: 3,
      channels: [fan('fan', 1, { frostHelp: true, minOnS: 120 })],
      rules: [rule('fan', body({ rest: rest(600, 36_000) }))],
    }),
    reads: { ...cold, bench: 3.5 },
    rows: [
      [590, { bench: 8 }, 'off idle'],
      [650, { bench: 2 }, 'on frost'],
      [769.999, { bench: 9 }, 'on short-cycle'],
      [770, null, 'off rest'],
    ],
  });
});

describe('several rules', () => {
  const two = (first: RestBody, second: RestBody) =>
    house({
      sources: [source('heap')],
      channels: [fan('fan', 1), fan('second', 2)],
      rules: [rule('fan', body({ rest: first })), rule('second', body({ point: 'air', rest: second }))],
    });
  const either = two(rest(600, 1200, { until: { point: 'base', level: 43 }, most: 2400 }), rest(600, 1800));

  holds('hold the largest least even where the level was reached', {
    config: either,
    reads: cold,
    rows: [
      [2000, { base: 43 }, 'off rest'],
      [2399.999, null, 'off rest'],
      [2400, null, 'on band'],
    ],
  });

  holds('hold the longest wait', {
    config: either,
    reads: cold,
    rows: [
      [2400, null, 'off rest'],
      [2999.999, null, 'off rest'],
      [3000, null, 'on band'],
    ],
  });

  holds('each wait for their own level', {
    config: two(
      rest(600, 1200, { until: { point: 'base', level: 43 }, most: 5400 }),
      rest(600, 1200, { until: { point: 'core', level: 55 }, most: 3600 }),
    ),
    reads: cold,
    rows: [
      [2000, { base: 43 }, 'off rest'],
      // 600 + 3,600: the second has waited its most, the first has its level
      [4199.999, null, 'off rest'],
      [4200, null, 'on band'],
    ],
  });
});
