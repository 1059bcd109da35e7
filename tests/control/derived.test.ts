import { describe, expect, it } from 'vitest';
import type { PointConfig } from '@/lib/control/types';
import { channel, house, MIN, Player, point, S } from './house';

const derived = (key: string, of: string, points: string[], more: Partial<PointConfig> = {}) =>
  point(key, 'other', { derived: { of, points, ...(of === 'trend' ? { windowS: 600 } : {}) }, ...more });

const config = (...points: PointConfig[]) =>
  house({
    points: [
      point('a', 'house-air'),
      point('b', 'outdoors', { staleAfterS: 300 }),
      point('rh', 'humidity'),
      ...points,
    ],
    channels: [channel('fan', 1, { flowM3S: 0.0425 })],
    loops: [{ id: 'loop', name: 'loop', source: null, channel: 'fan', intake: 'a', return: 'b' }],
  });
const value = (player: Player, key: string) => player.result.points.find((one) => one.id === key);

describe('derived points', () => {
  it.each<[string, string[], number, number]>([
    ['difference', ['a', 'b'], 15, 6],
    ['lift', ['a', 'b'], 15, 6],
    ['mean', ['a', 'b', 'rh'], (20 + 5 + 60) / 3, 9],
    ['least', ['a', 'b'], 5, 9],
    ['greatest', ['a', 'b'], 20, 9],
    // A-STATE-20-60, recomputed from the handbook's equations: dew point 12.007 °C, deficit 935.5 Pa
    ['dew-point', ['a', 'rh'], 12.007, 1],
    ['vapour-pressure-deficit', ['a', 'rh'], 935.5, 0],
  ])('%s of %j is %f', (of, points, expected, digits) => {
    const player = new Player(config(derived('d', of, points)), { a: 20, b: 5, rh: 60 });
    expect(value(player, 'd')?.value).toBeCloseTo(expected, digits);
    expect(value(player, 'd')?.quality).toBe('good');
  });

  it('heat of a loop that cools the house is negative', () => {
    const player = new Player(config(derived('heat', 'loop-heat', ['a', 'b'])), { a: 20, b: 5 });
    // dry air at 310 m and 20 °C weighs 1.160 kg a m³: 1.160 × 0.0425 × 1006 × (5 − 20) W
    expect(value(player, 'heat')?.value).toBeCloseTo(-744, -1);
  });

  it('a trend is the slope an hour over its window, and bad until half of it is there', () => {
    const player = new Player(config(derived('t', 'trend', ['a'])), { a: 20 });
    expect(value(player, 't')?.quality).toBe('bad');
    for (let step = 1; step <= 30; step += 1) player.say({ a: 20 - step / 60 }).pass(30 * S);
    // 1/60 K in 30 s is 2 K an hour
    expect(value(player, 't')?.value).toBeCloseTo(-2, 6);
    expect(player.memory.points.find((one) => one.id === 't')?.trail?.length).toBeLessThanOrEqual(121);
  });

  it('has the worst quality of its inputs, through another derived point too', () => {
    const player = new Player(
      config(derived('d', 'difference', ['a', 'b']), derived('dd', 'least', ['d', 'rh'])),
      { a: 20, b: 5, rh: 60 },
    );
    expect(value(player, 'dd')).toMatchObject({ value: 15, quality: 'good' });
    player.silent.add('a');
    player.pass(2 * MIN);
    expect(value(player, 'dd')).toMatchObject({ quality: 'bad', why: 'input-bad' });
  });

  it('in a ring, or of a point that is not there, stays bad', () => {
    const player = new Player(
      config(derived('x', 'least', ['y']), derived('y', 'least', ['x']), derived('z', 'least', ['nobody'])),
      { a: 1 },
    );
    expect(['x', 'y', 'z'].map((key) => value(player, key)?.quality)).toEqual(['bad', 'bad', 'bad']);
  });
});
