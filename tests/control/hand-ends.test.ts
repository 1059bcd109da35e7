/** How hands end, and of which rules a channel's point is dead. On paper; a frost limit of 3 °C where there is one. */
import { describe, expect, it } from 'vitest';
import type { RuleBody } from '@/lib/control/rule-body';
import type { ChannelConfig, HouseConfig } from '@/lib/control/types';
import { body, channel, house, MIN, rule, S, START } from './house';
import { Player } from './player';
import { hand, holds, silent } from './table';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
const config = (more: Partial<ChannelConfig> = {}, frostLimit: number | null = null) =>
  house({ frostLimit, channels: [channel('fan', 1, more)], rules: [rule('fan', body())] });
const rules = (...bodies: Partial<RuleBody>[]): HouseConfig => ({
  ...config(),
  rules: bodies.map((one, place) => rule('fan', body(one), `rule-${place}`)),
});
const on = { kind: 'hand', channel: 'fan', state: 'on', seconds: 7200, holdInFrost: false } as const;
/** Seconds from the start, and why. */
const ends = (player: Player) =>
  player.events.flatMap((event) =>
    event.kind === 'hand-ended' ? [[(event.at - START) / S, event.why]] : [],
  );

describe('the end of a hand is told with its cause and who gave it', () => {
  const by = { state: 'on', by: 'Ann' };

  it('its time', () => {
    const player = new Player(config(), warm).order(on).pass(7300 * S);
    expect(ends(player)).toEqual([[7200, { ...by, cause: 'time' }]]);
  });

  // silent from 0 s on: dead in the first ms past 90 s, and 30 min from there
  it('its dead point', () => {
    const player = new Player(config(), warm).order(on);
    player.silent.add('bench');
    player.pass(3000 * S);
    expect(ends(player)).toEqual([[1890.001, { ...by, cause: 'point-dead' }]]);
  });

  it('its time, where the dead point would have ended it at the same instant', () => {
    const player = new Player(config(), warm);
    player.silent.add('bench');
    player.pass(100 * S).order({ ...on, seconds: 1800 });
    player.pass(3000 * S);
    expect(ends(player)).toEqual([[1900, { ...by, cause: 'time' }]]);
  });

  it('frost', () => {
    const player = new Player(config({ loadKind: 'vent' }, 3), warm).order(on);
    player.pass(60 * S).at({ air: 2 });
    expect(ends(player)).toEqual([[60.001, { ...by, cause: 'frost' }]]);
  });

  it('somebody who gives it back, and that without a hand changes nothing', () => {
    const player = new Player(config(), warm).order({ kind: 'auto', channel: 'fan' });
    expect(player.says()).toBe('off idle');
    player.pass(60 * S).order(on);
    player.pass(60 * S).order({ kind: 'auto', channel: 'fan' });
    expect(ends(player)).toEqual([[120, { ...by, cause: 'auto' }]]);
  });
});

describe('when frost begins', () => {
  holds('a hand on of what helps goes on', {
    config: config({ frostHelp: true }, 3),
    reads: warm,
    rows: [
      [10, hand('on', 600), 'on hand'],
      [60, { air: 2 }, 'on hand'],
      [609.999, null, 'on hand'],
      [610, null, 'on frost'],
    ],
  });

  holds('a hand on of what neither helps nor cools goes on', {
    config: config({}, 3),
    reads: warm,
    rows: [
      [10, hand('on', 600), 'on hand'],
      [60, { air: 2 }, 'on hand'],
      [610, null, 'off idle'],
    ],
  });

  holds('a hand off of what cools goes on', {
    config: config({ loadKind: 'vent' }, 3),
    reads: warm,
    rows: [
      [10, hand('off', 600), 'off hand'],
      [60, { air: 2 }, 'off hand'],
      [610, null, 'off frost'],
    ],
  });
});

// silent from 60 s on: dead in the first ms past 150 s where the point is the one that counts, and on till 1,950 s
describe('the point of a channel is dead', () => {
  const summer = { season: { from: '05-01', to: '08-31' } };
  const winter = { season: { from: '10-01', to: '04-30' } };
  const dies = (name: string, own: HouseConfig, hushed: string[], isDead: boolean) => {
    holds(name, {
      config: own,
      reads: warm,
      rows: [
        [10, hand('on', 7200), 'on hand'],
        [60, silent(...hushed), 'on hand'],
        [1949.999, null, 'on hand'],
        [2000, null, isDead ? 'off fail-safe' : 'on hand'],
      ],
    });
  };

  dies(
    'by its rules in season alone: another season’s good point keeps no hand on',
    rules(winter, { ...summer, point: 'air' }),
    ['bench'],
    true,
  );
  dies(
    'and another season’s dead point ends none',
    rules(winter, { ...summer, point: 'air' }),
    ['air'],
    false,
  );
  dies('not while another of its rules has a usable one', rules({}, { point: 'air' }), ['bench'], false);
  dies('not while its stand-in speaks', rules({ standIns: [{ point: 'air', offset: 0 }] }), ['bench'], false);

  it('by all its rules where none is in season', () => {
    const player = new Player(rules(summer), warm).order(on);
    player.pass(60 * MIN);
    expect(player.says()).toBe('on hand');
    const dead = new Player(rules(summer), warm).order(on);
    dead.silent.add('bench');
    dead.pass(60 * MIN);
    expect(ends(dead)[0]?.[0]).toBe(1890.001);
  });

  it('never, where it has no rules at all: its hand lasts as long as it was given', () => {
    const player = new Player(rules(), warm).order(on);
    expect(player.of().because).not.toHaveProperty('pointDeadSince');
    expect(player.pass(60 * MIN).says()).toBe('on hand');
  });

  it('where it is not there at all', () => {
    const player = new Player(rules({ point: 'nowhere' }), warm).order(on);
    expect(player.of().because).toMatchObject({ pointDeadSince: START, until: START + 30 * MIN });
    expect(player.pass(31 * MIN).says()).toBe('off fail-safe');
  });

  it('which is told of a hand on, whose end it brings nearer, and not of a hand off', () => {
    const player = new Player(config(), warm);
    player.silent.add('bench');
    player.pass(100 * S).order({ ...on, state: 'off' });
    expect(player.of().because).not.toHaveProperty('pointDeadSince');
    player.order(on);
    expect(player.of().because).toMatchObject({ pointDeadSince: START + 90.001 * S });
  });

  // it was dead before the worker went away: nobody has heard of it since, so its 30 min go on
  it('and its 30 min go on while no worker runs', () => {
    const player = new Player(config(), warm).order(on);
    player.silent.add('bench');
    player.pass(200 * S);
    player.now += 3000 * S;
    player.observed.workerStartedAt = player.now - S;
    player.step();
    expect(ends(player)).toEqual([[1890.001, { state: 'on', by: 'Ann', cause: 'point-dead' }]]);
  });
});
