/** Frost and the core's guard, on paper: a frost limit of 3 °C, a floor of 38 °C, ready over 50 °C for an hour. */
import { describe, expect, it } from 'vitest';
import type { ChannelConfig, HouseConfig } from '@/lib/control/types';
import { body, channel, H, house, MIN, point, rule, source } from './house';
import { Player } from './player';
import { hand, holds, prove, silent, speaking, type Play } from './table';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
const helps = (more: Partial<ChannelConfig> = {}, house_: Partial<HouseConfig> = {}) =>
  house({
    frostLimit: 3,
    channels: [channel('fan', 1, { frostHelp: true, ...more })],
    rules: [rule('fan', body())],
    ...house_,
  });

describe('frost', () => {
  holds('begins under the limit, not at it, and ends a kelvin above', {
    config: helps(),
    reads: { ...warm, air: 3 },
    rows: [
      [0, null, 'off idle'],
      [60, { air: 2.99 }, 'on frost'],
      [120, { air: 3.99 }, 'on frost'],
      [180, { air: 4 }, 'off idle'],
      [240, { air: 3.01 }, 'off idle'],
    ],
  });

  holds('is the lowest of house air and bench, and of nothing else', {
    config: helps({}, { points: [...house().points, point('out', 'outdoors'), point('soil', 'ground')] }),
    reads: { ...warm, out: -8, soil: 1 },
    rows: [
      [0, null, 'off idle'],
      [60, { bench: 2.9 }, 'on frost'],
      [120, { bench: 9, air: 2.9 }, 'on frost'],
      [180, { air: 9 }, 'off idle'],
    ],
  });

  holds('ignores season, hours and conditions, and waits for least off', {
    config: helps(
      { minOffS: 300 },
      {
        rules: [
          rule(
            'fan',
            body({
              season: { from: '03-01', to: '10-31' },
              hours: { from: '10:00', to: '12:00' },
              only: { all: [{ fact: 'core', operator: 'greaterThan', value: 90 }] },
            }),
          ),
        ],
      },
    ),
    reads: warm,
    rows: [
      [60, { air: 2 }, 'on frost'],
      [120, { air: 5 }, 'off idle'],
      [180, { air: 2 }, 'off short-cycle'],
      [419.999, null, 'off short-cycle'],
      [420, null, 'on frost'],
    ],
  });

  holds('puts what cools off, a vent and a channel whose rules all cool, and leaves others alone', {
    config: helps(
      {},
      {
        channels: [
          channel('fan', 1, { frostHelp: true }),
          channel('vent', 2, { loadKind: 'vent' }),
          channel('extract', 3),
          channel('lamp', 4, { loadKind: 'lamp' }),
        ],
        rules: ['vent', 'extract', 'lamp'].map((key) =>
          rule(
            key,
            body({
              purpose: key === 'lamp' ? 'warm' : 'cool',
              point: 'core',
              band: [{ from: '00:00', low: key === 'lamp' ? 60 : 20, high: key === 'lamp' ? 70 : 30 }],
            }),
          ),
        ),
      },
    ),
    reads: warm,
    rows: [
      [0, null, { fan: 'off idle', vent: 'on band', extract: 'on band', lamp: 'on band' }],
      [60, { air: 2 }, { fan: 'on frost', vent: 'off frost', extract: 'off frost', lamp: 'on band' }],
    ],
  });

  // dead at 150 s: 90 s after the reading of 60 s
  holds('that has begun holds for 30 min without any reading, for heaters not at all', {
    config: helps(
      {},
      {
        channels: [
          channel('fan', 1, { frostHelp: true }),
          channel('mat', 2, { frostHelp: true, loadKind: 'heater' }),
        ],
      },
    ),
    reads: { ...warm, air: 2 },
    rows: [
      [60, silent('air', 'bench'), { fan: 'on frost', mat: 'on frost' }],
      [149.999, null, { fan: 'on frost', mat: 'on frost' }],
      [150, null, { fan: 'on frost', mat: 'off idle' }],
      [1949.999, null, { fan: 'on frost', mat: 'off idle' }],
      [1950, null, { fan: 'off fail-safe', mat: 'off idle' }],
      [4000, speaking('air'), { fan: 'on frost', mat: 'on frost' }],
    ],
  });

  holds('ends with the next reading that is warm enough, however long nobody knew', {
    config: helps(),
    reads: { ...warm, air: 2 },
    rows: [
      [60, silent('air', 'bench'), 'on frost'],
      [1000, (play: Play) => play.wake('bench'), 'off idle'],
    ],
  });

  holds('of a house without a frost limit is none', {
    config: house({ channels: [channel('fan', 1, { frostHelp: true })] }),
    reads: { ...warm, air: -9 },
    rows: [[0, null, 'off idle']],
  });
});

describe('a point that stands still in the cold', () => {
  const frozen = helps(
    {},
    {
      points: [point('bench', 'bench'), point('air', 'house-air', { frozenAfterS: 3600 })],
      rules: [rule('fan', body({ band: [{ from: '00:00', low: 1, high: 2 }] }))],
    },
  );
  const played = (air: number, bench: number, hours: number) => {
    const player = new Player(frozen, { bench, air });
    player.pass(hours * H, MIN);
    return player;
  };

  it.each([
    ['at 2 °C is believed for frost for as long as nothing contradicts it', 2, 3.9, 30, 'on frost'],
    ['over 2 °C is doubtful, and bad 10 min later', 2.01, 9, 2, 'off idle'],
    ['at 2 °C against a bench a kelvin over the limit: for 12 h', 2, 4, 12.9, 'on frost'],
    ['at 2 °C against a bench a kelvin over the limit: not longer', 2, 4, 13.1, 'off idle'],
  ])('%s', (_, air, bench, hours, says) => {
    // frozen after an hour; the 12 h count from there
    expect(played(air, bench, hours).says()).toBe(says);
  });

  it('is told of with an alarm once it is not believed any more', () => {
    expect(played(2, 4, 12.9).faults()).not.toContain('frozen-point-in-frost');
    expect(played(2, 4, 13.1).faults()).toContain('frozen-point-in-frost');
  });

  it('has its 12 h anew when the bench was cold in between', () => {
    const player = played(2, 4, 10);
    player
      .say({ bench: 3.9 })
      .pass(MIN)
      .say({ bench: 4 })
      .pass(11 * H, MIN);
    expect(player.says()).toBe('on frost');
    player.pass(1.1 * H, MIN);
    expect(player.says()).toBe('off idle');
  });
});

describe('the core’s floor', () => {
  const heap = (coreFloor: number | null, ready: { level: number; forS: number } | null = null) =>
    helps({ source: 'heap', minOnS: 120 }, { sources: [source('heap', { coreFloor, ready })] });

  holds('ends a draw when its least on has passed, and lets it begin a kelvin above', {
    config: heap(38),
    reads: { ...warm, bench: 3.5 },
    rows: [
      [0, null, 'on band'],
      [30, { core: 37.9 }, 'on short-cycle'],
      [119.999, null, 'on short-cycle'],
      [120, null, 'off source-guard'],
      [200, { core: 38.99 }, 'off source-guard'],
      [300, { core: 39 }, 'on band'],
      [600, { core: 38 }, 'on band'],
    ],
  });

  holds('is above frost, under hand and proving', {
    config: heap(38),
    reads: { ...warm, bench: 2, core: 30 },
    rows: [
      [0, null, 'off source-guard'],
      [10, prove(20), 'on proving'],
      [30, null, 'off source-guard'],
      [60, hand('on', 600), 'on hand'],
      [660, null, 'off source-guard'],
    ],
  });

  // silent from 60 s on, bad at 150 s: the floor says nothing, but is not forgotten
  holds('says nothing while the core is not good, and still stands when it is', {
    config: heap(38),
    reads: { ...warm, bench: 3.5, core: 37 },
    rows: [
      [60, silent('core'), 'off source-guard'],
      [149.999, null, 'off source-guard'],
      [150, null, 'on band'],
      [600, (play: Play) => play.wake('core'), 'off source-guard'],
      [700, { core: 38.5 }, 'off source-guard'],
    ],
  });

  // over 50 °C from 100 s, broken at 2,000 s, over again from 2,100 s: ready at 5,700 s
  holds('a heap is ready strictly over its level for its time without a break, and then for good', {
    config: heap(null, { level: 50, forS: 3600 }),
    reads: { ...warm, bench: 2, core: 50 },
    rows: [
      [0, null, 'off source-guard'],
      [100, { core: 50.1 }, 'off source-guard'],
      [2000, { core: 50 }, 'off source-guard'],
      [2100, { core: 55 }, 'off source-guard'],
      [5699.999, null, 'off source-guard'],
      [5700, null, 'on frost'],
      [6000, { core: 20 }, 'on frost'],
      [6100, (play: Play) => play.order({ kind: 'rebuilt', source: 'heap' }), 'off source-guard'],
      [6200, (play: Play) => play.order({ kind: 'ready', source: 'heap' }), 'on frost'],
    ],
  });

  holds('a core that nobody knows breaks the time', {
    config: heap(null, { level: 50, forS: 3600 }),
    reads: { ...warm, bench: 2, core: 55 },
    rows: [
      [60, silent('core'), 'off source-guard'],
      // bad at 150 s; 3,600 s from 1,000 s on
      [1000, speaking('core'), 'off source-guard'],
      [4599.999, null, 'off source-guard'],
      [4600, null, 'on frost'],
    ],
  });
});
