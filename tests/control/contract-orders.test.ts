/** What control.md says of orders that people give, where no other file holds it. */
import { describe, expect, it } from 'vitest';
import type { PersonCommand } from '@/lib/control/types';
import { body, channel, H, house, rule, S, source } from './house';
import { Player } from './player';
import { hand, holds, lockOut, prove, silent, unlock, type Play } from './table';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
const cold = { ...warm, bench: 3.5 };
const fan = (more = {}) => house({ channels: [channel('fan', 1, more)], rules: [rule('fan', body())] });
const H12 = 43_200;

describe('Everything off', () => {
  const two = () =>
    new Player(
      house({
        channels: [channel('fan', 1), channel('mat', 2, { loadKind: 'heater' })],
        rules: [rule('fan', body())],
      }),
      cold,
    );

  it.each([H12 + 1, 0, -1, NaN, Infinity])(
    'for %f s is no hand’s time: it is refused as a whole',
    (seconds) => {
      const player = two();
      player.order({ kind: 'all-off', seconds });
      expect([player.says('fan'), player.says('mat')]).toEqual(['on band', 'off idle']);
      const told = player.events.filter(({ kind }) => kind === 'command-refused' || kind === 'hand-begun');
      expect(told).toMatchObject([
        { kind: 'command-refused', number: 1, channel: null, why: 'hand-too-long' },
      ]);
    },
  );

  it('for 12 h lasts 12 h', () => {
    const player = two();
    player.order({ kind: 'all-off', seconds: H12 });
    const ends = player.now + 12 * H;
    player.until(ends - 1, H);
    expect([player.says('fan'), player.says('mat')]).toEqual(['off hand', 'off hand']);
    player.until(ends);
    expect([player.says('fan'), player.says('mat')]).not.toContain('off hand');
  });
});

describe('Orders', () => {
  it('are taken by their numbers, in whatever order they are told', () => {
    const player = new Player(fan(), warm);
    player.now += S;
    const given = { channel: 'fan', at: player.now, by: 'Ann', holdInFrost: false, kind: 'hand' } as const;
    const commands: PersonCommand[] = [
      { ...given, number: 3, state: 'on', seconds: 300 },
      { ...given, number: 1, state: 'on', seconds: 100 },
      { ...given, number: 2, state: 'off', seconds: 200 },
    ];
    player.observed.commands = commands;
    player.step();
    expect(player.of().because).toMatchObject({ state: 'on', until: player.now + 300 * S });
    const begun = player.events.flatMap((one) => (one.kind === 'hand-begun' ? [one.why['state']] : []));
    expect(begun).toEqual(['on', 'off', 'on']);
    expect(player.memory.taken).toBe(3);
  });

  it('under a number that was taken before say nothing, though they say something else', () => {
    const player = new Player(fan(), warm);
    player.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 600, holdInFrost: false });
    player.now += S;
    player.observed.commands = [
      {
        kind: 'hand',
        channel: 'fan',
        state: 'off',
        seconds: 600,
        holdInFrost: true,
        number: 1,
        at: player.now,
        by: 'Bo',
      },
    ];
    player.step();
    expect(player.says()).toBe('on hand');
  });
});

describe('A hand', () => {
  holds('off of a heater may last 12 h: only on is held to an hour', {
    config: fan({ loadKind: 'heater' }),
    reads: cold,
    rows: [
      [10, hand('off', H12), 'off hand'],
      [43_209.999, null, 'off hand'],
      [43_210, null, 'on band'],
    ],
  });

  // silent from 60 s on: each command while the point is dead has 30 min of its own
  holds('on is renewed while its point is dead, by 30 min at a time', {
    config: fan(),
    reads: warm,
    rows: [
      [60, silent('bench'), 'off idle'],
      [1000, hand('on', H12), 'on hand'],
      [2500, hand('on', H12), 'on hand'],
      [4299.999, null, 'on hand'],
      [4300, null, 'off fail-safe'],
    ],
  });

  holds('on of a load without a rule has no point that could die', {
    config: house({ channels: [channel('fan', 1)] }),
    reads: warm,
    rows: [
      [60, silent('bench', 'air'), 'off idle'],
      [100, hand('on', H12), 'on hand'],
      [43_299.999, null, 'on hand'],
      [43_300, null, 'off idle'],
    ],
  });

  holds('and a pulse run the fan of a heap that is not ready yet; its band does not', {
    config: house({
      sources: [source('heap', { ready: { level: 50, forS: 3600 } })],
      channels: [channel('fan', 1, { source: 'heap' })],
      rules: [rule('fan', body())],
    }),
    reads: { ...cold, core: 40 },
    rows: [
      [0, null, 'off source-guard'],
      [10, hand('on', 600), 'on hand'],
      [610, null, 'off source-guard'],
      [620, prove(60), 'on proving'],
      [680, null, 'off source-guard'],
    ],
  });
});

describe('While another claim decides', () => {
  const auto = (play: Play) => play.order({ kind: 'auto', channel: 'fan' });
  // under low at 100 s, back between low and high at 200 s: the latch is on by then, whoever kept the load off
  holds('the latch turns as the readings do', {
    config: fan(),
    reads: { ...warm, bench: 5 },
    rows: [
      [10, hand('off', 7200), 'off hand'],
      [100, { bench: 3.5 }, 'off hand'],
      [200, { bench: 5 }, 'off hand'],
      [300, auto, 'on band'],
      [400, lockOut(), 'off lock-out'],
      [500, { bench: 8 }, 'off lock-out'],
      [600, { bench: 5 }, 'off lock-out'],
      [700, unlock(), 'off idle'],
    ],
  });

  // 600 s drawn of 1,200; 450 s locked out bring back a quarter: 900 s of draw are left
  holds('the credit comes back', {
    config: house({
      sources: [source('heap')],
      channels: [channel('fan', 1, { source: 'heap' })],
      rules: [rule('fan', body({ rest: { longestDraw: 1200, least: 1800, frostMayBreak: true } }))],
    }),
    reads: cold,
    rows: [
      [600, lockOut(), 'off lock-out'],
      [1050, unlock(), 'on band'],
      [1949.999, null, 'on band'],
      [1950, null, 'off rest'],
    ],
  });
});
