/**
 * When the core asks to be awake for a rest: `wakeAt` is the earliest time at which something changes without a new
 * reading, and nothing here steps at any other. On paper: draws cost 1/600 a second and fan, unless said otherwise.
 */
import { describe, expect, it } from 'vitest';
import type { State } from '@/lib/control/types';
import { body, channel, house, rest, rule, source } from './house';
import { Sleeper } from './wakes';

const warm = { bench: 9, air: 9, core: 50, base: 40 };
const DAY_S = 86_400;
const fan = (key: string, number: number, more = {}) => channel(key, number, { source: 'heap', ...more });
const two = (restBody = rest(600, 1200), first = {}, second = {}, dailyLimitS: number | null = null) =>
  house({
    sources: [source('heap', { dailyLimitS })],
    channels: [fan('fan', 1, first), fan('second', 2, second)],
    rules: [rule('fan', body({ rest: restBody })), rule('second', body({ point: 'air', rest: restBody }))],
  });
const byHand = (player: Sleeper, channel_: string, state: State, seconds: number) =>
  player.order({ kind: 'hand', channel: channel_, state, seconds, holdInFrost: false });

describe('a start that the credit is not worth', () => {
  // 1/3 is left at 400 s, and 60 s bring 1/20: the half that 300 s cost is there at 600 s
  it('is waited for to the instant at which it is', () => {
    const player = new Sleeper(two(undefined, { minOnS: 300 }), { ...warm, bench: 3 });
    player.hears(400, { bench: 8 }).hears(460, { bench: 3 });
    expect([player.says(), player.wakesAtS]).toEqual(['off rest', 600]);
    player.sleepTill(900);
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [400, 'off', 'idle'],
      [600, 'on', 'band'],
      [900, 'off', 'rest'],
    ]);
  });

  // while another draws nothing comes back: there is nothing to wait for but the end of the credit
  it('is not waited for while another draws', () => {
    const player = new Sleeper(two(undefined, {}, { minOnS: 200 }), { ...warm, bench: 3 });
    player.hears(240, { air: 3 });
    expect([player.says('second'), player.wakesAtS]).toEqual(['off rest', 600]);
  });

  // a fan without a rest draws as well, and 200 s more of the other cost nothing to it
  it('does not concern a channel that has no rest, however little is left', () => {
    const config = two(undefined, {}, { minOnS: 300 });
    config.rules = [rule('fan', body({ rest: rest(600, 1200) })), rule('second', body({ point: 'air' }))];
    const player = new Sleeper(config, { ...warm, bench: 3 });
    player.hears(500, { air: 3 });
    expect(player.says('second')).toBe('on band');
  });
});

describe('a start that is held up by least off while another draws', () => {
  const held = (restBody = rest(600, 1200), dailyLimitS: number | null = null) => {
    const config = two(restBody, {}, { minOnS: 200, minOffS: 1000 }, dailyLimitS);
    const player = new Sleeper(config, { ...warm, bench: 3 });
    byHand(player, 'second', 'on', 100);
    // a hand off breaks the least on that the other began
    byHand(player.sleepTill(10), 'second', 'off', 1);
    return player.hears(20, { air: 3 });
  };
  const told = (player: Sleeper) => player.decisions('second').filter(([at]) => at > 11);

  // two draw for 10 s, then one: 1 − (t + 10)/600 carries both for 200 s to 190 s
  it('is not worth it any more in the first ms in which the credit does not carry both', () => {
    const player = held();
    expect([player.says('second'), player.wakesAtS]).toEqual(['off short-cycle', 190.001]);
    expect(player.sleepTill(300).says('second')).toBe('off rest');
    expect(told(player)).toEqual([
      [20, 'off', 'short-cycle'],
      [190.001, 'off', 'rest'],
    ]);
  });

  // two for 10 s, then one: t + 10 of the day's 1,200 s are used, and both take 400 s more to 790 s
  it('nor in the first ms in which the day does not carry both', () => {
    const player = held(rest(DAY_S, 1200), 1200);
    expect([player.says('second'), player.wakesAtS]).toEqual(['off short-cycle', 790.001]);
    player.sleepTill(900);
    expect(told(player)).toEqual([
      [20, 'off', 'short-cycle'],
      [790.001, 'off', 'rest'],
    ]);
  });
});

describe('a day that is used up', () => {
  const long = rest(DAY_S, 60);

  // 500 s of 600 were drawn from 0 s on, and begin to leave the 24 h a day later: 20 s must have left for 120
  it('is waited for to the instant at which it carries a least on again', () => {
    const player = new Sleeper(two(long, { minOnS: 120 }, {}, 600), { ...warm, bench: 3 });
    player.hears(500, { bench: 8 }).hears(3600, { bench: 3 });
    expect([player.says(), player.wakesAtS]).toEqual(['off rest', DAY_S]);
    player.sleepTill(DAY_S);
    expect([player.says(), player.wakesAtS]).toEqual(['off rest', DAY_S + 20]);
    player.sleepTill(DAY_S + 100);
    expect(player.switchings().slice(2)).toEqual([[DAY_S + 20, 'on', 'band']]);
  });

  // two drew 500 s each and leave two at a time: 20 channel-seconds in 10 s
  it('comes back twice as fast where two fans had drawn', () => {
    const config = two(long, { minOnS: 120 }, {}, 1100);
    const player = new Sleeper(config, { ...warm, bench: 3, air: 3 });
    player.hears(500, { bench: 8, air: 8 }).hears(3600, { bench: 3 }).sleepTill(DAY_S);
    expect([player.says(), player.wakesAtS]).toEqual(['off rest', DAY_S + 10]);
    player.sleepTill(DAY_S + 100);
    expect(player.switchings().slice(2)).toEqual([[DAY_S + 10, 'on', 'band']]);
  });

  // two drew 500 s each; by hand one draws on from 100 s before they begin to leave: 1,100 of 1,200 are used then, and
  // with one drawing while two leave it is one a second less. Two for 120 s want 240, so no more than 960 used
  it('comes back the slower while another draws, and must carry that one too', () => {
    const config = two(long, {}, { minOnS: 120 }, 1200);
    const player = new Sleeper(config, { ...warm, bench: 3, air: 3 });
    player.hears(500, { bench: 8, air: 8 }).sleepTill(DAY_S - 100);
    byHand(player, 'fan', 'on', 300);
    player.hears(DAY_S - 50, { air: 3 });
    expect([player.says('second'), player.wakesAtS]).toEqual(['off rest', DAY_S]);
    player.sleepTill(DAY_S);
    expect([player.says('second'), player.wakesAtS]).toEqual(['off rest', DAY_S + 140]);
    player.sleepTill(DAY_S + 150);
    expect(player.switchings('second').slice(2)).toEqual([[DAY_S + 140, 'on', 'band']]);
  });

  it('is worth a start that it carries to its very end', () => {
    const player = new Sleeper(two(long, { minOnS: 600 }, {}, 600), { ...warm, bench: 3 });
    expect(player.says()).toBe('on band');
    player.sleepTill(700);
    expect(player.switchings()).toEqual([
      [0, 'on', 'band'],
      [600, 'off', 'rest'],
    ]);
  });
});
