/** A point that comes and goes: silent after 90 s, by a fan that is on below 4 and off above 7.5 °C. */
import { describe, expect, it } from 'vitest';
import { body, house, MIN, point, rule, S } from './house';
import { Player } from './player';

const points = [point('bench', 'bench'), point('air', 'house-air')];
const played = (standIn = false, more: { frostLimit?: number; bench?: number } = {}) => {
  const standIns = standIn ? [{ point: 'air', offset: 0 }] : [];
  const { frostLimit = null, bench = 5 } = more;
  return new Player(house({ points, frostLimit, rules: [rule('fan', body({ standIns }))] }), {
    bench,
    air: 5,
  });
};
const quality = (player: Player) => player.result.points.find((one) => one.id === 'bench');

/** The bench is silent for two minutes while the air goes on, then speaks once. */
function drop(player: Player): void {
  player.silent.add('bench');
  player.pass(2 * MIN);
  player.silent.delete('bench');
  player.pass(30 * S);
}
const faults = (player: Player) =>
  player.events.flatMap((one) => (one.kind === 'fault-begun' ? [one.fault.kind] : []));

describe('A point that comes and goes', () => {
  it('is believed at once after two drops within an hour, and only after 10 min without a break after the third', () => {
    const player = played();
    for (let count = 0; count < 2; count += 1) {
      drop(player);
      expect(quality(player)).toMatchObject({ quality: 'good', why: null });
    }
    drop(player);
    expect(quality(player)).toMatchObject({ quality: 'bad', why: 'unsteady', value: 5 });
    player.pass(10 * MIN - 31 * S);
    expect(quality(player)?.quality).toBe('bad');
    player.pass(31 * S);
    expect(quality(player)).toMatchObject({ quality: 'good', why: null });
  });

  it('begins its ten minutes anew with every break, a single implausible reading included', () => {
    const player = played();
    for (let count = 0; count < 3; count += 1) drop(player);
    player.pass(8 * MIN);
    player.say({ bench: 200 }).pass(30 * S);
    player.say({ bench: 5 }).pass(9 * MIN);
    expect(quality(player)?.quality).toBe('bad');
    player.pass(2 * MIN);
    expect(quality(player)?.quality).toBe('good');
  });

  it('is no such point where its drops are an hour apart', () => {
    const player = played();
    for (let count = 0; count < 4; count += 1) {
      drop(player);
      expect(quality(player)?.quality).toBe('good');
      player.pass(29 * MIN);
    }
  });

  it('moves the stand-in once, not with each drop, and raises one fault', () => {
    const player = played(true);
    for (let count = 0; count < 12; count += 1) drop(player);
    const kinds = faults(player).filter((kind) => kind.startsWith('point'));
    expect(kinds).toEqual(['point-bad', 'point-bad', 'point-unsteady']);
    expect(player.memory.rules[0]?.using).toBe(1);
    expect(player.faults()).toContain('point-unsteady');
    player.pass(11 * MIN);
    expect(player.faults()).toEqual([]);
    expect(player.memory.rules[0]?.using).toBe(0);
  });

  it('still speaks for frost while it is held down', () => {
    const player = played(false, { frostLimit: 2 });
    player.silent.add('air');
    for (let count = 0; count < 3; count += 1) {
      player.silent.delete('air');
      drop(player);
    }
    player.silent.add('air');
    player.pass(2 * MIN);
    player.say({ bench: 1 }).pass(30 * S);
    expect(quality(player)).toMatchObject({ quality: 'bad', why: 'unsteady' });
    expect(player.memory.frost.on).toBe(true);
  });

  it('is not one where the whole house fell silent with it: then it was the line', () => {
    const player = played();
    for (let count = 0; count < 4; count += 1) {
      player.silent.add('bench').add('air');
      player.pass(2 * MIN);
      expect(quality(player)).toMatchObject({ quality: 'bad', why: 'silent' });
      player.silent.clear();
      player.pass(30 * S);
      expect(quality(player)?.quality).toBe('good');
    }
  });

  it('is not one through gaps of the worker’s own', () => {
    const player = played();
    for (let count = 0; count < 4; count += 1) {
      player.silent.add('bench');
      player.now += 5 * MIN;
      player.observed.workerStartedAt = player.now;
      player.step();
      expect(quality(player)?.why).toBe('worker-was-away');
      player.silent.delete('bench');
      player.pass(60 * S);
      expect(quality(player)).toMatchObject({ quality: 'good', doubtSince: null, lastDoubt: null });
    }
  });

  it('stays what it is over a restart', () => {
    const player = played();
    for (let count = 0; count < 3; count += 1) drop(player);
    player.restart();
    player.pass(5 * MIN);
    expect(quality(player)).toMatchObject({ quality: 'bad', why: 'unsteady' });
    player.restart();
    player.pass(5 * MIN);
    expect(quality(player)?.quality).toBe('good');
  });

  it('where it goes too fast keeps being uncertain', () => {
    const slow = [point('bench', 'bench', { maxRate: 0.01 }), point('air', 'house-air')];
    const player = new Player(house({ points: slow, rules: [rule('fan', body())] }), { bench: 5, air: 5 });
    for (let count = 0; count < 3; count += 1) {
      player.say({ bench: 60 }).pass(30 * S);
      player.say({ bench: 70 }).pass(30 * S);
      expect(quality(player)).toMatchObject({ quality: 'uncertain', why: 'too-fast' });
      player.say({ bench: 5 }).pass(90 * S);
    }
    expect(quality(player)).toMatchObject({ quality: 'uncertain', why: 'unsteady' });
  });
});

describe('What dropped a point, and when it came back', () => {
  it('is kept: since when it is in doubt, then the whole of that time', () => {
    const player = played();
    expect(quality(player)).toMatchObject({ doubtSince: null, lastDoubt: null });
    const spoke = player.now;
    player.silent.add('bench');
    player.pass(5 * MIN);
    const from = spoke + 90 * S + 1;
    expect(quality(player)).toMatchObject({ quality: 'bad', doubtSince: from, lastDoubt: null });
    player.silent.delete('bench');
    player.pass(30 * S);
    expect(quality(player)).toMatchObject({
      doubtSince: null,
      lastDoubt: { why: 'silent', from, to: player.now },
    });
  });
});
