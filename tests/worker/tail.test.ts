import { expect, it } from 'vitest';
import { readPack } from '@/lib/field/pack';
import { tailOf } from '@/worker/field/tail';

it('a pack is told as it came: values in the unit of their point, refusals as sent with their reason', () => {
  const points = new Map([['bench-1', { unit: 'Cel', role: 'bench' } as const]]);
  const pack = [
    { n: 'attic', u: 'Cel', v: 3, t: 1_764_554_400 },
    // 41 °F are 5 °C exactly
    { n: 'bench-1', u: 'Far', v: 41, t: 1_764_554_400 },
    { n: 'bench-1', u: 'Pa', v: 3, t: 1_764_554_401 },
  ];
  const { readings, refused } = readPack(pack, points, 1_764_554_402_000);
  expect(tailOf(readings, refused, points, pack)).toEqual([
    { name: 'attic', value: 3, unit: 'Cel', at: null, why: 'this node has no point of that name' },
    { name: 'bench-1', value: 5, unit: 'Cel', at: '2025-12-01T02:00:00.000Z', why: null },
    {
      ...{ name: 'bench-1', value: 3, unit: 'Pa', at: null },
      why: 'the unit "Pa" is a pressure, but this point is kept in Cel',
    },
  ]);
});
