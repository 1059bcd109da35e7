/** Two that must never run together, on paper: a (bench) and b (air), 5 s apart unless said otherwise. */
import { describe, expect, it } from 'vitest';
import type { ChannelConfig, InterlockConfig } from '@/lib/control/types';
import { body, channel, house, rule, S } from './house';
import { Player } from './player';
import { hand, holds, lockOut, prove, reports, type Play } from './table';

const warm = { bench: 9, air: 9 };
const pair = (
  more: { a?: Partial<ChannelConfig>; b?: Partial<ChannelConfig>; lock?: Partial<InterlockConfig> } = {},
  frostLimit: number | null = null,
) =>
  house({
    frostLimit,
    channels: [channel('a', 1, more.a), channel('b', 2, more.b)],
    rules: [rule('a', body()), rule('b', body({ point: 'air' }))],
    interlocks: [
      {
        id: 'lock',
        channel: 'a',
        kind: 'never-with',
        other: 'b',
        delayS: 5,
        frostMayBreak: false,
        ...more.lock,
      },
    ],
  });

describe('among equals', () => {
  holds('at once the lower number keeps', {
    config: pair(),
    reads: { bench: 3, air: 3 },
    rows: [
      [0, null, { a: 'on band', b: 'off interlock' }],
      [60, { bench: 9 }, { a: 'off idle', b: 'off interlock' }],
      [64.999, null, { b: 'off interlock' }],
      [65, null, { a: 'off interlock', b: 'on band' }],
    ],
  });

  holds('the one that runs keeps, though its number is higher', {
    config: pair(),
    reads: { bench: 9, air: 3 },
    rows: [
      [60, { bench: 3 }, { a: 'off interlock', b: 'on band' }],
      [120, { air: 9 }, { a: 'off interlock', b: 'off idle' }],
      [125, null, { a: 'on band', b: 'off interlock' }],
    ],
  });

  holds('it is the same whichever of the two the interlock is written at', {
    config: pair({ lock: { channel: 'b', other: 'a' } }),
    reads: { bench: 3, air: 3 },
    rows: [[0, null, { a: 'on band', b: 'off interlock' }]],
  });
});

describe('the higher claim keeps', () => {
  holds('least on counting for nothing: a hand ends the band’s run, and starts the delay after', {
    config: pair({ a: { minOnS: 600 } }),
    reads: { bench: 3, air: 9 },
    rows: [
      [60, hand('on', 600, { channel: 'b' }), { a: 'off interlock', b: 'off interlock' }],
      [64.999, null, { a: 'off interlock', b: 'off interlock' }],
      [65, null, { a: 'off interlock', b: 'on hand' }],
      [660, null, { a: 'off interlock', b: 'off idle' }],
      [665, null, { a: 'on band', b: 'off interlock' }],
    ],
  });

  // the band let a go at 60 s, its least on would hold it to 600 s; b wants to run from 90 s on
  holds('what only its least on keeps running gives way', {
    config: pair({ a: { minOnS: 600 } }),
    reads: { bench: 3, air: 9 },
    rows: [
      [60, { bench: 9 }, { a: 'on short-cycle', b: 'off interlock' }],
      [90, { air: 3 }, { a: 'off interlock', b: 'off interlock' }],
      [94.999, null, { a: 'off interlock', b: 'off interlock' }],
      [95, null, { a: 'off interlock', b: 'on band' }],
    ],
  });

  holds('but least off is never broken', {
    config: pair({ b: { minOffS: 300 } }),
    reads: { bench: 9, air: 3 },
    rows: [
      [60, { air: 9 }, { a: 'off idle', b: 'off idle' }],
      [70, hand('on', 600, { channel: 'b' }), { b: 'off short-cycle' }],
      [359.999, null, { b: 'off short-cycle' }],
      [360, null, { b: 'on hand' }],
    ],
  });

  holds('a proving pulse beats a hand', {
    config: pair(),
    reads: warm,
    rows: [
      [10, hand('on', 600, { channel: 'b' }), { a: 'off interlock', b: 'on hand' }],
      [20, prove(60, 'a'), { a: 'off interlock', b: 'off interlock' }],
      [25, null, { a: 'on proving', b: 'off interlock' }],
      [80, null, { a: 'off idle', b: 'off interlock' }],
      [85, null, { a: 'off interlock', b: 'on hand' }],
    ],
  });

  holds('one that is locked out keeps nobody off once it stands', {
    config: pair(),
    reads: { bench: 3, air: 3 },
    rows: [
      [10, lockOut('a'), { a: 'off lock-out', b: 'off interlock' }],
      [15, null, { a: 'off lock-out', b: 'on band' }],
    ],
  });
});

describe('frost', () => {
  const vent = (frostMayBreak: boolean) =>
    pair({ a: { frostHelp: true }, b: { loadKind: 'vent' }, lock: { frostMayBreak } }, 3);

  holds('puts the vent off and waits the delay', {
    config: vent(false),
    reads: { bench: 9, air: 3.5 },
    rows: [
      [0, null, { a: 'off interlock', b: 'on band' }],
      [60, { air: 2 }, { a: 'off interlock', b: 'off frost' }],
      [65, null, { a: 'on frost', b: 'off interlock' }],
    ],
  });

  holds('that may break it stays on where the band takes over within the delay', {
    config: {
      ...vent(true),
      rules: [
        rule('a', body({ band: [{ from: '00:00', low: 6, high: 8 }] })),
        rule('b', body({ point: 'air' })),
      ],
    },
    reads: { bench: 9, air: 3.5 },
    rows: [
      [60, { air: 2, bench: 5 }, { a: 'on frost', b: 'off interlock' }],
      [62, { air: 9 }, { a: 'on band', b: 'off interlock' }],
    ],
  });

  holds('alone may break it: the band waits', {
    config: vent(true),
    reads: { bench: 9, air: 3.5 },
    rows: [
      [60, { air: 9, bench: 3.5 }, { a: 'off interlock', b: 'off idle' }],
      [65, null, { a: 'on band', b: 'off interlock' }],
    ],
  });

  holds('starts at once where it may break the interlock', {
    config: vent(true),
    reads: { bench: 9, air: 3.5 },
    rows: [
      [0, null, { a: 'off interlock', b: 'on band' }],
      [60, { air: 2 }, { a: 'on frost', b: 'off interlock' }],
    ],
  });
});

describe('its reason', () => {
  it.each(['a', 'b'])('names the other, what it is known to be, and until when, written at %s', (from) => {
    const lock = { channel: from, other: from === 'a' ? 'b' : 'a' };
    const player = new Player(pair({ lock }), { bench: 9, air: 3 });
    expect(player.of('a').because).toEqual({
      ...{ kind: 'never-with', other: 'b', otherState: 'on', delayS: 5, until: null },
    });
    player.at({ bench: 3, air: 9 });
    const until = player.now + 5 * S;
    expect(player.of('a').because).toMatchObject({ other: 'b', otherState: 'off', until });
    expect(player.of('a').until).toBe(until);
    expect(player.faults()).not.toContain('interlock-blocks-frost');
    player.until(until);
    expect(player.of('b').because).toMatchObject({ kind: 'never-with', other: 'a', otherState: 'on' });
  });
});

describe('what the relays report', () => {
  const says = (player: Player) => ({ a: player.says('a'), b: player.says('b') });
  const relay = (reported: 'on' | 'off', now: number, acknowledges = true) => ({
    reported,
    reportedAt: now,
    acknowledges,
    leaseEndsAt: now + 30 * S,
  });

  it('is what is waited for, and the delay counts from the report', () => {
    const player = new Player(pair(), { bench: 9, air: 3 });
    const tell = (b: 'on' | 'off', acknowledges = true) => {
      player.observed.relays = { a: relay('off', player.now), b: relay(b, player.now, acknowledges) };
    };
    const at = (s: number, b: 'on' | 'off', acknowledges?: boolean) => {
      player.now += s * S;
      tell(b, acknowledges);
      player.step();
      return says(player);
    };
    expect(at(1, 'on')).toEqual({ a: 'off interlock', b: 'on band' });
    player.say({ bench: 3, air: 9 });
    expect(at(1, 'on')).toEqual({ a: 'off interlock', b: 'off idle' });
    // the coil is told off but still reports on
    expect(at(9, 'on', false)).toEqual({ a: 'off interlock', b: 'off idle' });
    expect(at(1, 'off')).toEqual({ a: 'off interlock', b: 'off idle' });
    expect(at(4, 'off')).toEqual({ a: 'off interlock', b: 'off idle' });
    expect(at(1, 'off')).toEqual({ a: 'on band', b: 'off interlock' });
  });

  holds('nothing any more: off when its lease can last have ended, and the delay from there', {
    config: pair(),
    reads: { bench: 9, air: 3 },
    rows: [
      [1, reports({ a: 'off', b: 'on' }), { b: 'on band' }],
      [10, { bench: 3, air: 9 }, { a: 'off interlock', b: 'off idle' }],
      // the lease of the report at 1 s ends at 31 s
      [35.999, null, { a: 'off interlock' }],
      [36, null, { a: 'on band' }],
    ],
  });

  holds('one that is welded on keeps the other off', {
    config: pair(),
    reads: { bench: 9, air: 9 },
    rows: [
      [1, reports({ b: 'on' }), { a: 'off interlock', b: 'off idle' }],
      [
        10,
        (play: Play) => {
          play.reads({ bench: 3 });
          play.report({ b: 'on' });
        },
        { a: 'off interlock' },
      ],
    ],
  });
});
