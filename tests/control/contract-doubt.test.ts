/** A reading in doubt is not a good one, and none is looked at while nobody drives: what control.md makes of it. On paper. */
import { describe, expect, it } from 'vitest';
import type { HouseConfig } from '@/lib/control/types';
import { cold as gainCold, config as gainConfig } from './gain-house';
import { body, channel, H, house, MIN, point, rest, rule, S, source, START } from './house';
import { Player } from './player';

/** The same house with one point that cannot change by more than a thousandth of a kelvin a second. */
const slow = (config: HouseConfig, key: string): HouseConfig => ({
  ...config,
  points: config.points.map((one) => (one.key === key ? { ...one, maxRate: 0.001 } : one)),
});
/** Readings every 30 s that jump too far: from the second on the point is uncertain, its last plausible value kept. */
const doubt = (player: Player, key: string, until: number) => {
  for (let odd = 0; player.now < until; odd = 1 - odd) player.say({ [key]: 70 + odd * 5 }).pass(30 * S);
  return player;
};
const quality = (player: Player, key: string) => player.result.points.find(({ id }) => id === key)?.quality;

describe('A reading in doubt', () => {
  it('of a loop’s return ends no draw as one without gain', () => {
    // in doubt from 900 s to 1,380 s: the 2 min under the gain can begin only when it is good again
    const player = new Player(slow(gainConfig(), 'out'), gainCold).until(START + 840 * S);
    doubt(player, 'out', START + 1380 * S);
    expect(quality(player, 'out')).toBe('uncertain');
    expect(player.says()).toBe('on band');
    player.say({ out: 5 });
    player.until(START + 1440 * S);
    // three good readings in a row, of 1,410, 1,440 and 1,470 s
    expect(quality(player, 'out')).toBe('uncertain');
    player.until(START + 1590 * S - 1);
    expect(player.says()).toBe('on band');
    player.until(START + 1590 * S);
    expect(player.says()).toBe('off rest');
  });

  it('contradicts no frozen point of the house: only a good one does, and its 12 h begin anew after', () => {
    const config = slow(
      house({
        frostLimit: 3,
        points: [point('air', 'house-air', { frozenAfterS: 600 }), point('bench', 'bench')],
        channels: [channel('fan', 1, { frostHelp: true })],
      }),
      'bench',
    );
    // the air is frozen from 660 s on, against a good bench; that is in doubt 5 min before the 12 h are over
    const ends = START + 660 * S + 12 * H;
    const player = new Player(config, { air: 1, bench: 9 }).until(ends - 5 * MIN, MIN);
    doubt(player, 'bench', ends + MIN);
    expect(quality(player, 'bench')).toBe('uncertain');
    expect(player.switchings()).toEqual([[0, 'on', 'frost']]);
    expect(player.faults()).not.toContain('frozen-point-in-frost');
  });

  it('of a core that is above its ready level does not break the time', () => {
    const config = slow(
      house({
        sources: [source('heap', { ready: { level: 50, forS: 900 } })],
        channels: [channel('fan', 1, { source: 'heap' })],
        rules: [rule('fan', body())],
      }),
      'core',
    );
    const player = new Player(config, { bench: 3, air: 9, core: 55, base: 45 }).until(START + 600 * S);
    doubt(player, 'core', START + 870 * S);
    expect(quality(player, 'core')).toBe('uncertain');
    expect(player.says()).toBe('off source-guard');
    doubt(player, 'core', START + 900 * S);
    expect(player.says()).toBe('on band');
  });
});

describe('While the worker is away', () => {
  it('no level is looked at: a rest that was recovered before goes by what is read after', () => {
    const until = { point: 'base', level: 43 };
    const played = (base: number) => {
      const player = new Player(
        house({
          sources: [source('heap')],
          channels: [channel('fan', 1, { source: 'heap' })],
          rules: [rule('fan', body({ rest: rest(600, 1200, { until, most: 5400 }) }))],
        }),
        { bench: 3, air: 9, core: 50, base: 45 },
      );
      // the rest began at 600 s; its least passes at 1,800 s, when nobody is there
      player.until(START + 20 * MIN);
      player.now = START + 2000 * S;
      player.observed.workerStartedAt = player.now;
      player.say({ base }).restart().step();
      return player;
    };
    expect(played(43).says()).toBe('on band');
    const under = played(40);
    expect(under.says()).toBe('off rest');
    under.until(START + 6000 * S - 1);
    expect(under.says()).toBe('off rest');
    under.until(START + 6000 * S);
    expect(under.says()).toBe('on band');
  });
});
