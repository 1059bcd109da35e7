/** Changes in mid-draw, and a memory that outlives them. On paper. */
import { describe, expect, it } from 'vitest';
import { compile } from '@/lib/control/compile';
import { MEMORY_VERSION } from '@/lib/control/memory';
import { migrateMemory } from '@/lib/control/memory-versions';
import { step } from '@/lib/control/step';
import type { HouseConfig } from '@/lib/control/types';
import { body, channel, house, MIN, point, rest, rule, S, source, START } from './house';
import { Player } from './player';

const cold = { bench: 3, air: 10, core: 50, base: 40 };
const config = (more: Partial<HouseConfig> = {}, own = rest(600, 1200)) =>
  house({
    sources: [source('heap')],
    channels: [channel('fan', 1, { source: 'heap', minOnS: 60, minOffS: 120 }), channel('lamp', 2)],
    rules: [rule('fan', body({ rest: own }))],
    ...more,
  });
describe('a change in mid-draw', () => {
  it('of the longest draw counts from its step on', () => {
    const player = new Player(config(), cold);
    player.pass(300 * S);
    player.replan(config({}, rest(300, 1200)));
    player.pass(10 * MIN);
    // half is left, and carries half of 300 s
    expect(player.switchings().slice(0, 2)).toEqual([
      [0, 'on', 'band'],
      [450, 'off', 'rest'],
    ]);
  });

  it('of the least rest moves the end of a rest that is on', () => {
    const player = new Player(config(), cold);
    player.pass(700 * S);
    player.replan(config({}, rest(600, 300)));
    player.until(START + 899.999 * S);
    expect(player.says()).toBe('off rest');
    player.until(START + 900 * S);
    expect(player.says()).toBe('on band');
  });

  it('that takes the rule away leaves the channel idle, once its least on has passed', () => {
    const player = new Player(config(), cold);
    player.pass(30 * S);
    player.replan(config({ rules: [] }));
    expect(player.says()).toBe('on short-cycle');
    player.pass(MIN);
    expect(player.switchings().at(-1)).toEqual([60, 'off', 'idle']);
  });

  it('that takes away a high limit that is passed, or a proof that denies the fan, leaves nothing of it', () => {
    const points = [...house().points, point('amps', 'current')];
    const limited = { highLimit: { point: 'air', above: 20 }, runProof: { point: 'amps', above: 0.2 } };
    const fan = (more: object) => [channel('fan', 1, { source: 'heap', ...more })];
    const over = new Player(config({ points, channels: fan(limited) }), { ...cold, air: 21, amps: 0 });
    expect(over.says()).toBe('off limit');
    over.replan(config({ points, channels: fan({}) }));
    expect(over.says()).toBe('on band');
    const standing = new Player(config({ points, channels: fan(limited) }), { ...cold, amps: 0 });
    standing.pass(MIN);
    expect(standing.faults()).toContain('fan-standing');
    standing.replan(config({ points, channels: fan({}) }));
    expect(standing.faults()).not.toContain('fan-standing');
    expect(standing.heap().drawing).toBe(true);
  });

  it('that takes the longest run away lets its end pass as it was given', () => {
    const fan = (longestOnS: number | null) => [
      channel('fan', 1, { source: 'heap', minOffS: 120, longestOnS }),
    ];
    const player = new Player(config({ channels: fan(300) }), cold);
    player.until(START + 310 * S);
    player.replan(config({ channels: fan(null) }));
    player.until(START + 500 * S);
    expect(player.says()).toBe('off limit');
    player.at({ bench: 8 }).at({ bench: 3 });
    expect(player.says()).toBe('on band');
  });

  it('of the frost limit acts at once', () => {
    const helped = [channel('fan', 1, { source: 'heap', frostHelp: true })];
    const player = new Player(config({ channels: helped }), { ...cold, bench: 5, air: 5 });
    expect(player.says()).toBe('off idle');
    player.plan = compile({ ...config({ channels: helped }), house: { ...house().house, frostLimit: 6 } });
    player.step();
    expect(player.says()).toBe('on frost');
  });

  it('that takes the frost limit away ends a frost that holds blind, too', () => {
    const helped = [channel('fan', 1, { source: 'heap', frostHelp: true })];
    const limits = (frostLimit: number | null) =>
      compile({
        ...config({ channels: helped }),
        house: { ...house().house, frostLimit, frostAlarm: 1 },
      });
    const player = new Player(config({ channels: helped }), { ...cold, bench: 5, air: 5 });
    player.plan = limits(6);
    player.step();
    for (const one of ['bench', 'air']) player.silent.add(one);
    player.pass(5 * MIN, MIN);
    expect(player.says()).toBe('on frost');
    player.plan = limits(null);
    player.step();
    expect(player.says()).not.toBe('on frost');
    expect(player.memory.frost).toMatchObject({ on: false, blindSince: null });
  });
});

describe('what is kept with its id', () => {
  it('a channel that is gone and comes back has its least off still to pass, but no hand', () => {
    const player = new Player(config(), cold);
    player.pass(100 * S);
    player.order({ kind: 'hand', channel: 'fan', state: 'off', seconds: 3600, holdInFrost: false });
    const without = config({ channels: [channel('lamp', 2)], rules: [] });
    player.replan(without);
    expect(player.result.channels.map((one) => one.id)).toEqual(['lamp']);
    player.until(START + 160 * S);
    player.replan(config());
    expect(player.says()).toBe('off short-cycle');
    player.until(START + 220 * S);
    expect(player.says()).toBe('on band');
  });

  it('a channel that is gone while it runs goes off there, and has its least off to pass', () => {
    const player = new Player(config(), cold);
    player.pass(100 * S);
    expect(player.says()).toBe('on band');
    player.replan(config({ channels: [channel('lamp', 2)], rules: [] }));
    // 100 of 600 s are drawn, and without a rule there is no rest that would bring them back
    player.until(START + 160 * S);
    expect(player.heap()).toMatchObject({ drawing: false, drawnTodayS: 100 });
    expect(player.heap().credit).toBeCloseTo(1 - 100 / 600, 6);
    player.replan(config());
    expect(player.says()).toBe('off short-cycle');
    player.until(START + 219.999 * S);
    expect(player.says()).toBe('off short-cycle');
    player.until(START + 220 * S);
    expect(player.says()).toBe('on band');
    expect(player.switchings().at(-1)).toEqual([220, 'on', 'band']);
  });

  it('a source that is gone while it is drawn on, as it was left', () => {
    const player = new Player(config(), cold);
    player.pass(300 * S);
    const free = [channel('fan', 1), channel('lamp', 2)];
    player.replan(config({ sources: [], channels: free, rules: [rule('fan', body())] }));
    player.pass(5000 * S, MIN);
    player.replan(config());
    expect(player.heap()).toMatchObject({ drawing: true, drawnTodayS: 300 });
    expect(player.heap().credit).toBeCloseTo(0.5, 6);
  });

  it('a latch, through a new version of its rule', () => {
    const player = new Player(config(), { ...cold, bench: 3 });
    player.at({ bench: 5 });
    const [own] = config().rules;
    if (own === undefined) throw new Error('The house has a rule.');
    player.replan(config({ rules: [{ ...own, versionId: 'second', version: 2 }] }));
    expect(player.says()).toBe('on band');
  });

  it('channels in another order keep what is theirs', () => {
    const player = new Player(config(), cold);
    player.order({ kind: 'hand', channel: 'lamp', state: 'on', seconds: 600, holdInFrost: false });
    player.replan({ ...config(), channels: config().channels.toReversed() });
    expect([player.says('fan'), player.says('lamp')]).toEqual(['on band', 'on hand']);
  });
});

it('a clock that goes back stands still for control, and nothing is forgotten', () => {
  const player = new Player(config(), cold);
  player.pass(300 * S);
  const before = player.memory;
  const back = step(player.plan, before, player.observed, player.now - 3600 * S);
  expect(back.events).toEqual([]);
  expect(back.memory).toEqual(before);
});

describe('a memory from storage', () => {
  it('that is none starts empty: least off passed, the credit whole, the heap not ready', () => {
    for (const none of [null, undefined]) {
      const heap = source('heap', { ready: { level: 50, forS: 3600 } });
      const player = new Player(config({ sources: [heap] }), cold, migrateMemory(none));
      expect(player.says()).toBe('off source-guard');
      expect(player.heap()).toMatchObject({ credit: 1, ready: false });
    }
  });

  it('of a later version, or that is something else, is refused and not forgotten', () => {
    expect(() => migrateMemory({ version: MEMORY_VERSION + 1 })).toThrow('unknown here');
    expect(() => migrateMemory({ points: [] })).toThrow('not a memory');
    expect(() => migrateMemory('memory')).toThrow('not a memory');
  });

  it('that lacks what is newer gets it empty', () => {
    const player = new Player(config(), cold);
    const { faults: _, frost: __, ...older } = player.memory;
    expect(migrateMemory(older)).toMatchObject({ faults: [], frost: { on: false, since: null } });
  });
});
