import { describe, expect, test } from 'vitest';
import type { FallbackSetting } from '@/lib/field/frames';
import { Fallback, type FallbackChange, type KeptFallback } from '@/worker/yard/fallback';

const setting: FallbackSetting = { point: 'bench-1', below: 2, above: 5, onFor: 1200, offFor: 2400 };

/** A thermostat on relay 1 that is told a temperature at seconds after its start, and what it did then. */
function played(table: [second: number, bench: number | null, expected?: string][], rate = 1) {
  const fallback = new Fallback(null, rate, 0, () => undefined);
  fallback.take({ '1': setting });
  const did: [number, string][] = [];
  for (const [second, bench] of table) {
    for (const change of fallback.look((second * 1000) / rate, () => bench))
      did.push([second, words(change)]);
  }
  return {
    did,
    expected: table.flatMap(([s, , what]) => (what === undefined ? [] : [[s, what] as [number, string]])),
  };
}
const words = ({ what, why }: FallbackChange) => `${what} ${why}`;

describe('A fallback', () => {
  test.each<[string, Parameters<typeof played>[0]]>([
    [
      'is on under below and off over above, and at exactly either it stays',
      [
        [0, 2],
        [5, 1.99, 'on below'],
        [10, 2.5],
        [15, 5],
        [20, 5.01, 'off above'],
      ],
    ],
    [
      'is never on longer than onFor, and then off for offFor, however cold it is',
      [
        [0, -3, 'on below'],
        [1199.9, -3],
        [1200, -3, 'off longest'],
        [3599.9, -3],
        [3600, -3, 'on below'],
        [4800, -3, 'off longest'],
      ],
    ],
    [
      'rests after a short run too',
      [
        [0, 1, 'on below'],
        [60, 6, 'off above'],
        [70, 1],
        [2459, 1],
        [2460, 1, 'on below'],
      ],
    ],
    [
      'is off while its point is dead, and what ran rests',
      [
        [0, null],
        [5, -127],
        [10, 1, 'on below'],
        [15, null, 'off dead-point'],
        [20, 1],
        [2415, 1, 'on below'],
        [2420, 85, 'off dead-point'],
      ],
    ],
  ])('%s', (_, table) => {
    const { did, expected } = played(table);
    expect(did).toEqual(expected);
  });

  test('counts its spans in app time: at ten times the rate a run of 1200 s ends after 120 s of the clock', () => {
    const { did, expected } = played(
      [
        [0, 1, 'on below'],
        [1199, 1],
        [1200, 1, 'off longest'],
      ],
      10,
    );
    expect(did).toEqual(expected);
  });

  test('ends with a command, and its rest goes on', () => {
    const fallback = new Fallback(null, 1, 0, () => undefined);
    fallback.take({ '1': setting });
    fallback.look(0, () => 1);
    expect(fallback.end(60_000).map(words)).toEqual(['off command']);
    expect(fallback.end(61_000)).toEqual([]);
    expect(fallback.look(2_459_000, () => 1)).toEqual([]);
    expect(fallback.look(2_460_000, () => 1).map(words)).toEqual(['on below']);
  });

  test('is no longer run once a command leaves it out', () => {
    const fallback = new Fallback(null, 1, 0, () => undefined);
    fallback.take({ '1': setting });
    fallback.take({});
    expect(fallback.isSet).toBe(false);
    expect(fallback.look(0, () => 1)).toEqual([]);
  });

  test('that ran when its node went down rests its whole time after the start, one that did not run does not', () => {
    let kept: KeptFallback | null = null;
    const before = new Fallback(null, 1, 0, (now) => (kept = structuredClone(now)));
    before.take({ '1': setting, '2': { ...setting, point: 'bench-2' } });
    before.look(0, (point) => (point === 'bench-1' ? 1 : 9));
    const after = new Fallback(kept, 1, 500_000, () => undefined);
    expect(after.look(500_000, () => 1).map(({ relay, what }) => [relay, what])).toEqual([[2, 'on']]);
    expect(after.look(2_899_000, () => 1).map(({ relay, what }) => [relay, what])).toEqual([[2, 'off']]);
    expect(after.look(2_900_000, () => 1).map(({ relay, what }) => [relay, what])).toEqual([[1, 'on']]);
  });
});
