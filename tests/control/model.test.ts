/** Random houses, readings, orders, times and restarts against what must hold whatever happens. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { migrateMemory, type Memory } from '@/lib/control/memory';
import { step } from '@/lib/control/step';
import type { StepResult } from '@/lib/control/step-result';
import type { ControlEvent, HouseConfig } from '@/lib/control/types';
import { body, channel, house, Player, point, rest, rule, S, source } from './house';

const seconds = (...list: number[]) => fc.constantFrom(...list);

const houses: fc.Arbitrary<HouseConfig> = fc
  .record({
    minOnS: seconds(0, 60, 120, 300),
    minOffS: seconds(0, 60, 180),
    longestDraw: seconds(120, 600, 2400),
    least: seconds(60, 600, 1800),
    most: fc.option(seconds(1800, 5400)),
    frostMayBreak: fc.boolean(),
    dailyLimitS: fc.option(seconds(900, 3600)),
    coreFloor: fc.option(fc.constant(38)),
    longestOnS: fc.option(seconds(300, 1200)),
    frostLimit: fc.option(fc.constant(3)),
    delayS: seconds(0, 5, 60),
    needs: fc.boolean(),
    frozenAfterS: fc.option(seconds(300)),
    maxRate: fc.option(fc.constant(0.05)),
    second: fc.boolean(),
  })
  .map((given) => {
    const { minOnS, minOffS, longestDraw, least, most, frostMayBreak } = given;
    const until = most === null ? {} : { until: { point: 'base', level: 43 }, most: Math.max(most, least) };
    const draws = { source: 'heap', minOnS, minOffS, frostHelp: true, longestOnS: given.longestOnS };
    const cool = body({ purpose: 'cool', point: 'air', band: [{ from: '00:00', low: 6, high: 10 }] });
    const heapRest = rest(longestDraw, least, { ...until, frostMayBreak });
    return house({
      frostLimit: given.frostLimit,
      points: [
        point('bench', 'bench', { frozenAfterS: given.frozenAfterS, maxRate: given.maxRate }),
        point('air', 'house-air', { staleAfterS: 400 }),
        point('core', 'heap-core', { staleAfterS: 3600 }),
        point('base', 'heap-base', { staleAfterS: 3600 }),
      ],
      sources: [source('heap', { dailyLimitS: given.dailyLimitS, coreFloor: given.coreFloor })],
      channels: [
        channel('fan', 1, { ...draws, highLimit: { point: 'air', above: 12 } }),
        channel('second', 2, draws),
        channel('vent', 3, { loadKind: 'vent', minOnS, minOffS }),
        channel('pump', 4, { minOnS }),
      ],
      interlocks: [
        {
          id: 'never',
          channel: 'vent',
          kind: 'never-with',
          other: 'fan',
          delayS: given.delayS,
          frostMayBreak: false,
        },
        ...(given.needs
          ? [
              {
                id: 'needs',
                channel: 'second',
                kind: 'needs' as const,
                other: 'pump',
                delayS: given.delayS,
                frostMayBreak: false,
              },
            ]
          : []),
      ],
      rules: [
        rule('fan', body({ rest: heapRest, standIns: [{ point: 'air', offset: -0.5 }] })),
        ...(given.second
          ? [rule('second', body({ point: 'air', rest: rest(longestDraw * 2, least, { frostMayBreak }) }))]
          : []),
        rule('vent', cool),
        rule('pump', body({ point: 'air' })),
      ],
    });
  });

const KEYS = ['fan', 'second', 'vent', 'pump'];
const key = fc.constantFrom(...KEYS);
type Deed =
  | { do: 'pass'; s: number; cut: number }
  | { do: 'say'; point: string; value: number }
  | { do: 'order'; order: Parameters<Player['order']>[0] }
  | { do: 'restart' | 'double' };
const deeds: fc.Arbitrary<Deed> = fc.oneof(
  {
    weight: 5,
    arbitrary: fc.record({
      do: fc.constant('pass' as const),
      s: seconds(1, 7, 30, 60, 61, 300, 1300),
      cut: fc.double({ min: 0.05, max: 0.95, noNaN: true }),
    }),
  },
  {
    weight: 5,
    arbitrary: fc.record({
      do: fc.constant('say' as const),
      point: fc.constantFrom('bench', 'air', 'core', 'base'),
      value: seconds(1, 2.9, 3.5, 4, 5, 7.5, 8, 11, 13, 37, 39, 44, 200),
    }),
  },
  { weight: 1, arbitrary: fc.record({ do: fc.constant('restart' as const) }) },
  { weight: 1, arbitrary: fc.record({ do: fc.constant('double' as const) }) },
  {
    weight: 1,
    arbitrary: fc.record({
      do: fc.constant('order' as const),
      order: fc.oneof(
        fc.record({
          kind: fc.constant('hand' as const),
          channel: key,
          state: fc.constantFrom('on' as const, 'off' as const),
          seconds: seconds(1, 100, 3600),
          holdInFrost: fc.boolean(),
        }),
        fc.record({ kind: fc.constant('auto' as const), channel: key }),
        fc.record({
          kind: fc.constant('lock-out' as const),
          channel: key,
          lockout: fc.constant('x'),
          why: fc.constant('work'),
        }),
        fc.record({ kind: fc.constant('unlock' as const), channel: key, lockout: fc.constant('x') }),
        fc.record({ kind: fc.constant('prove' as const), channel: key, seconds: seconds(10, 60) }),
        fc.record({ kind: fc.constant('all-off' as const), seconds: seconds(600) }),
      ),
    }),
  },
);

/** What a step of nothing but time leaves must not hang on the steps between. */
function playBothWays(player: Player, untilAt: number, cut: number): void {
  const between = Math.round(player.now + (untilAt - player.now) * cut);
  const told = (memory: Memory, at: number, list: ControlEvent[]): StepResult => {
    const result = step(player.plan, memory, player.observed, at);
    list.push(...result.events);
    return result;
  };
  const once: ControlEvent[] = [];
  const twice: ControlEvent[] = [];
  const direct = told(player.memory, untilAt, once);
  const stepped = told(told(player.memory, between, twice).memory, untilAt, twice);
  expect(plain(stepped.memory)).toEqual(plain(direct.memory));
  expect(turns(twice)).toEqual(turns(once));
}

/** When an order left is the one thing that hangs on the steps, and nothing but a relay's report is held against it. */
const plain = (memory: Memory): unknown => ({
  ...memory,
  channels: memory.channels.map((one) => ({ ...one, orderedAt: null })),
  faults: memory.faults.map((fault) => fault.key),
});
const turns = (events: ControlEvent[]) =>
  events.flatMap((event) =>
    event.kind === 'switching' ? [[event.at, event.channel, event.to, event.claim]] : [],
  );

/** control.md's own exceptions written out. */
function checkStanding(player: Player): void {
  const { result, memory } = player;
  for (const [index, one] of result.channels.entries()) {
    const own = memory.channels[index];
    if (own === undefined) throw new Error('A channel without memory.');
    if (own.lockouts.length > 0) expect(one).toMatchObject({ state: 'off', claim: 'lock-out' });
    if (own.overHighLimit) expect(one.state).toBe('off');
    if (one.state === 'on' && one.id !== 'vent' && one.id !== 'pump') {
      const heap = player.heap();
      if (heap.underFloor) expect(['hand', 'proving', 'short-cycle']).toContain(one.claim);
      if (heap.credit === 0) expect(['hand', 'proving', 'short-cycle', 'frost']).toContain(one.claim);
      if (one.claim === 'band')
        expect(heap.drawnTodayS).toBeLessThan(player.plan.sources[0]?.config.dailyLimitS ?? Infinity);
    }
  }
  const state = (id: string) => result.channels.find((one) => one.id === id)?.state;
  expect([state('vent'), state('fan')]).not.toEqual(['on', 'on']);
  for (const heap of result.sources) {
    expect(heap.credit).toBeGreaterThanOrEqual(0);
    expect(heap.credit).toBeLessThanOrEqual(1);
  }
}

/** Off by a claim that may not break least on came no sooner than least on after on. */
function checkLeastOn(player: Player): void {
  const mayBreak = ['lock-out', 'interlock', 'limit', 'hand'];
  for (const one of player.plan.channels) {
    const list = player.events.flatMap((event) =>
      event.kind === 'switching' && event.channel === one.id ? [event] : [],
    );
    list.forEach((event, index) => {
      const begun = list[index - 1];
      const last = event.explanation.ladder.at(-1);
      expect(last).toMatchObject({ claim: event.claim, speaks: true });
      if (
        event.to === 'on' ||
        begun === undefined ||
        begun.claim === 'proving' ||
        mayBreak.includes(event.claim)
      )
        return;
      expect(event.at - begun.at).toBeGreaterThanOrEqual(one.minOnMs);
    });
  }
}

describe('whatever happens', () => {
  it('no claim is broken, silence is silent, and the steps between do not matter', () => {
    fc.assert(
      fc.property(houses, fc.array(deeds, { minLength: 5, maxLength: 60 }), (config, list) => {
        const player = new Player(config, { bench: 5, air: 8, core: 50, base: 40 });
        player.silent = new Set(['bench', 'air', 'core', 'base']);
        for (const deed of list) {
          if (deed.do === 'restart') player.memory = migrateMemory(JSON.parse(JSON.stringify(player.memory)));
          if (deed.do === 'double') {
            const again = step(player.plan, player.memory, player.observed, player.now);
            expect(again.events).toEqual([]);
            expect(again.memory).toEqual(player.memory);
          }
          if (deed.do === 'say') {
            player.now += S;
            player.observed.points = {
              ...player.observed.points,
              [deed.point]: { value: deed.value, at: player.now },
            };
            player.step();
          }
          if (deed.do === 'order') {
            player.now += S;
            player.order(deed.order);
          }
          if (deed.do === 'pass') {
            playBothWays(player, player.now + deed.s * S, deed.cut);
            player.now += deed.s * S;
            player.step();
          }
          checkStanding(player);
        }
        checkLeastOn(player);
      }),
      { numRuns: 250 },
    );
  }, 30_000);
});
