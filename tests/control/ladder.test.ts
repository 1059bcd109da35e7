/** Edges of lock-out, interlock, limit, proving, short-cycle, hand, source guard and frost. */
import { describe, expect, it } from 'vitest';
import type { ChannelConfig, HouseConfig } from '@/lib/control/types';
import { body, channel, H, house, MIN, Player, point, rest, rule, S, source } from './house';

const warm = { bench: 9, air: 9, core: 50, base: 45, out: 5 };
const one = (
  more: Partial<ChannelConfig> = {},
  ruleBody = body(),
  house_: Partial<HouseConfig> & { frostLimit?: number | null } = {},
) => house({ channels: [channel('fan', 1, more)], rules: [rule('fan', ruleBody)], ...house_ });
const hand = (state: 'on' | 'off', seconds: number, holdInFrost = false, key = 'fan') =>
  ({ kind: 'hand', channel: key, state, seconds, holdInFrost }) as const;

describe('lock-out', () => {
  it('is off at once, breaking least on, until a person removes it', () => {
    const player = new Player(one({ minOnS: 600 }), { ...warm, bench: 3 });
    player.pass(10 * S).order({ kind: 'lock-out', channel: 'fan', lockout: 'a', why: 'belt' });
    expect(player.says()).toBe('off lock-out');
    expect(player.of().mode).toBe('locked');
    player.order(hand('on', 600)).pass(H);
    expect(player.says()).toBe('off lock-out');
    player.order({ kind: 'unlock', channel: 'fan', lockout: 'a' });
    expect(player.says()).toBe('on band');
  });
});

describe('short-cycle', () => {
  it('holds on for least on and off for least off', () => {
    const player = new Player(one({ minOnS: 120, minOffS: 180 }), { ...warm, bench: 3.9 });
    player
      .until(player.now + 30 * S)
      .say({ bench: 8 })
      .pass(H / 4);
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [120, 'off', 'idle'],
    ]);
    player
      .say({ bench: 3 })
      .pass(30 * S)
      .say({ bench: 9 })
      .pass(150 * S)
      .say({ bench: 3 })
      .pass(H / 4);
    expect(player.switchings().slice(2)).toEqual([
      [960, 'on', 'band'],
      [1080, 'off', 'idle'],
      [1260, 'on', 'band'],
    ]);
  });

  it('a hand off breaks least on; a hand on waits for least off', () => {
    const player = new Player(one({ minOnS: 120, minOffS: 120 }), { ...warm, bench: 3 });
    player.pass(10 * S).order(hand('off', 600));
    expect(player.says()).toBe('off hand');
    player.order(hand('on', 600));
    expect(player.says()).toBe('off short-cycle');
    expect(player.of().because).toMatchObject({ holds: 'off', wantedBy: 'hand', leastS: 120 });
    player.pass(2 * MIN);
    expect(player.says()).toBe('on hand');
  });

  it('without memory least off counts as passed', () => {
    expect(new Player(one({ minOffS: 600 }), { ...warm, bench: 3 }).says()).toBe('on band');
  });
});

describe('hand', () => {
  it('beats the band and ends by itself, to the second', () => {
    const player = new Player(one(), { ...warm, bench: 3 });
    player.order(hand('off', 100)).pass(5 * MIN);
    expect(player.switchings().slice(-2)).toEqual([
      [0, 'off', 'hand'],
      [100, 'on', 'band'],
    ]);
    expect(player.events.filter((event) => event.kind === 'hand-ended')).toHaveLength(1);
  });

  it('a number is taken once, though the command stays in sight', () => {
    const player = new Player(one(), { ...warm, bench: 3 });
    player.order(hand('off', 100)).pass(10 * MIN);
    expect(player.says()).toBe('on band');
  });

  it('off in frost must say that it holds, on a channel that helps', () => {
    const player = new Player(one({ frostHelp: true }, body(), { frostLimit: 3 }), { ...warm, air: 1 });
    player.order(hand('off', 600));
    expect(player.says()).toBe('on frost');
    expect(player.events).toContainEqual(
      expect.objectContaining({ kind: 'command-refused', why: 'frost-needs-hold' }),
    );
    player.order(hand('off', 600, true));
    expect(player.says()).toBe('off hand');
  });

  it('everything off holds in frost too, on every channel', () => {
    const config = one({ frostHelp: true }, body(), { frostLimit: 3 });
    config.channels.push(channel('mat', 2));
    const player = new Player(config, { ...warm, air: 1 });
    player.order({ kind: 'all-off', seconds: 3600 });
    expect([player.says('fan'), player.says('mat')]).toEqual(['off hand', 'off hand']);
    player.pass(61 * MIN);
    expect(player.says()).toBe('on frost');
  });

  it('a heater by hand for more than an hour is refused', () => {
    const player = new Player(one({ loadKind: 'heater' }), warm);
    player.order(hand('on', 3601));
    expect(player.says()).toBe('off idle');
    player.order(hand('on', 3600));
    expect(player.says()).toBe('on hand');
  });

  it('a heater by hand ends with its point', () => {
    const player = new Player(one({ loadKind: 'heater' }), warm);
    player.order(hand('on', 3600));
    player.silent.add('bench');
    player.pass(2 * MIN);
    expect(player.says()).toBe('off fail-safe');
  });

  it('on of a vent ends when frost begins; given in frost it lasts 30 min, with an alarm', () => {
    const player = new Player(
      one({ loadKind: 'vent' }, body({ purpose: 'cool', band: [{ from: '00:00', low: 20, high: 25 }] }), {
        frostLimit: 3,
      }),
      warm,
    );
    player.order(hand('on', 43_200)).at({ air: 2 });
    expect(player.says()).toBe('off frost');
    player.order(hand('on', 43_200));
    expect(player.faults()).toContain('hand-on-in-frost');
    player.pass(31 * MIN);
    expect(player.says()).toBe('off frost');
  });
});

describe('limit', () => {
  it('begins again 1 K under the high limit', () => {
    const player = new Player(one({ highLimit: { point: 'air', above: 20 } }), {
      ...warm,
      bench: 3,
      air: 20,
    });
    expect(player.says()).toBe('on band');
    player.at({ air: 20.01 });
    expect(player.says()).toBe('off limit');
    player.at({ air: 19.01 });
    expect(player.says()).toBe('off limit');
    player.at({ air: 19 });
    expect(player.says()).toBe('on band');
  });

  it('a high-limit point that is bad keeps the load off', () => {
    const player = new Player(one({ highLimit: { point: 'air', above: 20 } }), { bench: 3 });
    expect(player.says()).toBe('off limit');
    expect(player.of().because).toMatchObject({ cause: 'high-limit-point-bad' });
  });

  it('a longest run ends, and begins again only when the band has let go once', () => {
    const player = new Player(one({ longestOnS: 600, minOffS: 60 }), { ...warm, bench: 3 });
    player.pass(H);
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [600, 'off', 'limit'],
    ]);
    player.say({ bench: 8 }).pass(MIN).say({ bench: 3 }).pass(MIN);
    expect(player.says()).toBe('on band');
  });

  it('frost that may break a rest waits for least off alone', () => {
    const player = new Player(
      one({ longestOnS: 600, minOffS: 60, frostHelp: true }, body(), { frostLimit: 3 }),
      { ...warm, bench: 2 },
    );
    player.pass(700 * S);
    expect(player.switchings()).toEqual([
      [0, 'on', 'frost'],
      [600, 'off', 'limit'],
      [660, 'on', 'frost'],
    ]);
  });
});

describe('proving', () => {
  it('that ends where the band wants the load on begins its least on', () => {
    const player = new Player(one({ minOnS: 120 }), warm);
    player
      .order({ kind: 'prove', channel: 'fan', seconds: 10 })
      .say({ bench: 3 })
      .pass(10 * S)
      .say({ bench: 9 })
      .pass(H / 10);
    expect(player.switchings()).toEqual([
      [0, 'on', 'proving'],
      [130, 'off', 'idle'],
    ]);
  });

  it('a pulse on a running load changes nothing', () => {
    const player = new Player(one(), { ...warm, bench: 3 });
    player.order({ kind: 'prove', channel: 'fan', seconds: 10 });
    expect(player.says()).toBe('on band');
  });

  it('longer than 60 s is for channels that draw, and 600 s is the most', () => {
    const config = one({ source: 'heap' }, body(), {
      sources: [source('heap')],
      channels: [channel('fan', 1, { source: 'heap' }), channel('mat', 2)],
    });
    const player = new Player(config, warm);
    player.order({ kind: 'prove', channel: 'mat', seconds: 61 });
    player.order({ kind: 'prove', channel: 'fan', seconds: 600 });
    expect([player.says('mat'), player.says('fan')]).toEqual(['off idle', 'on proving']);
  });
});

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
});

describe('interlocks', () => {
  const lock = (kind: 'never-with' | 'needs', delayS = 5) => ({
    id: 'lock',
    channel: 'a',
    kind,
    other: 'b',
    delayS,
    frostMayBreak: false,
  });
  const pair = (kind: 'never-with' | 'needs', more: Partial<ChannelConfig> = {}, delayS = 5) =>
    house({
      channels: [channel('a', 1, more), channel('b', 2, more)],
      rules: [rule('a', body({ point: 'bench' })), rule('b', body({ point: 'air' }))],
      interlocks: [lock(kind, delayS)],
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
