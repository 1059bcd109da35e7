import { describe, expect, it } from 'vitest';
import { states, carriedSeaLevelWPerK, carried2400mWPerK } from '../checks/air';
import type { PointConfig } from '@/lib/control/types';
import { body, channel, house, MIN, point, rule, S } from './house';
import { Player } from './player';

const derived = (key: string, of: string, points: string[], more: Partial<PointConfig> = {}) =>
  point(key, 'other', { derived: { of, points, ...(of === 'trend' ? { windowS: 600 } : {}) }, ...more });

const wide = { min: null, max: null };
const config = (...points: PointConfig[]) =>
  house({
    points: [
      point('a', 'house-air', wide),
      point('b', 'outdoors', { staleAfterS: 300 }),
      point('rh', 'humidity', { min: 0, max: 100 }),
      ...points,
    ],
    channels: [channel('fan', 1, { flowM3S: 0.042475 })],
    loops: [{ id: 'loop', name: 'loop', source: null, channel: 'fan', intake: 'a', return: 'b' }],
  });
const value = (player: Player, key: string) => player.result.points.find((one) => one.id === key);

describe('derived points', () => {
  it.each<[string, string[], number]>([
    ['difference', ['a', 'b'], 15],
    ['lift', ['a', 'b'], 15],
    ['mean', ['a', 'b', 'rh'], (20 + 5 + 60) / 3],
    ['least', ['a', 'b', 'rh'], 5],
    ['greatest', ['a', 'b', 'rh'], 60],
  ])('%s of %j is %f', (of, points, expected) => {
    const player = new Player(config(derived('d', of, points)), { a: 20, b: 5, rh: 60 });
    expect(value(player, 'd')?.value).toBeCloseTo(expected, 9);
    expect(value(player, 'd')?.quality).toBe('good');
  });

  it.each(states)('of air at $tempC °C the dew point and the deficit are the handbook’s', (state) => {
    const points = [
      derived('dew', 'dew-point', ['a', 'rh']),
      derived('vpd', 'vapour-pressure-deficit', ['a', 'rh']),
    ];
    const player = new Player(config(...points), { a: state.tempC, b: 5, rh: state.rh * 100 });
    expect(Math.abs((value(player, 'dew')?.value ?? NaN) - state.dewC)).toBeLessThan(0.01);
    expect(Math.abs((value(player, 'vpd')?.value ?? NaN) - state.vpdPa)).toBeLessThan(0.5);
  });

  it.each([
    [0, carriedSeaLevelWPerK],
    [2400, carried2400mWPerK],
  ])('a loop’s heat a kelvin at %i m is what the air of that height carries', (altitude, wPerK) => {
    const base = config(derived('heat', 'loop-heat', ['a', 'b']));
    base.house.altitude = altitude;
    const player = new Player(base, { a: 20, b: 30 });
    expect(Math.abs((value(player, 'heat')?.value ?? NaN) / 10 - wPerK)).toBeLessThan(0.1);
    player.at({ b: 15 });
    expect(Math.abs((value(player, 'heat')?.value ?? NaN) / -5 - wPerK)).toBeLessThan(0.1);
  });

  it('a loop without a known flow has no known heat', () => {
    const base = config(derived('heat', 'loop-heat', ['a', 'b']));
    const player = new Player({ ...base, channels: [channel('fan', 1)] }, { a: 20, b: 30 });
    expect(value(player, 'heat')).toMatchObject({ value: null, quality: 'bad', why: 'cannot-be-reckoned' });
  });

  it.each([
    [250, 50],
    [-40, 0.01],
    [20, 0],
  ])('what the equations cannot say at %f °C and %f %%RH is unknown, and stops nothing', (a, rh) => {
    const points = [derived('dew', 'dew-point', ['a', 'rh']), derived('least', 'least', ['a', 'rh'])];
    const player = new Player(config(...points), { a, rh });
    expect(value(player, 'dew')).toMatchObject({ quality: 'bad', why: 'cannot-be-reckoned' });
    expect(value(player, 'least')?.quality).toBe('good');
    player.at({ a: 20, rh: 60 });
    expect(value(player, 'dew')?.quality).toBe('good');
  });
});

describe('a trend', () => {
  it('is the slope an hour over its window, and bad until half of it is there', () => {
    const player = new Player(config(derived('t', 'trend', ['a'])), { a: 20 });
    expect(value(player, 't')).toMatchObject({ quality: 'bad', why: 'window-not-full' });
    for (let step = 1; step <= 30; step += 1) {
      player.say({ a: 20 - step / 60 }).pass(30 * S);
      expect(value(player, 't')?.quality, `${step * 30} s`).toBe(step < 10 ? 'bad' : 'good');
    }
    // 1/60 K in 30 s is 2 K an hour
    expect(value(player, 't')?.value).toBeCloseTo(-2, 6);
  });

  // least squares by hand: t 0, 100, … 500 s and v 1, 3, 2, 5, 4, 6: Σ(t−t̄)(v−v̄) / Σ(t−t̄)² = 1550/175,000 a second
  it('is that of least squares, of what its window holds', () => {
    const player = new Player(config(derived('t', 'trend', ['b'])), { b: 50 });
    player.pass(700 * S, 100 * S);
    const values = [1, 3, 2, 5, 4, 6];
    for (const b of values) {
      player.now += 100 * S;
      player.say({ b }).step();
    }
    expect(value(player, 't')?.value).not.toBeCloseTo((1550 / 175_000) * 3600, 3);
    const alone = new Player(config(derived('t', 'trend', ['b'])), { b: 1 });
    for (const b of values.slice(1)) {
      alone.now += 100 * S;
      alone.say({ b }).step();
    }
    expect(value(alone, 't')?.value).toBeCloseTo((1550 / 175_000) * 3600, 6);
    // 700 s on, the first of them have left the window of 600 s, whatever they were
    alone.say({ b: 6 }).pass(700 * S, 100 * S);
    expect(value(alone, 't')?.value).toBeCloseTo(0, 6);
  });

  it('keeps a sample in 5 s or two, however often its point is read, and the newest counts', () => {
    const player = new Player(config(derived('t', 'trend', ['a'])), { a: 0 });
    for (let s = 1; s <= 1300; s += 1) {
      player.now += S;
      player.say({ a: s / 3600 }).step();
    }
    expect(player.memory.points.find((one) => one.id === 't')?.trail?.length).toBeLessThanOrEqual(242);
    expect(value(player, 't')?.value).toBeCloseTo(1, 6);
  });

  it('begins anew after a silence longer than its window', () => {
    const player = new Player(config(derived('t', 'trend', ['a'])), { a: 20 });
    player.pass(10 * MIN);
    player.silent.add('a');
    player.pass(20 * MIN);
    player.silent.delete('a');
    player.at({ a: 5 });
    expect(value(player, 't')).toMatchObject({ quality: 'bad', why: 'window-not-full' });
  });
});

describe('the quality of a derived point', () => {
  it('is the worst of its inputs’, through another derived point too', () => {
    const player = new Player(
      config(derived('dd', 'least', ['d', 'rh']), derived('d', 'difference', ['a', 'b'])),
      { a: 20, b: 5, rh: 60 },
    );
    expect(value(player, 'dd')).toMatchObject({ value: 15, quality: 'good' });
    player.silent.add('a');
    player.pass(2 * MIN);
    expect(value(player, 'dd')).toMatchObject({ quality: 'bad', why: 'input-bad' });
    player.silent.delete('a');
    player.at({ a: 9 });
    expect(value(player, 'dd')).toMatchObject({ value: 4, quality: 'good', why: null });
  });

  it('is uncertain with an input in doubt, and so are they for ten minutes', () => {
    const base = config(derived('d', 'mean', ['a', 'b']));
    base.points[0] = point('a', 'house-air', { maxRate: 0.01 });
    base.rules = [rule('fan', body({ point: 'd' }))];
    const player = new Player(base, { a: 3, b: 3 });
    expect(player.says()).toBe('on band');
    player.at({ a: 40 }).at({ a: 41 });
    expect(value(player, 'd')).toMatchObject({ value: 3, quality: 'uncertain', why: 'input-uncertain' });
    expect(player.says()).toBe('on band');
    for (let step = 0; step < 22; step += 1) player.say({ a: 41 + step }).pass(30 * S);
    expect(player.says()).toBe('off fail-safe');
  });

  it('a rule comes back to it from a stand-in when each of its inputs has been good three times', () => {
    const base = config(derived('d', 'mean', ['a', 'b']));
    base.rules = [rule('fan', body({ point: 'd', standIns: [{ point: 'rh', offset: 0 }] }))];
    const player = new Player(base, { a: 9, b: 9, rh: 3 });
    expect(player.says()).toBe('off idle');
    player.silent.add('a');
    player.pass(2 * MIN);
    expect(player.says()).toBe('on band');
    player.silent.delete('a');
    player.pass(60 * S);
    expect(player.says()).toBe('on band');
    player.pass(30 * S);
    expect(player.says()).toBe('off idle');
  });

  it('in a ring, or of a point that is not there, is bad', () => {
    const player = new Player(
      config(derived('x', 'least', ['y']), derived('y', 'least', ['x']), derived('z', 'least', ['nobody'])),
      { a: 1 },
    );
    expect(['x', 'y', 'z'].map((key) => value(player, key)?.quality)).toEqual(['bad', 'bad', 'bad']);
  });
});
