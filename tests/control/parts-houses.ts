/** Random houses of several parts, some of which hang together, and days in them. */
import fc from 'fast-check';
import type { RuleBody } from '@/lib/control/rule-body';
import type { HouseConfig, InterlockConfig } from '@/lib/control/types';
import { body, channel, house, interlock, point, rest, rule, source } from './house';

const among = <T>(...list: T[]) => fc.constantFrom(...list);
const derived = (of: string, ...points: string[]) => ({ derived: { of, points } });

/** `mean` is made of two points, `lift` of it and another, `most` of that. */
const MADE = ['mean', 'lift', 'most'];
const BENCHES = ['bench-0', 'bench-1', 'bench-2'];
const MEASURED = [...BENCHES, 'air', 'outdoors', 'core-0', 'core-1', 'base', 'intake', 'return', 'amps'];
export const AT_FIRST: Record<string, number> = Object.fromEntries(
  MEASURED.map((key) => [key, key.startsWith('core') ? 50 : key === 'base' ? 42 : key === 'amps' ? 1 : 5]),
);

/** A clock's periods, the sun's, or one for all day. */
const bands = among<RuleBody['band']>(
  [{ from: '00:00', low: 4, high: 7 }],
  [
    { from: '01:00', low: 3, high: 6 },
    { from: '01:20', low: 5, high: 8 },
    { from: '22:00', low: 2, high: 4 },
  ],
  [
    { from: 'sunrise', low: 5, high: 9 },
    { from: 'sunset-01:00', low: 3, high: 5 },
  ],
);
const conditions = among<RuleBody['only']>(
  undefined,
  { all: [{ fact: 'most', operator: 'greaterThan', value: 5 }] },
  {
    any: [
      { fact: 'time.hour', operator: 'in', value: [1, 3] },
      { fact: 'lift', operator: 'lessThan', value: 1 },
    ],
  },
  { not: { fact: 'outdoors', operator: 'greaterThanInclusive', value: 6 } },
);
const rests = fc.record({
  ...{ longestDraw: among(120, 600, 1800), least: among(60, 600), most: among(900, 3600) },
  ...{ waits: fc.boolean(), gains: fc.boolean(), frostMayBreak: fc.boolean() },
});
const bodies = fc.record({
  ...{ point: among(...BENCHES, 'air', ...MADE), standIn: fc.option(among('air', 'bench-1')) },
  ...{
    band: bands,
    only: conditions,
    cools: among(false, false, true),
    rest: fc.option(rests),
    offset: among(0, -0.5),
  },
  hours: fc.option(among({ from: '00:30', to: '02:00' }, { from: 'sunset', to: 'sunrise' })),
});

type Given = typeof bodies extends fc.Arbitrary<infer T> ? T : never;

function bodyOf({ standIn, offset, cools, rest: given, only, hours, ...more }: Given): RuleBody {
  const waits = given?.waits === true ? { until: { point: 'base', level: 42 }, most: given.most } : {};
  const gains =
    given?.gains === true ? { leastGain: { kelvin: 3, after: 300, intake: 'intake', return: 'return' } } : {};
  return body({
    ...more,
    purpose: cools ? 'cool' : 'warm',
    standIns: standIn === null || standIn === more.point ? [] : [{ point: standIn, offset }],
    ...(only === undefined ? {} : { only }),
    ...(hours === null ? {} : { hours }),
    ...(given === null
      ? {}
      : {
          rest: rest(given.longestDraw, given.least, {
            ...waits,
            ...gains,
            frostMayBreak: given.frostMayBreak,
          }),
        }),
  });
}

const channels = fc.record({
  ...{
    source: among(null, null, 'heap-0', 'heap-0', 'heap-1'),
    minOnS: among(0, 120),
    minOffS: among(0, 60, 180),
  },
  ...{
    frostHelp: fc.boolean(),
    longestOnS: fc.option(among(300)),
    isLimited: fc.boolean(),
    isProved: fc.boolean(),
  },
  ...{
    loadKind: among('motor' as const, 'vent' as const, 'heater' as const),
    rules: fc.array(bodies, { maxLength: 3 }),
  },
});

/** Between channels given by their places; one needs only such as stand before it, so that none needs itself in a ring. */
const locks = fc.array(
  fc.record({
    one: fc.nat(7),
    other: fc.nat(7),
    needs: fc.boolean(),
    delayS: among(0, 5, 60),
    frostMayBreak: fc.boolean(),
  }),
  { maxLength: 3 },
);

export const houses: fc.Arbitrary<HouseConfig> = fc
  .record({
    ...{ channels: fc.array(channels, { minLength: 3, maxLength: 8 }), locks },
    ...{
      frostLimit: fc.option(among(2, 3)),
      frozenAfterS: fc.option(among(300)),
      maxRate: fc.option(among(0.05)),
    },
    ...{ dailyLimitS: fc.option(among(900, 3600)), coreFloor: fc.option(among(49)), ready: fc.boolean() },
  })
  .map((given) => {
    const keyOf = (place: number) => `load-${place % given.channels.length}`;
    const heap = { dailyLimitS: given.dailyLimitS, coreFloor: given.coreFloor };
    return house({
      frostLimit: given.frostLimit,
      points: [
        ...BENCHES.map((key) =>
          point(key, 'bench', { frozenAfterS: given.frozenAfterS, maxRate: given.maxRate }),
        ),
        ...[
          point('air', 'house-air', { staleAfterS: 400 }),
          point('outdoors', 'outdoors', { staleAfterS: 400 }),
        ],
        ...['core-0', 'core-1'].map((key) => point(key, 'heap-core', { staleAfterS: 1200 })),
        ...[point('base', 'heap-base'), point('intake', 'loop-intake'), point('return', 'loop-return')],
        point('amps', 'current'),
        point('most', 'other', derived('greatest', 'lift', 'bench-2')),
        point('lift', 'other', derived('difference', 'mean', 'outdoors')),
        point('mean', 'other', derived('mean', 'bench-0', 'air')),
      ],
      sources: [
        source('heap-0', {
          ...heap,
          corePoint: 'core-0',
          ready: given.ready ? { level: 49, forS: 600 } : null,
        }),
        source('heap-1', { ...heap, corePoint: 'core-1' }),
        source('heap-2', { ...heap, corePoint: 'core-1', ready: { level: 50, forS: 300 } }),
      ],
      channels: given.channels.map(({ isLimited, isProved, rules: _, ...more }, place) =>
        channel(keyOf(place), 20 - place, {
          ...more,
          highLimit: isLimited ? { point: 'bench-2', above: 9 } : null,
          runProof: isProved ? { point: 'amps', above: 0.5 } : null,
        }),
      ),
      interlocks: given.locks.flatMap(({ one, other, needs, ...more }): InterlockConfig[] => {
        const [first, second] = [one, other].map((place) => place % given.channels.length).sort();
        if (first === undefined || second === undefined || first === second) return [];
        return [interlock(needs ? 'needs' : 'never-with', keyOf(second), keyOf(first), more)];
      }),
      rules: given.channels.flatMap(({ rules }, place) =>
        rules.map((one, at) => rule(keyOf(place), bodyOf(one), `rule-${place}-${at}`)),
      ),
    });
  });

/**
 * Hours of slow changes: seconds until each step, how far each measured point moves till then (null: it says nothing), and
 * whether the step comes when the one before asked for it.
 */
export const drifts = fc.array(
  fc.record({
    s: among(7, 30, 30, 30, 60, 60, 200, 900),
    moves: fc.array(among(0, 0, 0, 0.0625, -0.0625, 0.25, -0.25, 1, -1, 3, -3, null), {
      minLength: MEASURED.length,
      maxLength: MEASURED.length,
    }),
    isAsked: fc.boolean(),
  }),
  { minLength: 10, maxLength: 60 },
);
