/** What control.md says of readings and the claims that hang on them, where no other file holds it. On paper. */
import { describe, expect, it } from 'vitest';
import type { ConditionTree, PointConfig } from '@/lib/control/types';
import { body, channel, house, MIN, point, rule, S, source, START } from './house';
import { Player } from './player';
import { holds, silent, type Play } from './table';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
const benchIs = (more: Partial<PointConfig>) => [point('bench', 'bench', more), point('air', 'house-air')];

describe('Silence', () => {
  it.each([
    ['three reporting intervals where nothing else is set', { staleAfterS: null, reportEveryS: 20 }, 60],
    ['three of a slower board’s', { staleAfterS: null, reportEveryS: 300 }, 900],
    ['what is set, whatever its board’s interval', { staleAfterS: 45, reportEveryS: 300 }, 45],
  ])('counts after %s', (_, more, seconds) => {
    const player = new Player(house({ points: benchIs(more), rules: [rule('fan', body())] }), { bench: 3 });
    player.silent.add('bench');
    player.until(START + seconds * S);
    expect(player.says()).toBe('on band');
    player.until(START + seconds * S + 1);
    expect(player.says()).toBe('off fail-safe');
  });
});

describe('A point that stands still', () => {
  it.each([
    ...(['light', 'contact', 'ground', 'heap-core', 'heap-base', 'heap-edge'] as const).map((role) => [
      role,
      'good',
    ]),
    ...(['bench', 'house-air', 'outdoor-air', 'loop-return', 'humidity'] as const).map((role) => [
      role,
      'uncertain',
    ]),
  ])('of %s is %s after its time', (role, quality) => {
    const points = [point('probe', role, { frozenAfterS: 600 })];
    const player = new Player(house({ points }), { probe: 5 }).pass(11 * MIN);
    expect(player.result.points[0]?.quality).toBe(quality);
  });
});

describe('A point of the house that stands still in the cold', () => {
  // frozen with the reading of 3,660 s; the bench is a kelvin over the limit all along
  it('is believed for 12 h against another, to the ms, and then the alarm begins', () => {
    const config = house({
      frostLimit: 3,
      points: [point('bench', 'bench'), point('air', 'house-air', { frozenAfterS: 3600 })],
      channels: [channel('fan', 1, { frostHelp: true })],
    });
    const player = new Player(config, { bench: 4, air: 1 }).pass(14 * 60 * MIN, MIN);
    const ends = 3660 + 43_200;
    expect(player.switchings()).toEqual([
      [0, 'on', 'frost'],
      [ends, 'off', 'idle'],
    ]);
    const begun = player.events.flatMap((one) =>
      one.kind === 'fault-begun' && one.fault.kind === 'frozen-point-in-frost' ? [one.at] : [],
    );
    expect(begun).toEqual([START + ends * S]);
  });
});

describe('Stand-ins', () => {
  const standIns = [
    { point: 'air', offset: -1 },
    { point: 'spare', offset: -2 },
  ];
  const config = house({
    points: [point('bench', 'bench'), point('air', 'house-air'), point('spare', 'bench')],
    rules: [rule('fan', body({ standIns }))],
  });
  const using = (player: Player) => player.memory.rules[0]?.using;

  it('are asked in their order, and each gives way to one before it after three good readings of that', () => {
    const player = new Player(config, { bench: 9, air: 9, spare: 9 });
    expect(using(player)).toBe(0);
    player.silent.add('air');
    player.pass(2 * MIN);
    player.silent.add('bench');
    player.pass(2 * MIN);
    // the first stand-in is dead already: the second it is, and the fan goes by it
    expect(using(player)).toBe(2);
    expect(player.at({ spare: 5.9 }).says()).toBe('on band');
    player.silent.delete('air');
    for (const place of [2, 2, 1]) {
      player.now += 30 * S;
      player.say({ air: 8 }).step();
      expect(using(player)).toBe(place);
    }
    // 8 − 1 is no more than 7.5; 8.6 − 1 is
    expect(player.says()).toBe('on band');
    expect(player.at({ air: 8.6 }).says()).toBe('off idle');
    player.silent.delete('bench');
    for (const place of [1, 1, 0]) {
      player.now += 30 * S;
      player.say({ bench: 3 }).step();
      expect(using(player)).toBe(place);
    }
    expect(player.says()).toBe('on band');
  });
});

describe('An uncertain point', () => {
  // 0.01 °C a second: from 60 s on the bench falls too fast, twice in a row; the values are kept, never used
  const doubted = (more: Parameters<typeof house>[0] = {}) =>
    new Player(house({ points: benchIs({ maxRate: 0.01 }), rules: [rule('fan', body())], ...more }), {
      ...warm,
      bench: 5,
    });
  const fall = (player: Player, until: number) => {
    for (let odd = 0; player.now < until; odd = 1 - odd) player.say({ bench: -20 - odd * 10 }).pass(30 * S);
    return player;
  };

  it('holds a latch that is off as well as one that is on, and for 10 min no fail-safe speaks', () => {
    const player = fall(doubted(), START + 60 * S);
    expect(player.result.points[0]).toMatchObject({ quality: 'uncertain', why: 'too-fast', value: 5 });
    const since = player.now;
    fall(player, since + 9 * MIN);
    expect(player.says()).toBe('off idle');
    fall(player, since + 11 * MIN);
    expect(player.says()).toBe('off fail-safe');
  });

  it('is still heard by frost: with its last plausible value, till it counts as bad', () => {
    const config = {
      frostLimit: 6,
      channels: [channel('fan', 1, { frostHelp: true })],
      rules: [],
    };
    // the bench’s 5 °C are under the limit of 6; the air’s 9 are not
    const player = fall(doubted(config), START + 60 * S);
    expect(player.result.points[0]?.quality).toBe('uncertain');
    expect(player.says()).toBe('on frost');
    fall(player, START + 12 * MIN);
    expect(player.says()).toBe('off idle');
  });
});

describe('A core in doubt', () => {
  /** Two readings that jump too far: from 60 s on the core is uncertain, its value kept. */
  const doubt = (player: Player) => {
    for (const core of [80, 20]) player.say({ core }).pass(30 * S);
    expect(player.result.points.find(({ id }) => id === 'core')).toMatchObject({ quality: 'uncertain' });
    return player;
  };
  const points = house().points.map((one) => (one.key === 'core' ? { ...one, maxRate: 0.01 } : one));
  const heap = { points, sources: [source('heap', { coreFloor: 38 })] };
  const fan = [channel('fan', 1, { source: 'heap' })];

  it('silences its floor at once, with an alarm, and stops no draw', () => {
    const rules = [rule('fan', body())];
    const under = new Player(house({ ...heap, channels: fan, rules }), { ...warm, bench: 3, core: 37 });
    expect(under.says()).toBe('off source-guard');
    expect(doubt(under).says()).toBe('on band');
    expect(under.faults()).toContain('core-not-good');
    const over = new Player(house({ ...heap, channels: fan, rules }), { ...warm, bench: 3, core: 50 });
    expect(doubt(over).switchings()).toEqual([[0, 'on', 'band']]);
  });

  it('makes a condition on it unknown at once: only a good reading counts', () => {
    const only = { all: [{ fact: 'core', operator: 'greaterThan' as const, value: 45 }] };
    const player = new Player(house({ points, rules: [rule('fan', body({ only }))] }), { ...warm, bench: 3 });
    expect(player.says()).toBe('on band');
    expect(doubt(player).of()).toMatchObject({
      because: { rules: [{ why: 'condition-unknown', unknown: ['core'] }] },
    });
    expect(player.says()).toBe('off idle');
  });
});

describe('Fail-safe', () => {
  holds('speaks out of hours too: a rule in season that nobody can read', {
    config: house({
      channels: [channel('fan', 1, { contact: 'NC' })],
      rules: [rule('fan', body({ hours: { from: '12:00', to: '13:00' } }))],
    }),
    reads: warm,
    rows: [
      [60, silent('bench'), 'off idle'],
      [150, null, 'on fail-safe'],
      [600, (play: Play) => play.wake('bench'), 'off idle'],
    ],
  });

  holds('is silent for a condition that nobody can read: that is a rule not met', {
    config: house({
      channels: [channel('fan', 1, { contact: 'NC' })],
      rules: [rule('fan', body({ only: { all: [{ fact: 'core', operator: 'greaterThan', value: 45 }] } }))],
    }),
    reads: { ...warm, bench: 3 },
    rows: [
      [60, silent('core'), 'on band'],
      [150, null, 'off idle'],
    ],
  });
});

describe('A condition without a good reading', () => {
  const above = { fact: 'core', operator: 'greaterThan', value: 45 } as const;
  it.each<[string, ConditionTree]>([
    ['is not met', { all: [above] }],
    ['nor is its not', { all: [{ not: above }] }],
    [
      'nor one of any, where no other is met',
      { any: [above, { fact: 'air', operator: 'lessThan', value: 0 }] },
    ],
  ])('%s, and says so', (_, only) => {
    const rules = [rule('fan', body({ only }))];
    const player = new Player(house({ rules }), { ...warm, bench: 3 });
    player.silent.add('core');
    player.pass(2 * MIN);
    expect(player.says()).toBe('off idle');
    expect(player.of().because).toMatchObject({
      rules: [{ why: 'condition-unknown', unknown: ['core'], latch: true }],
    });
  });
});
