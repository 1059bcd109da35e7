/** Draw credit and rest to the second, as tables of times. */
import { describe, expect, it } from 'vitest';
import { body, channel, H, house, MIN, point, rest, rule, S, source } from './house';
import { Player } from './player';

const cold = { bench: 3, air: 10, core: 50, base: 40 };
const fan = (key: string, number: number, more = {}) => channel(key, number, { source: 'heap', ...more });
const one = (restBody: object, more = {}, heap = {}) =>
  house({
    sources: [source('heap', heap)],
    channels: [fan('fan', 1, more)],
    rules: [rule('fan', body({ rest: { ...rest(600, 1200), ...restBody } }))],
  });

describe('draw credit', () => {
  it('ends a draw after the longest draw, even if it gets colder, and rests for the least', () => {
    const player = new Player(one({}), cold);
    player.until(player.now + 5 * MIN).at({ bench: -5 });
    player.until(player.now + H);
    expect(player.switchings().slice(0, 4)).toEqual([
      [0, 'on', 'band'],
      [600, 'off', 'rest'],
      [1800, 'on', 'band'],
      [2400, 'off', 'rest'],
    ]);
  });

  it('a pause of a second does not renew it', () => {
    const player = new Player(one({}), cold);
    player.pass(300 * S);
    player.order({ kind: 'hand', channel: 'fan', state: 'off', seconds: 1, holdInFrost: true });
    player.pass(10 * MIN);
    // 300 s used, then a second's refill of 1/1200: 300.5 s are left
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [300, 'off', 'hand'],
      [301, 'on', 'band'],
      [601.5, 'off', 'rest'],
    ]);
  });

  it('rises by 1/least a second while nothing draws', () => {
    const player = new Player(one({}), cold);
    player.pass(300 * S).at({ bench: 8 });
    expect(player.heap().credit).toBeCloseTo(0.5, 5);
    player.pass(300 * S);
    expect(player.heap().credit).toBeCloseTo(0.75, 5);
    player.pass(H);
    expect(player.heap().credit).toBe(1);
  });

  it('a fan that shows no current counts as not drawing, and a fault says so', () => {
    const config = one({}, { runProof: { point: 'amps', above: 0.2 } });
    const points = [...config.points, point('amps', 'current', { unit: 'A' })];
    const player = new Player({ ...config, points }, { ...cold, amps: 0 });
    player.pass(H);
    expect(player.says()).toBe('on band');
    expect(player.faults()).toContain('fan-standing');
    expect(player.heap().credit).toBe(1);
    player.at({ amps: 0.5 });
    expect(player.faults()).not.toContain('fan-standing');
    player.pass(301 * S);
    expect(player.heap().credit).toBeLessThan(0.5);
  });
});

describe('rest', () => {
  it('starts anew with a draw within it, and the credit stays at 0', () => {
    const player = new Player(one({}), cold);
    player.pass(700 * S);
    expect(player.says()).toBe('off rest');
    player.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 100, holdInFrost: false });
    expect(player.heap().credit).toBe(0);
    player.pass(H);
    expect(player.switchings().slice(0, 5)).toEqual([
      [0, 'on', 'band'],
      [600, 'off', 'rest'],
      [700, 'on', 'hand'],
      [800, 'off', 'rest'],
      [2000, 'on', 'band'],
    ]);
  });

  it('waits past its least for the level, and ends at the reading that reaches it', () => {
    const player = new Player(one({ until: { point: 'base', level: 43 }, most: 5400 }), cold);
    player.pass(1900 * S);
    expect(player.of().because).toMatchObject({
      cause: 'credit-spent',
      credit: 0,
      recovery: { point: 'base', value: 40, level: 43, good: true },
    });
    player
      .until(player.now + 100 * S)
      .say({ base: 43 })
      .pass(30 * S);
    expect(player.switchings()[2]).toEqual([2030, 'on', 'band']);
  });

  it('runs to its longest time where the level is not reached, or its point is not good', () => {
    for (const silent of [false, true]) {
      const player = new Player(one({ until: { point: 'base', level: 43 }, most: 5400 }), cold);
      if (silent) player.silent.add('base');
      player.pass(2 * H);
      expect(player.switchings()[2]).toEqual([6000, 'on', 'band']);
      expect(player.faults()).toContain('rest-ran-to-most');
    }
  });

  it('survives being written out and read back at any step', () => {
    const play = (restarts: boolean) => {
      const player = new Player(one({ until: { point: 'base', level: 43 }, most: 3000 }), cold);
      for (let step = 0; step < 200; step += 1) {
        if (restarts) player.restart();
        player.pass(30 * S);
      }
      return player.switchings();
    };
    expect(play(true)).toEqual(play(false));
  });

  it('goes on through a gap of the worker, the load counting as on till its lease can last have ended', () => {
    const player = new Player(one({}), cold);
    player.pass(580 * S);
    player.observed.relays = {
      fan: { reported: null, reportedAt: null, acknowledges: false, leaseEndsAt: player.now + 40 * S },
    };
    player.now += 600 * S;
    player.observed.workerStartedAt = player.now - S;
    player.step();
    // spent at 600 s, dropped at 620 s: the rest counts from there
    expect(player.says()).toBe('off rest');
    expect(player.heap().restSince).toBe(player.now - 560 * S);
  });
});

describe('no start', () => {
  it('unless the credit is worth the least on time', () => {
    const player = new Player(one({}, { minOnS: 300 }), cold);
    player
      .pass(400 * S)
      .at({ bench: 8 })
      .pass(MIN);
    player.at({ bench: 3 });
    expect(player.says()).toBe('off rest');
    // 200 s are left and 60 s brought 30: 300 s are worth it once 70 more have come, 140 s later
    player.pass(200 * S);
    expect(player.switchings().at(-1)?.[0]).toBeCloseTo(600, 0);
  });

  it('unless what is left of the day is worth it', () => {
    const player = new Player(one({ longestDraw: 86_400 }, { minOnS: 120 }, { dailyLimitS: 600 }), cold);
    player
      .pass(500 * S)
      .at({ bench: 8 })
      .pass(MIN);
    player.at({ bench: 3 });
    expect(player.of().because).toMatchObject({ cause: 'not-worth-a-start', worthS: expect.closeTo(100, 0) });
  });

  it('and a longest draw of exactly the least on time is worth it', () => {
    const player = new Player(one({ longestDraw: 600 }, { minOnS: 600 }), cold);
    expect(player.says()).toBe('on band');
  });
});

describe('the rolling day', () => {
  it('forbids draws at its limit and allows them as its hours pass', () => {
    const player = new Player(one({ longestDraw: 86_400 }, {}, { dailyLimitS: 3600 }), cold);
    player.pass(25.5 * H, 5 * MIN);
    expect(player.switchings().slice(0, 2)).toEqual([
      [0, 'on', 'band'],
      [3600, 'off', 'rest'],
    ]);
    // from 24 h on the first hour leaves the window, second by second: the fan may have what leaves
    expect(player.switchings()[2]?.[0]).toBeCloseTo(86_400, 0);
    expect(player.heap().drawnTodayS).toBeLessThanOrEqual(3600);
  });
});

describe('least gain', () => {
  const gain = { kelvin: 3, after: 900, intake: 'in', return: 'out' };
  const config = () => {
    const base = one({ longestDraw: 7200, leastGain: gain });
    return { ...base, points: [...base.points, point('in', 'loop-intake'), point('out', 'loop-return')] };
  };

  it('ends a draw that brings too little for 2 min after the wait, as no gain, with a rest', () => {
    const player = new Player(config(), { ...cold, in: 5, out: 7.9 });
    player.pass(30 * MIN);
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [1020, 'off', 'rest'],
    ]);
    expect(player.heap().credit).toBe(0);
    expect(player.faults()).toContain('no-gain');
  });

  it('half an hour of warming up is no “no gain” where the wait is as long', () => {
    const base = config();
    const [first] = base.rules;
    if (first?.body.rest === undefined) throw new Error('The rule has a rest.');
    first.body.rest = { ...first.body.rest, leastGain: { ...gain, after: 1800 } };
    const player = new Player(base, { ...cold, in: 5, out: 5 });
    player
      .pass(29 * MIN)
      .say({ out: 10.5 })
      .pass(H);
    expect(player.switchings()).toEqual([[0, 'on', 'band']]);
  });

  it('says nothing while a reading is not good', () => {
    const player = new Player(config(), { ...cold, in: 5, out: 5 });
    player.silent.add('out');
    player.pass(H);
    expect(player.switchings()).toEqual([[0, 'on', 'band']]);
  });
});
