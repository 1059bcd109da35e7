/** Random houses, readings, orders, times, restarts, reports and gaps against what must hold whatever happens. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Memory } from '@/lib/control/memory';
import { step } from '@/lib/control/step';
import type { StepResult } from '@/lib/control/step-result';
import type { ControlEvent } from '@/lib/control/events';
import type { HouseConfig } from '@/lib/control/types';
import { Player } from './player';
import { checkClaims, checkDraws, checkLeastOn, checkPairs, checkStanding } from './model-claims';
import { act, AT_FIRST, blanked, deeds, houses, outside } from './model-house';

/** More of them for a long night: `MODEL_RUNS=5000 npx vitest run --project pure tests/control/model.test.ts`. */
const RUNS = Number(process.env['MODEL_RUNS'] ?? 150);
const LONGEST_MS = Math.max(120_000, RUNS * 2000);

const hushed = (config: HouseConfig): Player => {
  const player = new Player(config, AT_FIRST);
  player.silent = new Set(Object.keys(AT_FIRST));
  return player;
};

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
  channels: memory.channels.map((one) => ({
    ...one,
    orderedAt: null,
    relay: one.relay === null ? null : { ...one.relay, seenAt: null },
  })),
  faults: memory.faults.map((fault) => fault.key),
});
const turns = (events: ControlEvent[]) =>
  events.flatMap((event) =>
    event.kind === 'switching' ? [[event.at, event.channel, event.to, event.claim]] : [],
  );

describe('whatever happens', () => {
  it(
    'no claim is broken, silence is silent, and the steps between do not matter',
    () => {
      fc.assert(
        fc.property(houses, fc.array(deeds, { minLength: 5, maxLength: 60 }), (config, list) => {
          const player = hushed(config);
          for (const deed of list) {
            if (deed.do === 'pass') playBothWays(player, player.now + deed.s * 1000, deed.cut);
            if (deed.do === 'double') {
              const again = step(player.plan, player.memory, player.observed, player.now);
              expect(again.events).toEqual([]);
              expect(again.memory).toEqual(player.memory);
            }
            act(player, deed);
            checkStanding(player);
            checkPairs(player);
          }
          checkLeastOn(player);
          checkClaims(player);
          checkDraws(player);
        }),
        { numRuns: RUNS },
      );
    },
    LONGEST_MS,
  );

  it(
    'with relays that report what they please and a worker that is away, no claim is broken',
    () => {
      fc.assert(
        fc.property(houses, fc.array(outside, { minLength: 5, maxLength: 60 }), (config, list) => {
          const player = hushed(config);
          for (const deed of list) {
            act(player, deed);
            checkStanding(player);
            checkPairs(player);
            const again = step(player.plan, player.memory, player.observed, player.now);
            expect(again.events).toEqual([]);
            expect(again.memory).toEqual(player.memory);
          }
          checkClaims(player);
        }),
        { numRuns: RUNS },
      );
    },
    LONGEST_MS,
  );

  it(
    'a memory that is written out and read back at every step leaves all as it is',
    () => {
      fc.assert(
        fc.property(houses, fc.array(outside, { minLength: 5, maxLength: 60 }), (config, list) => {
          const kept = hushed(config);
          const restarted = hushed(config);
          for (const deed of list) {
            act(kept, deed);
            act(restarted.restart(), deed);
            expect(restarted.memory).toEqual(kept.memory);
            expect(restarted.result.channels).toEqual(kept.result.channels);
          }
          expect(restarted.events).toEqual(kept.events);
        }),
        { numRuns: RUNS },
      );
    },
    LONGEST_MS,
  );

  it(
    'readings that come often leave all as those do that come to the same, one by one',
    () => {
      // a lull is short of nothing: values that move a little at every step, against a memory read back each time
      const drift = fc.array(
        fc.record({
          point: fc.constantFrom('bench', 'air', 'core', 'base'),
          by: fc.double({ min: -0.8, max: 0.8, noNaN: true }),
          s: fc.constantFrom(1, 5, 30),
        }),
        { minLength: 20, maxLength: 150 },
      );
      fc.assert(
        fc.property(houses, drift, (config, list) => {
          const kept = hushed(config);
          const restarted = hushed(config);
          const values: Record<string, number> = { bench: 4.2, air: 6.2, core: 38.5, base: 42.5 };
          for (const { point, by, s } of list) {
            values[point] = (values[point] ?? 0) + by;
            for (const player of [kept, restarted.restart()]) {
              player.now += s * 1000;
              for (const [key, value] of Object.entries(values))
                player.observed.points = { ...player.observed.points, [key]: { value, at: player.now } };
              player.step();
            }
            expect(restarted.memory).toEqual(kept.memory);
            expect(restarted.result.channels).toEqual(kept.result.channels);
          }
          expect(restarted.events).toEqual(kept.events);
        }),
        { numRuns: RUNS },
      );
    },
    LONGEST_MS,
  );

  it(
    'a worker that is back within all leases switches nothing that it would not have switched',
    () => {
      const KEYS = ['bench', 'air', 'core', 'base'];
      fc.assert(
        fc.property(houses, fc.array(deeds, { minLength: 5, maxLength: 40 }), (config, list) => {
          const player = new Player(config, { ...AT_FIRST, bench: 3, air: 3 });
          for (const deed of list) {
            if (deed.do === 'say') player.at({ [deed.point]: deed.value });
            else if (deed.do === 'order') act(player, deed);
            else if (deed.do === 'pass') passFollowed(player, Math.min(deed.s, 300));
            act(player, { do: 'follow' });
            const now = player.now + 5000;
            const points = Object.fromEntries(
              KEYS.map((key) => [key, { value: player.observed.points[key]?.value ?? 0, at: now }]),
            );
            const observed = { ...player.observed, points };
            const stayed = step(player.plan, player.memory, observed, now);
            if (turns(stayed.events).length > 0) continue;
            const relays = blanked(observed.relays, player.now + 2500);
            const back = step(player.plan, player.memory, { ...observed, relays, workerStartedAt: now }, now);
            expect(turns(back.events)).toEqual([]);
          }
        }),
        { numRuns: RUNS },
      );
    },
    LONGEST_MS,
  );
});

/** Time in which nodes do what they are told, and say so. */
function passFollowed(player: Player, s: number): void {
  const untilAt = player.now + s * 1000;
  while (player.now < untilAt) {
    act(player, { do: 'follow' });
    player.until(Math.min(untilAt, player.now + 10_000));
  }
}
