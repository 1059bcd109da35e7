/** A step that has only to take its readings says what one that settles everything says. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compile } from '@/lib/control/compile';
import { emptyMemory } from '@/lib/control/memory';
import { step } from '@/lib/control/step';
import type { HouseConfig, Observed } from '@/lib/control/types';
import { stepBoth } from './anew';
import { body, channel, house, point, rest, rule, S, source, START } from './house';
import { AT_FIRST, houses } from './model-house';

/** A day of slow changes: by step, seconds until it and how far each point moves. */
const drifts = fc.array(
  fc.record({
    s: fc.constantFrom(7, 30, 30, 30, 60, 60, 200),
    moves: fc.array(fc.constantFrom(0, 0, 0.0625, -0.0625, 0.25, -0.25, 1, -1, 3, -3), {
      minLength: 7,
      maxLength: 7,
    }),
  }),
  { minLength: 20, maxLength: 120 },
);

type Drift = { s: number; moves: number[] }[];

function playBoth(config: HouseConfig, first: Record<string, number>, drift: Drift): void {
  const plan = compile(config);
  let memory = emptyMemory();
  let now = START;
  const values = new Map(Object.entries(first));
  const tell = (): Observed => ({
    workerStartedAt: 0,
    points: Object.fromEntries([...values].map(([key, value]) => [key, { value, at: now }])),
    relays: {},
    commands: [],
  });
  memory = step(plan, memory, tell(), now).memory;
  for (const { s, moves } of drift) {
    now += s * S;
    [...values].forEach(([key, value], place) => values.set(key, value + (moves[place] ?? 0)));
    memory = stepBoth(plan, memory, tell(), now).memory;
  }
}

/** What the model's houses have not: derived points, conditions, a least gain, a proof, hours by the sun. */
const others: fc.Arbitrary<HouseConfig> = fc
  .record({
    offset: fc.constantFrom(0, -0.5),
    minOffS: fc.constantFrom(0, 180),
    above: fc.double({ min: 0, max: 3 }),
  })
  .map(other);

function other({ offset, minOffS, above }: { offset: number; minOffS: number; above: number }): HouseConfig {
  return house({
    frostLimit: 2,
    points: [
      point('bench', 'bench'),
      point('air', 'house-air'),
      point('core', 'heap-core'),
      point('base', 'heap-base'),
      point('intake', 'loop-intake'),
      point('return', 'loop-return'),
      point('amps', 'current'),
      point('gain', 'other', { derived: { of: 'difference', points: ['return', 'intake'] } }),
      point('mean', 'other', { derived: { of: 'mean', points: ['bench', 'air'] } }),
    ],
    sources: [source('heap', { coreFloor: 38, dailyLimitS: 3600 })],
    channels: [
      channel('fan', 1, {
        source: 'heap',
        frostHelp: true,
        minOnS: 60,
        minOffS,
        runProof: { point: 'amps', above },
      }),
      channel('pump', 2, { source: 'heap', minOnS: 120 }),
    ],
    rules: [
      rule(
        'fan',
        body({
          point: 'mean',
          standIns: [{ point: 'air', offset }],
          rest: rest(900, 600, {
            until: { point: 'base', level: 40 },
            most: 1800,
            leastGain: { kelvin: 3, after: 300, intake: 'intake', return: 'return' },
          }),
        }),
      ),
      rule(
        'pump',
        body({
          point: 'air',
          hours: { from: 'sunset', to: 'sunrise' },
          only: {
            any: [
              { fact: 'gain', operator: 'greaterThan', value: 3 },
              { not: { fact: 'core', operator: 'in', value: [50, 51] } },
              { fact: 'bench', operator: 'lessThanInclusive', value: 5 },
            ],
          },
        }),
      ),
    ],
  });
}

describe('a step in a lull', () => {
  it('says what a step that settles everything says, in any house', () => {
    fc.assert(
      fc.property(houses, drifts, (config, drift) => {
        playBoth(config, AT_FIRST, drift);
      }),
      { numRuns: 60 },
    );
  }, 60_000);

  it('does so with derived points, conditions, a least gain, a proof and hours by the sun', () => {
    const first = { bench: 5, air: 5, core: 50, base: 40, intake: 6, return: 10, amps: 1 };
    fc.assert(
      fc.property(others, drifts, (config, drift) => {
        playBoth(config, first, drift);
      }),
      { numRuns: 60 },
    );
  }, 60_000);

  it('begins with what a draw without gain leaves behind, where that ends between two steps', () => {
    const first = { bench: 1, air: 7, core: 50, base: 40, intake: 6, return: 10, amps: 1 };
    // low from 675 s on, so no gain at 795 s, between two steps; its credit would have been spent at 900 s
    const drift = Array.from({ length: 40 }, (_, step) => ({
      s: 27,
      moves: [0, 0, 0, 0, 0, step === 24 ? -3 : 0, 0],
    }));
    playBoth(other({ offset: 0, minOffS: 0, above: 0 }), first, drift);
  });

  it('leaves what an earlier step answered as it was', () => {
    const plan = compile(house({ rules: [rule('fan', body())] }));
    const at = (now: number, bench: number) => ({
      ...{ workerStartedAt: 0, relays: {}, commands: [] },
      points: { bench: { value: bench, at: now } },
    });
    const first = step(plan, emptyMemory(), at(START, 5), START);
    const second = step(plan, first.memory, at(START + S, 6), START + S);
    const third = step(plan, second.memory, at(START + 2 * S, 3), START + 2 * S);
    const values = [first, second, third].map((one) => one.points[0]?.value);
    const states = [first, second, third].map((one) => one.channels[0]?.state);
    expect([values, states]).toEqual([
      [5, 6, 3],
      ['off', 'off', 'on'],
    ]);
    expect(second.channels[0]?.because).toMatchObject({ rules: [{ value: 6, latch: false }] });
  });
});
