/** Edges of source guard, frost and interlocks. */
import { describe, expect, it } from 'vitest';
import type { ChannelConfig, HouseConfig } from '@/lib/control/types';
import { body, channel, H, house, interlock, MIN, point, rest, rule, S, source } from './house';
import { Player } from './player';

const warm = { bench: 9, air: 9, core: 50, base: 45, out: 5 };
const one = (
  more: Partial<ChannelConfig> = {},
  ruleBody = body(),
  house_: Partial<HouseConfig> & { frostLimit?: number | null } = {},
) => house({ channels: [channel('fan', 1, more)], rules: [rule('fan', ruleBody)], ...house_ });
const hand = (state: 'on' | 'off', seconds: number, holdInFrost = false, key = 'fan') =>
  ({ kind: 'hand', channel: key, state, seconds, holdInFrost }) as const;

describe('source guard', () => {
  const heap = (more = {}) => ({ sources: [source('heap', more)], frostLimit: 3 });

  it('ends a running draw when its least on has passed, and lets it begin 1 K above the floor', () => {
    const config = one({ source: 'heap', minOnS: 120 }, body(), heap({ coreFloor: 38 }));
    const player = new Player(config, { ...warm, bench: 3 });
    player
      .pass(30 * S)
      .say({ core: 37.9 })
      .pass(5 * MIN);
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [120, 'off', 'source-guard'],
    ]);
    player.at({ core: 38.9 });
    expect(player.says()).toBe('off source-guard');
    player.at({ core: 39 });
    expect(player.says()).toBe('on band');
  });

  it('a core that is not good silences the floor, with an alarm, and the floor is remembered', () => {
    const player = new Player(one({ source: 'heap' }, body(), heap({ coreFloor: 38 })), {
      ...warm,
      bench: 3,
      core: 37,
    });
    player.silent.add('core');
    player.pass(2 * MIN);
    expect(player.says()).toBe('on band');
    expect(player.faults()).toContain('core-not-good');
    player.silent.delete('core');
    player.at({ core: 38.5 });
    expect(player.says()).toBe('off source-guard');
  });

  it('a heap is ready once strictly above its level for its time without a break, and then for good', () => {
    const player = new Player(one({ source: 'heap' }, body(), heap({ ready: { level: 50, forS: 3600 } })), {
      ...warm,
      bench: 3,
      core: 50,
    });
    player.pass(2 * H);
    expect(player.says()).toBe('off source-guard');
    player
      .say({ core: 51 })
      .pass(50 * MIN)
      .say({ core: 50 })
      .pass(MIN)
      .say({ core: 51 })
      .pass(59 * MIN);
    expect(player.says()).toBe('off source-guard');
    player.pass(2 * MIN);
    expect(player.says()).toBe('on band');
    player.at({ core: 20 });
    expect(player.says()).toBe('on band');
    player.order({ kind: 'rebuilt', source: 'heap' });
    expect(player.says()).toBe('off source-guard');
  });
});

describe('frost', () => {
  const helps = (more: Partial<ChannelConfig> = {}) =>
    one({ frostHelp: true, ...more }, body(), { frostLimit: 3 });

  it('begins under the limit, not at it, and ends 1 K above', () => {
    const player = new Player(helps(), { ...warm, air: 3 });
    const says = [2.99, 3.99, 4].map((air) => player.at({ air }).says());
    expect(says).toEqual(['on frost', 'on frost', 'off idle']);
  });

  it('without any reading holds for 30 min once begun, but never for a heater', () => {
    const config = helps();
    config.channels.push(channel('mat', 2, { loadKind: 'heater', frostHelp: true }));
    const player = new Player(config, { ...warm, air: 1 });
    player.silent.add('air').add('bench');
    player.pass(2 * MIN);
    expect([player.says('fan'), player.says('mat')]).toEqual(['on frost', 'off idle']);
    expect(player.faults()).toContain('frost-without-reading');
    player.pass(30 * MIN);
    expect(player.says()).toBe('off fail-safe');
  });

  it('a frozen point at 0 °C stays good for it, for 12 h against another good point', () => {
    const config = helps();
    config.points = [point('bench', 'bench'), point('air', 'house-air', { frozenAfterS: 3600 })];
    const player = new Player(config, { bench: 9, air: 0 });
    player.pass(12 * H, MIN);
    expect(player.says()).toBe('on frost');
    player.pass(2 * H, MIN);
    expect(player.says()).toBe('off idle');
    expect(player.faults()).toContain('frozen-point-in-frost');
  });

  it('does not break a rest that its rule keeps from it', () => {
    const config = one(
      { frostHelp: true, source: 'heap' },
      body({ rest: rest(600, 1200, { frostMayBreak: false }) }),
      { frostLimit: 3, sources: [source('heap')] },
    );
    const player = new Player(config, { ...warm, bench: 2 });
    player.pass(700 * S);
    expect(player.says()).toBe('off rest');
  });

  // 10 of 600 s are left, and 60 s of 36 000 came back 1 s of draw: under its least on of 120 s
  it('nor begins a draw that such a heap’s credit is not worth', () => {
    const config = one(
      { frostHelp: true, source: 'heap', minOnS: 120 },
      body({ rest: rest(600, 36_000, { frostMayBreak: false }) }),
      { frostLimit: 3, sources: [source('heap')] },
    );
    const player = new Player(config, { ...warm, bench: 3.5 });
    player.pass(590 * S, 10 * S);
    player.at({ bench: 8 });
    expect(player.says()).toBe('off idle');
    player.pass(60 * S).at({ air: 2 });
    expect(player.says()).toBe('off rest');
    expect(player.of().because).toMatchObject({ cause: 'not-worth-a-start', leastOnS: 120 });
  });
});

describe('interlocks', () => {
  const pair = (kind: 'never-with' | 'needs', more: Partial<ChannelConfig> = {}, delayS = 5) =>
    house({
      channels: [channel('a', 1, more), channel('b', 2, more)],
      rules: [rule('a', body({ point: 'bench' })), rule('b', body({ point: 'air' }))],
      interlocks: [interlock(kind, 'a', 'b', { delayS })],
    });

  it('never-with: of two that the band wants, the one that runs keeps; the other starts the delay after it is off', () => {
    const player = new Player(pair('never-with'), { bench: 9, air: 3 });
    player.say({ bench: 3 }).pass(MIN);
    expect([player.says('a'), player.says('b')]).toEqual(['off interlock', 'on band']);
    player.say({ air: 9 }).pass(MIN);
    expect(player.switchings('b').at(-1)).toEqual([90, 'off', 'idle']);
    expect(player.switchings('a')).toEqual([[95, 'on', 'band']]);
  });

  it('never-with: at once, the lower number keeps', () => {
    const player = new Player(pair('never-with'), { bench: 3, air: 3 });
    expect([player.says('a'), player.says('b')]).toEqual(['on band', 'off interlock']);
  });

  it('never-with: a hand beats the band, least on counting for nothing', () => {
    const player = new Player(pair('never-with', { minOnS: 600 }), { bench: 3, air: 9 });
    player.pass(MIN).order(hand('on', 600, false, 'b'));
    expect(player.says('a')).toBe('off interlock');
    player.pass(5 * S);
    expect(player.says('b')).toBe('on hand');
  });

  it('needs: starts the delay after the other is on, does not start it, and goes before it', () => {
    const player = new Player(pair('needs'), { bench: 3, air: 9 });
    player.pass(MIN);
    expect([player.says('a'), player.says('b')]).toEqual(['off interlock', 'off idle']);
    player
      .say({ air: 3 })
      .pass(30 * S)
      .pass(30 * S);
    expect([player.switchings('b'), player.switchings('a')]).toEqual([
      [[90, 'on', 'band']],
      [[95, 'on', 'band']],
    ]);
    player.say({ air: 9 }).pass(MIN);
    expect(player.switchings('a').at(-1)).toEqual([150, 'off', 'interlock']);
    expect(player.says('b')).toBe('off idle');
  });

  it('needs: a lock-out of the needed one does not wait', () => {
    const player = new Player(pair('needs'), { bench: 3, air: 3 });
    player.pass(MIN).order({ kind: 'lock-out', channel: 'b', lockout: 'x', why: 'pump' });
    expect([player.says('a'), player.says('b')]).toEqual(['off interlock', 'off lock-out']);
  });
});
