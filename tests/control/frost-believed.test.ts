/** Which house readings frost and its alarm believe, and what becomes of both when the limit changes. On paper; limit 3 °C. */
import { describe, expect, it } from 'vitest';
import type { HouseConfig } from '@/lib/control/types';
import { body, channel, H, house, MIN, point, rule, S } from './house';
import { Player } from './player';
import { holds, silent } from './table';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
type Limits = { frostLimit?: number | null; frostAlarm?: number | null };
const config = ({ frostLimit = null, frostAlarm = null }: Limits, more: Partial<HouseConfig> = {}) => {
  const own = house({
    frostLimit,
    channels: [channel('fan', 1, { frostHelp: true })],
    rules: [rule('fan', body({ point: 'core' }))],
    ...more,
  });
  own.house.frostAlarm = frostAlarm;
  return own;
};
const frosts = (player: Player) => player.faults().filter((kind) => kind === 'frost');

describe('the coldest', () => {
  it.each([
    ['bench', { bench: 1.5, air: 2 }, 1.5],
    ['air', { bench: 2, air: 1.5 }, 1.5],
  ])('is told whichever of the points it is: %s', (key, values, value) => {
    const player = new Player(config({ frostLimit: 3 }), { ...warm, ...values });
    expect(player.of().because).toMatchObject({ point: key, value });
    expect(player.result.faults).toContainEqual(
      expect.objectContaining({ kind: 'frost', data: expect.objectContaining({ point: key, value }) }),
    );
  });

  // the air has never spoken; the bench, of 60 s, is dead in the first ms past 150 s
  holds('is not a point that never spoke: without the other nobody knows, and frost holds for 30 min', {
    config: config({ frostLimit: 3 }),
    reads: { bench: 2, core: 50 },
    rows: [
      [60, silent('bench'), 'on frost'],
      [1949.999, null, 'on frost'],
      [2000, null, 'off idle'],
    ],
  });
});

describe('a limit that changes', () => {
  const none = { on: false, since: null, blindSince: null, alarm: false };

  it('or is taken away ends frost and alarm, and given anew begins them', () => {
    const player = new Player(config({ frostLimit: 3 }), { ...warm, air: 2 });
    expect([player.says(), frosts(player)]).toEqual(['on frost', ['frost']]);
    player.pass(MIN).replan(config({}));
    expect([player.says(), frosts(player)]).toEqual(['off idle', []]);
    expect(player.memory.frost).toEqual(none);
    player.pass(MIN).replan(config({ frostLimit: 3 }));
    expect([player.says(), frosts(player)]).toEqual(['on frost', ['frost']]);
    expect(player.of().because['frostSince']).toBe(player.now);
  });

  it('and an alarm without a limit ends with its own', () => {
    const player = new Player(config({ frostAlarm: 5 }), { ...warm, air: 4 });
    expect([player.says(), frosts(player)]).toEqual(['off idle', ['frost']]);
    player.pass(MIN).replan(config({}));
    expect(frosts(player)).toEqual([]);
    expect(player.memory.frost).toEqual(none);
  });

  it('no house without both has either, however cold', () => {
    const player = new Player(config({}), { ...warm, air: -9 });
    expect([player.says(), frosts(player)]).toEqual(['off idle', []]);
  });
});

describe('a point that stands still at 2 °C', () => {
  const air = point('air', 'house-air', { frozenAfterS: 3600 });
  const core = point('core', 'heap-core');
  const points = [point('bench', 'bench'), air, core];

  it('is believed day and night where it is the only one', () => {
    const player = new Player(config({ frostLimit: 3 }, { points: [air, core] }), { air: 2, core: 50 });
    player.pass(30 * H, MIN);
    expect(player.says()).toBe('on frost');
  });

  it('is not contradicted by a point that is silent, whatever it last said', () => {
    const player = new Player(config({ frostLimit: 3 }, { points }), { ...warm, air: 2 });
    player.silent.add('bench');
    player.pass(16 * H, MIN);
    expect(player.says()).toBe('on frost');
    expect(player.faults()).not.toContain('frozen-point-in-frost');
  });

  it('is believed by an alarm where no limit says what would contradict it', () => {
    const player = new Player(config({ frostAlarm: 3 }, { points }), { ...warm, air: 2 });
    player.pass(16 * H, MIN);
    expect(frosts(player)).toEqual(['frost']);
  });

  it('counts its contradiction from the instant on at which it is frozen', () => {
    const player = new Player(config({ frostLimit: 3 }, { points }), { ...warm, air: 2 });
    // the first reading past 3,600 s of the same value is that of 3,630 s
    player.pass(13 * H + 29 * S, 30 * S);
    expect(player.says()).toBe('on frost');
    player.pass(1 * S, 30 * S);
    expect(player.says()).toBe('off idle');
  });
});
