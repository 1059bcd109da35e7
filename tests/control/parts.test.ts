/** A house is settled part by part, and only the parts that something stirs: that is never to be seen from outside. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compile } from '@/lib/control/compile';
import { emptyMemory } from '@/lib/control/memory';
import type { Observed } from '@/lib/control/types';
import { stepBoth } from './anew';
import { body, channel, H, house, interlock, point, rest, rule, S, source, START } from './house';
import { AT_FIRST, drifts, houses } from './parts-houses';

const partsOf = (config: Parameters<typeof house>[0]) => {
  const { parts, channels } = compile(house(config));
  return parts.map((one) => one.channels.map((place) => channels[place]?.key));
};

describe('the parts of a house', () => {
  it('hold together what shares a source or an interlock, through others too', () => {
    const parts = partsOf({
      sources: [source('heap'), source('other')],
      channels: [
        channel('a', 1, { source: 'heap' }),
        channel('b', 2),
        channel('c', 3, { source: 'heap' }),
        channel('d', 4),
        channel('e', 5),
        channel('f', 6, { source: 'other' }),
      ],
      interlocks: [interlock('never-with', 'c', 'd'), interlock('needs', 'e', 'd')],
    });
    expect(parts).toEqual([['a', 'c', 'd', 'e'], ['b'], ['f']]);
  });

  it('are settled with a source that nothing draws on', () => {
    const { parts } = compile(house({ sources: [source('heap')] }));
    expect(parts.map(({ channels, sources }) => [channels, sources])).toEqual([
      [[0], []],
      [[], [0]],
    ]);
  });

  it('are known by every point that they ask for', () => {
    const plan = compile(
      house({
        points: ['own', 'spare', 'fact', 'level', 'in', 'out', 'high', 'amps', 'core', 'nobody'].map((key) =>
          point(key, 'other'),
        ),
        sources: [source('heap')],
        channels: [
          channel('other', 1),
          channel('fan', 2, {
            source: 'heap',
            highLimit: { point: 'high', above: 30 },
            runProof: { point: 'amps', above: 1 },
          }),
        ],
        rules: [
          rule(
            'fan',
            body({
              point: 'own',
              standIns: [{ point: 'spare', offset: 0 }],
              only: { all: [{ fact: 'fact', operator: 'lessThan', value: 3 }] },
              rest: rest(600, 600, {
                until: { point: 'level', level: 43 },
                most: 900,
                leastGain: { kelvin: 3, after: 300, intake: 'in', return: 'out' },
              }),
            }),
          ),
        ],
      }),
    );
    expect(plan.askedBy).toEqual([...new Array<number[]>(9).fill([1]), []]);
  });
});

describe('a step that settles only what is stirred', () => {
  it('looks again at what falls due though nobody waits for it: a draw of yesterday leaves the day', () => {
    const lasting = { staleAfterS: 10_800 };
    const plan = compile(
      house({
        points: [point('bench', 'other', lasting), point('air', 'other', lasting)],
        sources: [source('heap', { corePoint: null, basePoint: null })],
        channels: [channel('pump', 1), channel('fan', 2, { source: 'heap' })],
        rules: [rule('pump', body({ point: 'air' })), rule('fan', body())],
      }),
    );
    let memory = emptyMemory();
    const spans: number[] = [];
    for (let hour = 0; hour < 27; hour += 1) {
      const now = START + hour * H;
      // the pump turns at every step, the fan draws for the first two hours
      const points = {
        bench: { value: hour < 2 ? 3 : 9, at: now },
        air: { value: hour % 2 === 0 ? 3 : 9, at: now },
      };
      memory = stepBoth(plan, memory, { workerStartedAt: 0, points, relays: {}, commands: [] }, now).memory;
      spans.push(memory.sources[0]?.spans.length ?? 0);
    }
    expect([spans[1], spans[2], spans.at(-1)]).toEqual([1, 1, 0]);
  });

  it('says what a step that settles everything says, in any house', () => {
    fc.assert(
      fc.property(houses, drifts, (config, drift) => {
        const plan = compile(config);
        const points: Observed['points'] = {};
        let now = START;
        for (const [key, value] of Object.entries(AT_FIRST)) points[key] = { value, at: now };
        const observed = () => ({ workerStartedAt: 0, points: { ...points }, relays: {}, commands: [] });
        let memory = stepBoth(plan, emptyMemory(), observed(), now).memory;
        for (const { s, moves, isAsked } of drift) {
          const wake = memory.wakeAt ?? Infinity;
          if (isAsked && wake < now + s * S) memory = stepBoth(plan, memory, observed(), wake).memory;
          now += s * S;
          Object.keys(AT_FIRST).forEach((key, place) => {
            const move = moves[place] ?? null;
            if (move !== null) points[key] = { value: (points[key]?.value ?? 0) + move, at: now };
          });
          memory = stepBoth(plan, memory, observed(), now).memory;
        }
      }),
      { numRuns: 150 },
    );
  }, 120_000);
});
