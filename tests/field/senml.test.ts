import { describe, expect, test } from 'vitest';
import { resolvePack } from '@/lib/field/senml';
import * as checks from '../checks/senml';

const now = 1_800_000_000;
const record = (fields: object): object => ({ n: 'a', v: 1, ...fields });

describe("SenML's own examples", () => {
  test('several values with base name, time and unit resolve in order of time (RFC 8428, 5.1.2)', () => {
    const { records, refused } = resolvePack(checks.multipleDatapoints.pack, now);
    expect(refused).toEqual([]);
    expect(records.map(({ n, u, t, v }) => [n.replace('urn:dev:ow:10e2073a0108006:', ''), u, t, v])).toEqual(
      checks.multipleDatapoints.resolved,
    );
  });

  test('thirteen records of one name keep base unit and own units apart (RFC 8428, 5.1.3 and 5.1.4)', () => {
    const { records } = resolvePack(checks.moreMeasurements.pack, now);
    expect(new Set(records.map(({ n }) => n))).toEqual(new Set(['urn:dev:ow:10e2073a01080063']));
    expect(records.map(({ u, t, v }) => [u, t, v])).toEqual(checks.moreMeasurements.resolved);
  });

  test('a base field stays in force until replaced (RFC 8428, 5.1.6)', () => {
    const { records } = resolvePack(checks.twoDevices.pack, now);
    expect(records.map(({ n, u, t, v }) => [n, u, t, v])).toEqual(checks.twoDevices.resolved);
  });

  test('a record of base fields only is neither a measurement nor a fault (RFC 8428, 5.1.7)', () => {
    const { records, refused } = resolvePack(checks.actuation, now);
    expect(refused).toEqual([]);
    expect(records.map(({ index, v }) => [index, v])).toEqual([
      [1, 23.1],
      [2, 1],
      [3, 0],
    ]);
  });

  test('number, text, boolean and data are told apart (RFC 8428, 5.1.5)', () => {
    const { records } = resolvePack(checks.dataTypes, now);
    expect(records.map(({ v, vs, vb, vd }) => v ?? vs ?? vb ?? vd)).toEqual([
      23.1,
      'Machine Room',
      false,
      'aGkgCg',
    ]);
  });
});

describe('time', () => {
  test('times below 2^28 are relative to now, from 2^28 on absolute', () => {
    const { records } = resolvePack(
      [record({ t: checks.lastRelativeS }), record({ t: checks.firstAbsoluteS })],
      now,
    );
    expect(records.map(({ t }) => t)).toEqual([checks.firstAbsoluteS, now + checks.lastRelativeS]);
    expect(new Date(checks.firstAbsoluteS * 1000).toISOString()).toBe('1978-07-04T21:24:16.000Z');
  });

  test('a record without a time is of now, a negative time is before now', () => {
    const { records } = resolvePack([record({}), record({ t: -90 })], now);
    expect(records.map(({ index, t }) => [index, t])).toEqual([
      [1, now - 90],
      [0, now],
    ]);
  });
});

describe('sums and base values', () => {
  test('a base value is added to each value and a base sum to each sum', () => {
    const { records } = resolvePack(
      [
        { n: 'a', bv: 20, bs: 100, v: 0.5, s: 1 },
        { n: 'b', v: -0.5 },
      ],
      now,
    );
    expect(records.map(({ v, s }) => [v, s])).toEqual([
      [20.5, 101],
      [19.5, 100],
    ]);
  });
});

describe('a record that is wrong is refused by itself, and the rest is kept', () => {
  test.each([
    ['a field that must be understood', record({ magic_: 1 }), 'must be understood'],
    ['two values', record({ vb: true }), 'more than one value'],
    ['no value', { n: 'a' }, 'no value'],
    ['a value that is text', { n: 'a', v: '4.2' }, 'v must be a number'],
    ['a value that is not finite', JSON.parse('{"n":"a","v":1e999}'), 'v is not a finite number'],
    ['a time that is not finite', JSON.parse('{"n":"a","v":1,"t":1e999}'), 't is not a finite number'],
    ['a boolean that is a number', { n: 'a', vb: 1 }, 'vb must be true or false'],
    ['something that is no object', 7, 'must be an object'],
    ['a list', [], 'must be an object'],
  ])('%s', (_what, wrong, why) => {
    const { records, refused } = resolvePack([record({ n: 'before' }), wrong, record({ n: 'after' })], now);
    expect(records.map(({ n }) => n)).toEqual(['before', 'after']);
    expect(refused).toEqual([{ index: 1, name: refused[0]?.name, why: expect.stringContaining(why) }]);
  });

  test.each(checks.names)('the name %j may stand: %s', (name, allowed) => {
    const { records } = resolvePack([record({ n: name })], now);
    expect(records.length === 1).toBe(allowed);
  });

  test('an unknown field without the underscore is passed over', () => {
    expect(resolvePack([record({ colour: 'red' })], now).refused).toEqual([]);
  });

  test('a broken base name refuses all that lean on it, so that nothing lands under another name', () => {
    const { records, refused } = resolvePack(
      [record({ bn: 'good/' }), record({ bn: 7 }), record({ n: 'b' }), record({ bn: 'fresh/' })],
      now,
    );
    expect(records.map(({ n }) => n)).toEqual(['good/a', 'fresh/a']);
    expect(refused.map(({ index }) => index)).toEqual([1, 2]);
  });
});

describe('version', () => {
  test('a pack of a later version is refused whole', () => {
    const { records, refused } = resolvePack([record({}), record({ bver: 11 })], now);
    expect(records).toEqual([]);
    expect(refused.map(({ index }) => index)).toEqual([0, 1]);
  });

  test('an earlier version is read', () => {
    expect(resolvePack([record({ bver: 5 })], now).records).toHaveLength(1);
  });
});
