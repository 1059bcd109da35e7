/** Readings that cannot be trusted, by what they do to a fan that is on below 4 and off above 7.5 °C. */
import { describe, expect, it } from 'vitest';
import { body, house, MIN, point, rule, S } from './house';
import { Player } from './player';

const bench = (more = {}) => [point('bench', 'bench', more), point('air', 'house-air')];
const played = (more = {}, ruleMore = {}, value = 5) =>
  new Player(house({ points: bench(more), rules: [rule('fan', body(ruleMore))] }), { bench: value, air: 5 });
const quality = (player: Player, key = 'bench') => player.result.points.find((one) => one.id === key);
const readings = (player: Player, ...values: number[]) => {
  for (const value of values) player.say({ bench: value }).pass(30 * S);
  return quality(player);
};

describe('implausible readings', () => {
  it('one leaves the last good value in force, a second drops the quality, three good ones bring it back', () => {
    const player = played();
    expect(readings(player, 200)).toMatchObject({ value: 5, quality: 'good' });
    expect(readings(player, 200)).toMatchObject({ value: 5, quality: 'bad', why: 'out-of-range' });
    expect(readings(player, 5, 5)).toMatchObject({ quality: 'bad' });
    expect(readings(player, 5)).toMatchObject({ quality: 'good', why: null });
  });

  it.each([85, -127])('%d °C of a one-wire sensor never switches on, even as its first reading', (fault) => {
    const player = played({ sensor: 'one-wire', min: null }, {}, fault);
    expect(quality(player)).toMatchObject({ value: null, quality: 'bad', why: 'one-wire-fault' });
    expect(player.says()).toBe('off fail-safe');
    expect(readings(player, 3)).toMatchObject({ value: 3, quality: 'good' });
    expect(player.says()).toBe('on band');
  });

  it('a sensor’s fault shows in what it sent, whatever the calibration made of it', () => {
    const player = played({ sensor: 'one-wire' });
    player.now += 30 * S;
    player.observed.points = { bench: { value: 84.6, raw: 85, at: player.now } };
    player.silent.add('bench');
    player.step();
    expect(quality(player)?.value).toBe(5);
  });

  it('85 °C of any other sensor is a reading', () => {
    expect(readings(played(), 85)).toMatchObject({ value: 85, quality: 'good' });
  });

  it('a jump faster than the sensor can is uncertain, holds the latch 10 min, and then counts as bad', () => {
    const player = played({ maxRate: 0.01 }, {}, 3);
    expect(player.says()).toBe('on band');
    for (let count = 0; count < 2; count += 1) readings(player, 40 + count * 3);
    expect(quality(player)).toMatchObject({ value: 3, quality: 'uncertain', why: 'too-fast' });
    const since = player.now;
    while (player.now < since + 11 * MIN && player.of().claim === 'band')
      readings(player, 40 + (player.now % 7));
    expect(player.now - since).toBeGreaterThanOrEqual(9.5 * MIN);
    expect(player.says()).toBe('off fail-safe');
  });

  it('a change of exactly the fastest rate is believed', () => {
    expect(readings(played({ maxRate: 0.1 }), 8)).toMatchObject({ value: 8, quality: 'good' });
  });

  it('non-finite values, older times and times over 2 min ahead change nothing', () => {
    const player = played();
    player.pass(30 * S);
    const before = player.memory;
    player.silent.add('bench');
    for (const seen of [
      { value: NaN, at: player.now + 1 },
      { value: 1, at: player.now - 1 },
      { value: 1, at: player.now },
      { value: 1, at: player.now + 120_001 },
    ]) {
      player.observed.points = { ...player.observed.points, bench: seen };
      player.step();
      expect(player.memory.points[0]).toEqual(before.points[0]);
    }
  });
});

describe('a point that stands still', () => {
  it('to the last bit for longer than it can is uncertain, till three different readings', () => {
    const player = played({ frozenAfterS: 600 });
    player.pass(10 * MIN);
    expect(quality(player)?.quality).toBe('good');
    player.pass(30 * S);
    expect(quality(player)).toMatchObject({ quality: 'uncertain', why: 'frozen' });
    expect(readings(player, 5.1, 5.2)?.quality).toBe('uncertain');
    expect(readings(player, 5.3)?.quality).toBe('good');
  });

  it.each(['light', 'contact', 'ground', 'heap-core', 'heap-base'])('may, where it is of %s', (role) => {
    const points = [point('bench', role, { frozenAfterS: 600 })];
    const player = new Player(house({ points }), { bench: 5 });
    player.pass(30 * MIN);
    expect(quality(player)?.quality).toBe('good');
  });
});

describe('silence', () => {
  it('of longer than its time makes a point bad, and its channel safe; the next reading is believed', () => {
    const player = played({}, {}, 3);
    player.silent.add('bench');
    player.pass(90 * S);
    expect(player.says()).toBe('on band');
    player.pass(1 * S);
    expect(player.says()).toBe('off fail-safe');
    expect(player.of().because).toMatchObject({ safe: 'off', points: [{ point: 'bench', why: 'silent' }] });
    player.silent.delete('bench');
    player.at({ bench: 3 });
    expect(player.says()).toBe('on band');
  });

  it('runs a load that is wired NC', () => {
    const config = house({ points: bench(), rules: [rule('fan', body())] });
    const player = new Player(
      { ...config, channels: config.channels.map((one) => ({ ...one, contact: 'NC' as const })) },
      { bench: 9 },
    );
    expect([player.of().state, player.of().coil]).toEqual(['off', 'on']);
    player.silent.add('bench').add('air');
    player.pass(2 * MIN);
    expect([player.says(), player.of().coil]).toEqual(['on fail-safe', 'off']);
  });

  it('that late readings fill never was', () => {
    const player = played({}, {}, 3);
    player.silent.add('bench');
    const from = player.now;
    player.now = from + 300 * S;
    player.observed.points = {
      ...player.observed.points,
      bench: { value: 3, at: player.now, between: [60, 120, 180, 240].map((s) => from + s * S) },
    };
    player.step();
    expect(player.events.filter((one) => one.kind === 'switching')).toHaveLength(1);
    expect(player.says()).toBe('on band');
  });

  it('of the worker is not the point’s: at most uncertain from its start, then bad', () => {
    const player = played({}, {}, 3);
    player.silent.add('bench');
    player.now += 600 * S;
    player.observed.workerStartedAt = player.now;
    player.step();
    expect(quality(player)).toMatchObject({ quality: 'uncertain', why: 'worker-was-away' });
    player.pass(91 * S, 91 * S);
    expect(quality(player)).toMatchObject({ quality: 'bad', why: 'silent' });
  });
});

describe('stand-ins', () => {
  it('take over with their offset, and the rule’s own point comes back after three good readings', () => {
    const player = played({}, { standIns: [{ point: 'air', offset: -0.5 }] }, 9);
    player.silent.add('bench');
    player.say({ air: 4.4 }).pass(2 * MIN);
    expect(player.says()).toBe('on band');
    expect(player.of().because).toMatchObject({
      point: 'air',
      standInFor: 'bench',
      value: expect.closeTo(3.9, 9),
    });
    player.silent.delete('bench');
    player.pass(60 * S);
    expect(player.says()).toBe('on band');
    player.pass(30 * S);
    expect(player.says()).toBe('off idle');
  });
});
