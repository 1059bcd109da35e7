/** Random houses of which one may ask what comes next: points never fall silent in them, so that readings can be held. */
import fc from 'fast-check';
import type { ConditionTree } from '@/lib/control/rule-body';
import type { HouseConfig } from '@/lib/control/types';
import { body, channel, house, interlock, point, rest, rule, source } from './house';

export const among = <T>(...list: T[]) => fc.constantFrom(...list);
/** So that nothing falls silent while readings are held. */
const lasting = { staleAfterS: 10_000_000 };

/** A limit, a value itself, and values that must not be; each is passed, met and left by the readings that are tried. */
const CONDITIONS: ConditionTree[] = [
  {
    any: [
      { fact: 'core', operator: 'greaterThanInclusive', value: 40 },
      { fact: 'air', operator: 'lessThan', value: 5 },
    ],
  },
  { all: [{ fact: 'core', operator: 'in', value: [39, 44, 50] }] },
  { not: { any: [{ fact: 'core', operator: 'equal', value: 44 }] } },
  { all: [{ fact: 'bench', operator: 'notIn', value: [3.8, 4, 5] }] },
];

/** Every kind of thing that can come next: rests, recoveries, limits, floors, gains, conditions, interlocks. */
export const houses: fc.Arbitrary<HouseConfig> = fc
  .record({
    ...{
      minOnS: among(0, 120),
      minOffS: among(0, 180),
      longestDraw: among(600, 2400),
      least: among(600, 1800),
    },
    ...{
      most: fc.option(among(1800, 5400)),
      frostMayBreak: fc.boolean(),
      frostLimit: fc.option(among(2, 3)),
    },
    ...{ dailyLimitS: fc.option(among(900, 7200)), coreFloor: fc.option(among(38)), ready: fc.boolean() },
    ...{
      gain: fc.boolean(),
      only: fc.option(among(...CONDITIONS)),
      proof: fc.boolean(),
      longestOnS: fc.option(among(1200)),
      offset: among(0, -0.3),
    },
    ...{ needs: fc.boolean(), delayS: among(0, 60), derived: fc.boolean() },
  })
  .map((given) => {
    const { minOnS, minOffS, longestDraw, least, most, frostMayBreak } = given;
    const drawn = rest(longestDraw, least, {
      frostMayBreak,
      ...(most === null ? {} : { until: { point: 'base', level: 43 }, most: Math.max(most, least) }),
      ...(given.gain ? { leastGain: { kelvin: 3, after: 600, intake: 'air', return: 'return' } } : {}),
    });
    const heap = { source: 'heap', minOnS, minOffS, frostHelp: true, longestOnS: given.longestOnS };
    return house({
      frostLimit: given.frostLimit,
      points: [
        ...[point('bench', 'bench', lasting), point('air', 'house-air', lasting)],
        ...[point('core', 'heap-core', lasting), point('base', 'heap-base', lasting)],
        point('return', 'loop-return', lasting),
        point('amps', 'current', { ...lasting, unit: 'A', min: 0, max: 5 }),
        point('mean', 'other', { ...lasting, derived: { of: 'mean', points: ['bench', 'air'] } }),
      ],
      sources: [
        source('heap', {
          ...{ dailyLimitS: given.dailyLimitS, coreFloor: given.coreFloor },
          ready: given.ready ? { level: 45, forS: 3600 } : null,
        }),
      ],
      channels: [
        channel('fan', 1, {
          ...heap,
          highLimit: { point: 'air', above: 12 },
          runProof: given.proof ? { point: 'amps', above: 0.2 } : null,
        }),
        channel('vent', 2, { loadKind: 'vent', minOnS }),
        channel('pump', 3),
        channel('second', 4, { minOnS }),
      ],
      interlocks: [
        interlock('never-with', 'vent', 'fan', { delayS: given.delayS }),
        ...(given.needs ? [interlock('needs', 'second', 'pump', { delayS: given.delayS })] : []),
      ],
      rules: [
        rule(
          'fan',
          body({
            rest: drawn,
            ...(given.only === null ? {} : { only: given.only }),
            standIns: [{ point: 'air', offset: given.offset }],
          }),
        ),
        rule('vent', body({ purpose: 'cool', point: 'air', band: [{ from: '00:00', low: 8, high: 11 }] })),
        rule('pump', body({ point: given.derived ? 'mean' : 'air' })),
        rule(
          'second',
          body({
            point: 'air',
            band: [
              { from: '00:00', low: 5, high: 9 },
              { from: '02:00', low: 6, high: 9 },
            ],
          }),
        ),
      ],
    });
  });
