import { expect, it } from 'vitest';
import { suggestPoint } from '@/components/rules/suggest-points';
import type { Point } from '@/lib/schema/yard-view';

const point = (key: string, role: string, unit = 'Cel', name = key) =>
  ({ key, role, unit, name }) as unknown as Point;
const bench = point('bench-1', 'bench', 'Cel', 'Bench probe 1');

it.each<[string, Point[], string | null]>([
  ['the same key first', [point('b', 'bench'), point('bench-1', 'other')], 'bench-1'],
  ['never another unit, whatever its key', [point('bench-1', 'bench', '%RH')], null],
  ['the only one of its role', [point('air', 'house-air'), point('bed', 'bench')], 'bed'],
  ['none where two have its role', [point('bed', 'bench'), point('sill', 'bench')], null],
  ['the same name', [point('x', 'ground', 'Cel', 'bench probe 1'), point('y', 'ground')], 'x'],
  ['none where nothing is alike', [point('x', 'ground')], null],
])('%s', (_what, there, key) => expect(suggestPoint(bench, there)).toBe(key));

it('a role of “other” says nothing, nor does a point that is gone', () => {
  expect(suggestPoint(point('a', 'other'), [point('b', 'other')])).toBeNull();
  expect(suggestPoint(undefined, [bench])).toBeNull();
});
