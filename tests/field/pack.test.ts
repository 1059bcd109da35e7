import { describe, expect, test } from 'vitest';
import { readPack, type PackPoint } from '@/lib/field/pack';
import * as checks from '../checks/senml';

const now = 1_800_000_000_000;
const nowS = now / 1000;
const points = new Map<string, PackPoint>([
  ['bench-1', { unit: 'Cel', role: 'bench' }],
  ['humidity', { unit: '%RH', role: 'humidity' }],
  ['door', { unit: '/', role: 'contact' }],
]);

describe('a pack', () => {
  test('becomes readings in the units of their points, in order of time', () => {
    const pack = [
      { n: 'bench-1', u: 'Far', v: 41, t: nowS },
      { n: 'humidity', u: '%RH', v: 81.5, t: nowS - 30 },
    ];
    expect(readPack(pack, points, now)).toEqual({
      readings: [
        { index: 1, key: 'humidity', at: now - 30_000, value: 81.5 },
        { index: 0, key: 'bench-1', at: now, value: 5 },
      ],
      refused: [],
    });
  });

  test.each([
    ['a name that this node does not have', { n: 'bench-2', u: 'Cel', v: 1 }, 'no point of that name'],
    ['a unit that is not known', { n: 'bench-1', u: 'C', v: 1 }, 'is not known'],
    ['a unit that does not fit', { n: 'humidity', u: '%', v: 0.8 }, 'a ratio'],
    ['a number that is not finite', JSON.parse('{"n":"bench-1","u":"Cel","v":1e999}'), 'not a finite number'],
    ['text', { n: 'bench-1', vs: '4.2' }, 'text is not a measurement'],
    ['data', { n: 'bench-1', vd: 'aGkgCg' }, 'data is not a measurement'],
    ['true where a number is due', { n: 'bench-1', vb: true }, 'not a measurement of this point'],
    ['a sum alone', { n: 'bench-1', s: 12 }, 'a sum alone'],
    [
      'a time more than 2 min ahead',
      { n: 'bench-1', u: 'Cel', v: 1, t: nowS + 121 },
      'more than 2 min ahead',
    ],
    ['half a contact', { n: 'door', u: '/', v: 0.5 }, 'a contact is 0 or 1'],
  ])('refuses %s and keeps the rest', (_what, wrong, why) => {
    const read = readPack([wrong, { n: 'bench-1', u: 'Cel', v: 4 }], points, now);
    expect(read.readings.map(({ value }) => value)).toEqual([4]);
    expect(read.refused).toEqual([{ index: 0, name: expect.any(String), why: expect.stringContaining(why) }]);
  });

  test('takes a time up to 2 min ahead, since clocks differ', () => {
    expect(readPack([{ n: 'bench-1', v: 1, t: nowS + 119 }], points, now).readings).toHaveLength(1);
  });

  test('takes true and false of a contact as 1 and 0, whatever base unit stands beside', () => {
    const pack = [
      { bu: 'Cel', n: 'door', vb: true },
      { n: 'door', vb: false, t: -1 },
    ];
    expect(readPack(pack, points, now).readings.map(({ value }) => value)).toEqual([0, 1]);
  });

  test('of four data types keeps the number and the contact (RFC 8428, 5.1.5)', () => {
    const base = 'urn:dev:ow:10e2073a01080063:';
    const own = new Map<string, PackPoint>([
      [`${base}temp`, { unit: 'Cel', role: 'house-air' }],
      [`${base}label`, { unit: '/', role: 'other' }],
      [`${base}open`, { unit: '/', role: 'contact' }],
      [`${base}nfv-reader`, { unit: '/', role: 'other' }],
    ]);
    const read = readPack(checks.dataTypes, own, now);
    expect(read.readings.map(({ value }) => value)).toEqual([23.1, 0]);
    expect(read.refused.map(({ index }) => index)).toEqual([1, 3]);
  });
});
