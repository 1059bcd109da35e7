/** What a rest says of itself where it is not the plain case: several levels, none, one that nobody can tell. On paper. */
import { describe, expect, it } from 'vitest';
import type { HouseConfig } from '@/lib/control/types';
import { body, channel, house, rest, rule, S, source, START } from './house';
import { Player } from './player';
import { hand, holds, silent } from './table';
import { Sleeper } from './wakes';

const at = (seconds: number) => START + seconds * S;
const cold = { bench: 3, air: 10, core: 50, base: 40 };
const fan = (more = {}) => channel('fan', 1, { source: 'heap', ...more });
const one = (restMore = {}, more: Partial<HouseConfig> & { frostLimit?: number } = {}, fanMore = {}) =>
  house({
    sources: [source('heap')],
    channels: [fan(fanMore)],
    rules: [rule('fan', body({ rest: { ...rest(600, 1200), ...restMore } }))],
    ...more,
  });
const times = ({ restSince, restUntil, restAtMostUntil, until }: Record<string, unknown>) => ({
  ...{ restSince, restUntil, restAtMostUntil, until },
});

describe('the times of a rest', () => {
  it('without a level: its least, and no latest end', () => {
    const player = new Player(one(), cold).pass(700 * S);
    const { because } = player.of();
    expect(because).toStrictEqual({
      ...{ cause: 'credit-spent', source: 'heap', credit: 0 },
      ...{ restSince: at(600), restUntil: at(1800), restAtMostUntil: null, until: at(1800) },
    });
    expect(player.heap()).toMatchObject({ restSince: at(600), restUntil: at(1800), restAtMostUntil: null });
  });

  it('while something draws in it: none, since it starts anew', () => {
    const config = one({ until: { point: 'base', level: 43 }, most: 5400 });
    config.channels.push(channel('second', 2, { source: 'heap' }));
    const player = new Player(config, cold).pass(700 * S);
    player.order({ kind: 'hand', channel: 'second', state: 'on', seconds: 100, holdInFrost: false });
    const none = { restSince: null, restUntil: null, restAtMostUntil: null };
    expect(player.says()).toBe('off rest');
    expect(times(player.of().because)).toEqual({ ...none, until: null });
    expect(player.of().because).toMatchObject({ recovery: { point: 'base', value: 40, level: 43 } });
    expect(player.heap()).toMatchObject(none);
    player.pass(110 * S);
    expect(times(player.of().because)).toEqual({
      ...{ restSince: at(800), restUntil: at(2000), restAtMostUntil: at(6200), until: at(2000) },
    });
  });

  it('with a level that a good reading has not reached: its longest time, from the end of its least on', () => {
    const player = new Sleeper(one({ until: { point: 'base', level: 43 }, most: 5400 }), cold);
    player.sleepTill(1799.999);
    expect(player.of().until).toBe(at(1800));
    player.sleepTill(1800);
    expect(player.of().until).toBe(at(6000));
  });

  it('with a level of which nobody knows: its longest time, from the first', () => {
    const named = new Player(one({ until: { point: 'nowhere', level: 43 }, most: 5400 }), cold).pass(700 * S);
    const told = { restSince: at(600), restUntil: at(6000), restAtMostUntil: at(6000), until: at(6000) };
    expect(times(named.of().because)).toEqual(told);
    expect(named.of().because['recovery']).toEqual({ point: 'nowhere', value: null, level: 43, good: false });

    const dumb = new Player(one({ until: { point: 'base', level: 43 }, most: 5400 }), cold);
    dumb.silent.add('base');
    dumb.pass(700 * S);
    expect(times(dumb.of().because)).toEqual(told);
    expect(dumb.of().because['recovery']).toEqual({ point: 'base', value: 40, level: 43, good: false });
  });

  // 5,400 s of the one and 4,000 s of the other: neither keeps the rest beyond its own
  it('with two levels: each is told, and one that nobody knows leaves only the longest time known', () => {
    const wait = (point: string, most: number) => rest(600, 1200, { until: { point, level: 43 }, most });
    const config = one();
    config.rules = [
      rule('fan', body({ rest: wait('base', 5400) }), 'first'),
      rule('fan', body({ rest: wait('core', 4000) }), 'other'),
    ];
    const player = new Player(config, cold).pass(700 * S);
    const base = { point: 'base', value: 40, level: 43, good: true };
    const core = { point: 'core', value: 50, level: 43, good: true };
    expect(player.of().because).toMatchObject({
      ...{ restUntil: at(1800), restAtMostUntil: at(6000), recovery: base, recoveries: [core] },
    });
    // the core has its level; it is the base that is waited for
    player.until(at(1900));
    expect(player.of().because).toMatchObject({ restUntil: at(6000), until: at(6000) });

    const dumb = new Player(config, cold);
    dumb.silent.add('core');
    dumb.pass(700 * S);
    expect(dumb.of().because).toMatchObject({
      ...{ restUntil: at(6000), recovery: base, recoveries: [{ ...core, good: false }] },
    });
  });
});

describe('frost is told to break a rest', () => {
  const told = (config: HouseConfig) => new Player(config, cold).pass(700 * S).of().because;
  it('where the channel is marked to help, its rule allows it and the house has a limit, and nowhere else', () => {
    const helps = { frostHelp: true };
    expect(told(one({}, { frostLimit: 2 }, helps))).toMatchObject({ frostBreaksBelow: 2 });
    const not = [
      one({}, { frostLimit: 2 }),
      one({ frostMayBreak: false }, { frostLimit: 2 }, helps),
      one({}, {}, helps),
    ];
    for (const config of not) expect(told(config)).not.toHaveProperty('frostBreaksBelow');
  });
});

it('a start that is not worth it by the credit alone names no limit of the day', () => {
  const player = new Player(one({}, {}, { minOnS: 300 }), cold);
  player
    .pass(400 * S)
    .at({ bench: 8 })
    .at({ bench: 3 });
  expect(player.of().because).toMatchObject({ cause: 'not-worth-a-start', limitS: null, leastOnS: 300 });
  expect(player.of().because['worthS']).toBeCloseTo(200, 1);
});

describe('frost that may not break a rest', () => {
  // nobody's band wants it: the core is warm. A third of the credit is left at 400 s; 300 s of least on want half: 600 s
  const config = (loadKind: 'heater' | 'motor', fanMore = {}) =>
    one(
      {},
      {
        frostLimit: 3,
        rules: [rule('fan', body({ point: 'core', rest: rest(600, 1200, { frostMayBreak: false }) }))],
      },
      { minOnS: 300, frostHelp: true, loadKind, ...fanMore },
    );
  const drawn = (player: Player) =>
    player.order({ kind: 'hand', channel: 'fan', state: 'on', seconds: 400, holdInFrost: false });
  const reads = { bench: 2, air: 2, core: 50, base: 40 };

  // the last reading, of 410 s, counts till 500 s
  holds('waits for what a start costs, also while nobody knows how cold it is', {
    config: config('motor'),
    reads: { ...reads, bench: 9, air: 9 },
    rows: [
      [0, hand('on', 400), 'on hand'],
      [401, { air: 2 }, 'off rest'],
      [410, silent('bench', 'air'), 'off rest'],
      [501, null, 'off rest'],
      [599.999, null, 'off rest'],
      [600, null, 'on frost'],
    ],
  });

  it('asks nothing for a heater while nobody knows how cold it is', () => {
    const player = new Player(config('heater'), { ...reads, bench: 9, air: 9 });
    drawn(player);
    player.pass(401 * S).at({ air: 2 });
    expect(player.says()).toBe('off rest');
    player.silent.add('bench').add('air');
    player.pass(100 * S);
    expect(player.says()).toBe('off idle');
  });

  it('asks nothing for a channel that is not marked to help', () => {
    const player = new Player(config('motor', { frostHelp: false }), reads);
    drawn(player);
    player.pass(410 * S);
    expect(player.says()).toBe('off idle');
  });
});
