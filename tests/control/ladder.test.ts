/** Edges of lock-out, short-cycle, hand, limit and proving. */
import { describe, expect, it } from 'vitest';
import type { ChannelConfig, HouseConfig } from '@/lib/control/types';
import { body, channel, H, house, MIN, rule, S, source } from './house';
import { Player } from './player';

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
