/** A loop that moves air and no heat: least gain to the second. On paper; the wait is 900 s and the doubt 120 s. */
import { describe, expect, it } from 'vitest';
import { cold, config, gain } from './gain-house';
import { body, point, rest, rule, S, START } from './house';
import { Player } from './player';
import { hand, holds, silent, speaking } from './table';

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
