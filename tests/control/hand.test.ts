/** What people order by hand, on paper; a frost limit of 3 °C where there is one. */
import { describe, expect, it } from 'vitest';
import type { ChannelConfig, HouseConfig } from '@/lib/control/types';
import { body, channel, house, rule, S } from './house';
import { Player } from './player';
import { hand, holds, silent, type Play } from './table';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
const cold = { ...warm, bench: 3.5 };
const H12 = 43_200;
const fan = (
  more: Partial<ChannelConfig> = {},
  house_: Partial<HouseConfig> & { frostLimit?: number } = {},
) => house({ channels: [channel('fan', 1, more)], rules: [rule('fan', body())], ...house_ });
const cools = rule('fan', body({ purpose: 'cool', band: [{ from: '00:00', low: 20, high: 25 }] }));
const vent = fan({ loadKind: 'vent' }, { frostLimit: 3, rules: [cools] });
const auto = (play: Play) => play.order({ kind: 'auto', channel: 'fan' });

describe('hand', () => {
  holds('ends by its time, is renewed by another, and is given back', {
    config: fan(),
    reads: cold,
    rows: [
      [10, hand('off', 100), 'off hand'],
      [109.999, null, 'off hand'],
      [110, null, 'on band'],
      [200, hand('off', 100), 'off hand'],
      [290, hand('off', 100), 'off hand'],
      [389.999, null, 'off hand'],
      [390, null, 'on band'],
      [400, hand('off', H12), 'off hand'],
      [43_500, auto, 'on band'],
    ],
  });

  holds('off breaks least on, on waits for least off', {
    config: fan({ minOnS: 120, minOffS: 180 }),
    reads: cold,
    rows: [
      [10, hand('off', 5), 'off hand'],
      [15, null, 'off short-cycle'],
      [20, hand('on', 600), 'off short-cycle'],
      [189.999, null, 'off short-cycle'],
      [190, null, 'on hand'],
    ],
  });

  holds('off ends when frost begins on a channel that helps, not on one that does not', {
    config: fan(
      { frostHelp: true },
      { frostLimit: 3, channels: [channel('fan', 1, { frostHelp: true }), channel('lamp', 2)] },
    ),
    reads: warm,
    rows: [
      [10, hand('off', H12), 'off hand'],
      [20, hand('off', H12, { channel: 'lamp' }), { lamp: 'off hand' }],
      [7200, { air: 2.9 }, { fan: 'on frost', lamp: 'off hand' }],
      [7300, { air: 9 }, { fan: 'off idle', lamp: 'off hand' }],
    ],
  });

  holds('off that holds in frost goes on through it', {
    config: fan({ frostHelp: true }, { frostLimit: 3 }),
    reads: warm,
    rows: [
      [10, hand('off', H12, { holdInFrost: true }), 'off hand'],
      [7200, { air: 2.9 }, 'off hand'],
      [43_209.999, null, 'off hand'],
      [43_210, null, 'on frost'],
    ],
  });

  holds(
    'off given in frost without saying that it holds is not taken, even in the instant at which it begins',
    {
      config: fan({ frostHelp: true }, { frostLimit: 3 }),
      reads: warm,
      rows: [
        [
          60,
          (play: Play) => {
            play.reads({ air: 2 });
            hand('off', 600)(play);
          },
          'on frost',
        ],
        [120, hand('off', 600), 'on frost'],
        [180, hand('off', 600, { holdInFrost: true }), 'off hand'],
      ],
    },
  );

  holds('on of what cools ends when frost begins', {
    config: vent,
    reads: warm,
    rows: [
      [10, hand('on', H12), 'on hand'],
      [7200, { air: 2.9 }, 'off frost'],
      [7300, { air: 9 }, 'off idle'],
    ],
  });

  holds('on of what cools that is given in frost lasts 30 min, though the frost is over before', {
    config: vent,
    reads: { ...warm, air: 2 },
    rows: [
      [100, hand('on', H12), 'on hand'],
      [600, { air: 9 }, 'on hand'],
      [1899.999, null, 'on hand'],
      [1900, null, 'off idle'],
    ],
  });

  holds('and ends before them when another frost begins', {
    config: vent,
    reads: { ...warm, air: 2 },
    rows: [
      [100, hand('on', H12), 'on hand'],
      [600, { air: 9 }, 'on hand'],
      [900, { air: 2 }, 'off frost'],
    ],
  });

  // silent from 60 s on: dead at 150 s, and 30 min from there
  holds('on lasts 30 min from the death of its point', {
    config: fan(),
    reads: warm,
    rows: [
      [10, hand('on', H12), 'on hand'],
      [60, silent('bench'), 'on hand'],
      [1949.999, null, 'on hand'],
      [1950, null, 'off fail-safe'],
    ],
  });

  holds('on is itself again where its point comes back before', {
    config: fan(),
    reads: warm,
    rows: [
      [10, hand('on', 7200), 'on hand'],
      [60, silent('bench'), 'on hand'],
      [1900, (play: Play) => play.wake('bench'), 'on hand'],
      [7209.999, null, 'on hand'],
      [7210, null, 'off idle'],
    ],
  });

  holds('on lasts 30 min from the command while its point is dead', {
    config: fan(),
    reads: warm,
    rows: [
      [60, silent('bench'), 'off idle'],
      [1000, hand('on', H12), 'on hand'],
      [2799.999, null, 'on hand'],
      [2800, null, 'off fail-safe'],
    ],
  });

  holds('on of a heater ends with its point, is not taken while it is dead, and not for more than an hour', {
    config: fan({ loadKind: 'heater' }),
    reads: warm,
    rows: [
      [10, hand('on', 3601), 'off idle'],
      [20, hand('on', 3600), 'on hand'],
      [60, silent('bench'), 'on hand'],
      [149.999, null, 'on hand'],
      [150, null, 'off fail-safe'],
      [200, hand('on', 60), 'off fail-safe'],
    ],
  });

  holds('off goes on however dead its point is', {
    config: fan(),
    reads: warm,
    rows: [
      [10, hand('off', 7200), 'off hand'],
      [60, silent('bench'), 'off hand'],
      [7209.999, null, 'off hand'],
      [7210, null, 'off fail-safe'],
    ],
  });

  it('and a pulse that waited for a worker have used up their time meanwhile', () => {
    const player = new Player(fan(), warm);
    player.now += 400 * S;
    const given = { channel: 'fan', at: player.now - 100 * S, by: 'Ann' };
    player.observed.commands = [
      { ...given, number: 1, kind: 'prove', seconds: 60 },
      { ...given, number: 2, kind: 'hand', state: 'on', seconds: 300, holdInFrost: false },
    ];
    player.step();
    expect(player.events).toContainEqual(
      expect.objectContaining({ kind: 'command-refused', why: 'too-late' }),
    );
    expect(player.of().until).toBe(player.now + 200 * S);
  });

  holds('for more than 12 h is not taken', {
    config: fan(),
    reads: warm,
    rows: [
      [10, hand('on', H12 + 1), 'off idle'],
      [20, hand('on', H12), 'on hand'],
      [30, hand('off', H12 + 1), 'on hand'],
    ],
  });

  it('on of a heater goes on over a restart of the worker', () => {
    const player = new Player(fan({ loadKind: 'heater' }), warm);
    player.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 3600, holdInFrost: false });
    player.now += 10 * S;
    player.observed.workerStartedAt = player.now - S;
    player.restart().step();
    expect(player.says()).toBe('on hand');
  });
});
