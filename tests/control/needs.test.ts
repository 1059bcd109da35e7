/** One that needs another, on paper: a (bench) needs b (air), on for 5 s before. */
import { describe } from 'vitest';
import type { ChannelConfig } from '@/lib/control/types';
import { body, channel, house, rule } from './house';
import { hand, holds, lockOut, reports, type Row } from './table';

const pair = (
  a: Partial<ChannelConfig> = {},
  b: Partial<ChannelConfig> = {},
  frostLimit: number | null = null,
) =>
  house({
    frostLimit,
    channels: [channel('a', 1, a), channel('b', 2, b)],
    rules: [rule('a', body()), rule('b', body({ point: 'air' }))],
    interlocks: [{ id: 'lock', channel: 'a', kind: 'needs', other: 'b', delayS: 5, frostMayBreak: false }],
  });

describe('needs', () => {
  holds('does not start the other, starts its delay after it, and goes before it', {
    config: pair(),
    reads: { bench: 3, air: 9 },
    rows: [
      [60, null, { a: 'off interlock', b: 'off idle' }],
      [90, { air: 3 }, { a: 'off interlock', b: 'on band' }],
      [94.999, null, { a: 'off interlock', b: 'on band' }],
      [95, null, { a: 'on band', b: 'on band' }],
      [150, { air: 9 }, { a: 'off interlock', b: 'off idle' }],
    ],
    switches: {
      a: [
        [95, 'on', 'band'],
        [150, 'off', 'interlock'],
      ],
      b: [
        [90, 'on', 'band'],
        [150, 'off', 'idle'],
      ],
    },
  });

  holds('by hand too', {
    config: pair(),
    reads: { bench: 9, air: 9 },
    rows: [
      [10, hand('on', 600, { channel: 'a' }), { a: 'off interlock' }],
      [20, hand('on', 300, { channel: 'b' }), { a: 'off interlock', b: 'on hand' }],
      [25, null, { a: 'on hand', b: 'on hand' }],
      [320, null, { a: 'off interlock', b: 'off idle' }],
    ],
  });

  holds('breaks least on when the other goes, which its own least on holds before', {
    config: pair({ minOnS: 900 }, { minOnS: 300 }),
    reads: { bench: 3, air: 3 },
    rows: [
      [5, null, { a: 'on band', b: 'on band' }],
      [60, { air: 9 }, { a: 'on band', b: 'on interlock' }],
      [299.999, null, { a: 'on band', b: 'on interlock' }],
      [300, null, { a: 'off interlock', b: 'off idle' }],
    ],
  });

  holds('never breaks least off', {
    config: pair({ minOffS: 300 }),
    reads: { bench: 3, air: 3 },
    rows: [
      [5, null, { a: 'on band' }],
      [60, { air: 9 }, { a: 'off interlock', b: 'off idle' }],
      [70, { air: 3 }, { a: 'off interlock', b: 'on band' }],
      [75, null, { a: 'off short-cycle' }],
      [360, null, { a: 'on band' }],
    ],
  });

  holds('a lock-out of the other does not wait, nor does its high limit', {
    config: pair({}, { highLimit: { point: 'core', above: 60 } }),
    reads: { bench: 3, air: 3, core: 50 },
    rows: [
      [5, null, { a: 'on band', b: 'on band' }],
      [60, { core: 61 }, { a: 'off interlock', b: 'off limit' }],
      [120, { core: 50 }, { b: 'on band' }],
      [125, null, { a: 'on band' }],
      [180, lockOut('b'), { a: 'off interlock', b: 'off lock-out' }],
    ],
  });

  holds('frost waits for it as well', {
    config: pair({ frostHelp: true }, {}, 3),
    reads: { bench: 9, air: 2 },
    rows: [
      [0, null, { a: 'off interlock', b: 'on band' }],
      [5, null, { a: 'on frost', b: 'on band' }],
    ],
  });

  // b is ordered on at 10 s and reported so at 12 s: a from 17 s on; a is reported off at 63 s, and b follows
  holds('counts from the report, and the other follows the report', {
    config: pair(),
    reads: { bench: 3, air: 9 },
    rows: [
      [1, reports({ a: 'off', b: 'off' }), { a: 'off interlock', b: 'off idle' }],
      [10, { air: 3 }, { a: 'off interlock', b: 'on band' }],
      [12, reports({ a: 'off', b: 'on' }), { a: 'off interlock', b: 'on band' }],
      [16.999, null, { a: 'off interlock', b: 'on band' }],
      [17, null, { a: 'on band', b: 'on band' }],
      [20, reports({ a: 'on', b: 'on' }), { a: 'on band', b: 'on band' }],
      [40, reports({ a: 'on', b: 'on' }), { a: 'on band', b: 'on band' }],
      [60, { air: 9 }, { a: 'off interlock', b: 'on interlock' }],
      [63, reports({ a: 'off', b: 'on' }), { a: 'off interlock', b: 'off idle' }],
    ],
  });

  holds('waits for one that is ordered on and does not come', {
    config: pair(),
    reads: { bench: 3, air: 3 },
    rows: [
      [1, reports({ a: 'off', b: 'off' }), { a: 'off interlock', b: 'on band' }],
      [20, reports({ a: 'off', b: 'off' }), { a: 'off interlock' }],
    ],
  });

  const chain = house({
    channels: [channel('a', 1), channel('b', 2), channel('c', 3)],
    rules: [rule('a', body()), rule('b', body()), rule('c', body({ point: 'air' }))],
    interlocks: [
      { id: '1', channel: 'a', kind: 'needs', other: 'b', delayS: 0, frostMayBreak: false },
      { id: '2', channel: 'b', kind: 'needs', other: 'c', delayS: 0, frostMayBreak: false },
    ],
  });
  const running: Row[] = [
    [1, reports({ a: 'off', b: 'off', c: 'on' }), { a: 'off interlock', b: 'on band', c: 'on band' }],
    [2, reports({ a: 'off', b: 'on', c: 'on' }), { a: 'on band', b: 'on band', c: 'on band' }],
    [3, reports({ a: 'on', b: 'on', c: 'on' }), { a: 'on band', b: 'on band', c: 'on band' }],
  ];

  holds('in a chain each waits for the report of the one before', {
    config: chain,
    reads: { bench: 3, air: 3 },
    rows: [
      ...running,
      [10, { air: 9 }, { a: 'off interlock', b: 'on interlock', c: 'on interlock' }],
      [
        12,
        reports({ a: 'off', b: 'on', c: 'on' }),
        { a: 'off interlock', b: 'off interlock', c: 'on interlock' },
      ],
      [
        14,
        reports({ a: 'off', b: 'off', c: 'on' }),
        { a: 'off interlock', b: 'off interlock', c: 'off idle' },
      ],
    ],
  });

  holds('a lock-out at its end cuts the whole chain at once', {
    config: chain,
    reads: { bench: 3, air: 3 },
    rows: [...running, [10, lockOut('c'), { a: 'off interlock', b: 'off interlock', c: 'off lock-out' }]],
  });

  holds('a lock-out or a limit of the other does not wait for the report', {
    config: pair({}, { highLimit: { point: 'core', above: 60 } }),
    reads: { bench: 3, air: 3, core: 50 },
    rows: [
      [1, reports({ a: 'off', b: 'on' }), { a: 'off interlock', b: 'on band' }],
      [6, reports({ a: 'on', b: 'on' }), { a: 'on band', b: 'on band' }],
      [10, { core: 61 }, { a: 'off interlock', b: 'off limit' }],
      [11, reports({ a: 'off', b: 'off' }), { b: 'off limit' }],
      [20, { core: 50 }, { b: 'on band' }],
      [21, reports({ a: 'off', b: 'on' }), { b: 'on band' }],
      [26, reports({ a: 'on', b: 'on' }), { a: 'on band', b: 'on band' }],
      [30, lockOut('b'), { a: 'off interlock', b: 'off lock-out' }],
    ],
  });

  holds('through a chain: the last goes first', {
    config: house({
      channels: [channel('a', 1), channel('b', 2), channel('c', 3)],
      rules: [rule('a', body()), rule('b', body()), rule('c', body({ point: 'air' }))],
      interlocks: [
        { id: '1', channel: 'a', kind: 'needs', other: 'b', delayS: 5, frostMayBreak: false },
        { id: '2', channel: 'b', kind: 'needs', other: 'c', delayS: 10, frostMayBreak: false },
      ],
    }),
    reads: { bench: 3, air: 3 },
    rows: [
      [9.999, null, { a: 'off interlock', b: 'off interlock', c: 'on band' }],
      [10, null, { a: 'off interlock', b: 'on band', c: 'on band' }],
      [15, null, { a: 'on band', b: 'on band', c: 'on band' }],
      [60, { air: 9 }, { a: 'off interlock', b: 'off interlock', c: 'off idle' }],
    ],
  });
});
